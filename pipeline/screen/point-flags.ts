import { studentTQuantile } from "../numerics/distributions.ts";
import type { Flag, RobustFit } from "../records/fits.ts";
import { textOf } from "../records/measurements.ts";
import type { Suspects } from "./causes/cause.ts";
import { competeForPoint } from "./causes/compete-point.ts";
import type { OffPoint } from "./point-screen.ts";
import type { ScreenInput } from "./screen-input.ts";
import type { SystemModel } from "./system-model.ts";
import { counted, inCelsius, offBy, threeDigits } from "./wording.ts";

/** Digits of a proposed value: more than any measurement has. */
const PROPOSED_DIGITS = 8;

/** The flag of one off point: what was seen, what probably happened, what to look at. */
export function pointFlag(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  off: OffPoint,
  suspects: Suspects,
): Flag {
  const fit = input.fits[off.system]!;
  const verdict = competeForPoint({ input, models, fit, point: off.point, suspects, threshold: off.threshold });
  const flag = {
    scope: "measurement",
    code: "off-curve",
    severity: "blocking",
    row: fit.points.row[off.point]!,
    source: fit.points.source[off.point]!,
    system: off.system,
    suspectedCause: verdict.cause ?? "no simple cause",
    evidence: evidence(input, fit, off),
    lookAt: verdict.lookAt,
  } as const;
  if (verdict.cause === undefined) return flag;
  const named = { ...flag, causeDetail: verdict.detail, causeProbability: verdict.probability };
  if (verdict.proposedValue === undefined) return named;
  // Conversions leave noise in the last digits of a number that people will copy.
  return { ...named, proposedValue: Number(verdict.proposedValue.toPrecision(PROPOSED_DIGITS)) };
}

function evidence(input: ScreenInput, fit: RobustFit, { point, z, unsure, impossible }: OffPoint): string {
  if (impossible) return `no solubility is measured at ${inCelsius(fit.points.temperatureK[point]!)}`;
  const seen = `${offBy(fit.deviation[point]!)} ${comparison(fit, point)} (z = ${z.toFixed(1)})`;
  const expected = expectation(input, fit, point);
  const few = unsure ? "; few points are left to judge by, told because it is more than a factor 2" : "";
  return `${seen}${expected === "" ? "" : `; ${expected}`}${few}`;
}

/** What the point was compared with. */
function comparison(fit: RobustFit, point: number): string {
  const source = fit.points.source[point]!;
  if (fit.agreement === "conflict") return "the curve of its own source";
  const others = fit.soundSources.filter((other) => other !== source).length;
  if (others === 0) return "the curve of the other points of its source";
  return fit.soundSources.includes(source)
    ? `the curve of ${counted(others + 1, "source")}, its own included`
    : `the curve of ${counted(others, "other source")}`;
}

/** `expected 12.3 mg/mL at 25.0 °C, limits 11.8 to 12.9`: 95 % limits of a measurement of this source. */
function expectation(input: ScreenInput, fit: RobustFit, point: number): string {
  const row = fit.points.row[point]!;
  const half = studentTQuantile(0.975, Math.max(1, fit.degreesOfFreedom)) * fit.deviationSd[point]!;
  const [mean, low, high] = [0, -half, half].map((by) => input.inReportedUnit(row, fit.predicted[point]! + by));
  if (mean === undefined) return "";
  const unit = textOf(input.table, input.table.reportedUnit[row]!);
  const at = `expected ${threeDigits(mean)} ${unit} at ${inCelsius(fit.points.temperatureK[point]!)}`;
  return low === undefined || high === undefined
    ? at
    : `${at}, limits ${threeDigits(Math.min(low, high))} to ${threeDigits(Math.max(low, high))}`;
}

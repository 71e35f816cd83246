import { curvesOf, type Edition, measurementId } from "../../records/edition.ts";
import type { Curve, CurveModel, Transition } from "../../records/fits.ts";
import type { CurveRow } from "../../records/generated/curves.ts";
import type { CurveDocument } from "../../records/generated/curves-json.ts";
import { crossingsPart } from "../form-crossings.ts";
import type { Loose } from "./account.ts";
import { mixtureDocuments } from "./mixtures.ts";
import { disagreements, sourcesOfCurve } from "./source-standings.ts";

/** Equations with the coefficients named a, b, c in the order of the columns; y is x or r. */
const EQUATIONS: Readonly<Record<CurveModel, string>> = {
  "van 't Hoff": "ln y = a + b/T",
  "modified Apelblat": "ln y = a + b/T + c ln T",
  "quadratic in 1/T": "ln y = a + b/T + c/T^2",
  "Buchowski-Ksiazczak lambda-h": "ln(1 + a (1 - y)/y) = a b (1/T - 1/Tm)",
  constant: "ln y = a",
};

/** Equation of a curve in the letters of its columns. */
export function equationOf(curve: Curve): string {
  return EQUATIONS[curve.model].replaceAll("y", curve.fitBasis === "ln x" ? "x" : "r");
}

const kilo = (value: number | undefined) => (value === undefined ? undefined : value / 1000);
const unlessNaN = (value: number | undefined) => (value === undefined || Number.isNaN(value) ? undefined : value);

/**
 * What both forms of a curve share. The forms add to it by `Object.assign`: an object literal that spreads it and adds
 * twenty fields more costs V8 0.1 ms a curve, fifty times as much.
 */
function shared(curve: Curve, edition: Edition) {
  const [low, high] = curve.temperatureRangeK;
  return {
    curve_id: curve.curveId,
    system: edition.systems[curve.system]?.id ?? "",
    branch: curve.branch,
    model: curve.model,
    equation: equationOf(curve),
    fit_basis: curve.fitBasis,
    T_min_K: low,
    T_max_K: high,
    n: curve.n,
    n_sources: curve.nSources,
    n_laboratories: curve.nLaboratories,
    rmsd_ln: curve.rmsd,
    ard_percent: curve.ardPercent,
    within_sd: curve.withinSd,
    between_sd: curve.betweenSd,
    between_sd_degrees_of_freedom: curve.betweenDegreesOfFreedom,
    aicc: unlessNaN(curve.aicc),
    grade: edition.grades[curve.system]?.grade,
  };
}

/** The transition at the warm end of a branch; undefined where it has none. */
function transitionOf({ system, branch }: Curve, edition: Edition): Transition | undefined {
  return branch === 1 ? edition.fits[system]?.transition : undefined;
}

/** One row of `curves.csv`. */
function curveRow(curve: Curve, edition: Edition): Loose<CurveRow> {
  const [a, b, c] = curve.coefficients;
  const p = curve.coefficients.length;
  const covariance = (i: number, j: number) => (i < p && j < p ? curve.covariance[i * p + j] : undefined);
  const enthalpy = curve.dissolutionEnthalpy;
  const transition = transitionOf(curve, edition);
  return Object.assign(shared(curve, edition), {
    a: a?.value,
    u_a: a?.standardUncertainty,
    b: b?.value,
    u_b: b?.standardUncertainty,
    c: c?.value,
    u_c: c?.standardUncertainty,
    cov_ab: covariance(0, 1),
    cov_ac: covariance(0, 2),
    cov_bc: covariance(1, 2),
    runners_up: curve.runnersUp.map(({ model, why }) => `${model}: ${why}`).join("; ") || undefined,
    dissolution_enthalpy_kJ_per_mol: kilo(enthalpy?.value),
    dissolution_enthalpy_low: kilo(enthalpy?.low),
    dissolution_enthalpy_high: kilo(enthalpy?.high),
    dissolution_enthalpy_temperature_K: enthalpy?.temperatureK,
    transition_K: transition?.temperatureK,
    transition_low_K: transition?.low,
    transition_high_K: transition?.high,
    transition_probability: transition?.probability,
    notices: curve.notices.join("; ") || undefined,
    grade_reasons: edition.grades[curve.system]?.reasons.join("; "),
  }) as Loose<CurveRow>;
}

/** Rows of `curves.csv`, by system and branch. */
export function* curveRows(edition: Edition): Generator<Loose<CurveRow>> {
  for (const curve of curvesOf(edition)) yield curveRow(curve, edition);
}

/** Ideal solubility of a curve, or why there is none. */
function idealPart(
  ideal: Edition["ideals"][number] | undefined,
): Pick<CurveDocument, "ideal_solubility" | "no_ideal_solubility"> {
  if (ideal === undefined) return {};
  if ("whyNot" in ideal) return { no_ideal_solubility: ideal.whyNot };
  const { temperatureK, low, high, gammaLow, gammaHigh } = ideal;
  const gamma = { activity_coefficient_low: gammaLow, activity_coefficient_high: gammaHigh };
  return { ideal_solubility: { temperature_K: temperatureK, low, high, ...gamma } };
}

/** One curve of `curves.json`, with its measurements. */
function curveDocument(curve: Curve, edition: Edition): Loose<CurveDocument> {
  const { points, kept } = edition.fits[curve.system]?.robust ?? { points: undefined, kept: undefined };
  const ids: string[] = [];
  points?.row.forEach((row, i) => {
    const inside = edition.rowResults.branch[row] === curve.branch;
    if (kept?.[i] === 1 && inside) ids.push(measurementId(edition, row));
  });
  const enthalpy = curve.dissolutionEnthalpy;
  const p = curve.coefficients.length;
  const transition = transitionOf(curve, edition);
  return Object.assign(shared(curve, edition), {
    coefficients: curve.coefficients.map((c) => ({
      name: c.name,
      value: c.value,
      standard_uncertainty: c.standardUncertainty,
    })),
    covariance: curve.coefficients.map((_, i) => curve.covariance.slice(i * p, (i + 1) * p)),
    runners_up: curve.runnersUp.map((r) => ({
      model: r.model,
      aicc: unlessNaN(r.aicc),
      leave_one_out: unlessNaN(r.leaveOneOut),
      why: r.why,
    })),
    dissolution_enthalpy: enthalpy && {
      kJ_per_mol: enthalpy.value / 1000,
      low: enthalpy.low / 1000,
      high: enthalpy.high / 1000,
      temperature_K: enthalpy.temperatureK,
    },
    transition: transition && {
      temperature_K: transition.temperatureK,
      low_K: transition.low,
      high_K: transition.high,
      probability: transition.probability,
    },
    ...(curve === edition.fits[curve.system]?.curves.at(-1) ? idealPart(edition.ideals[curve.system]) : {}),
    ...sourcesOfCurve(edition, curve),
    ...crossingsPart(edition, curve),
    notices: [...curve.notices],
    grade_reasons: [...(edition.grades[curve.system]?.reasons ?? [])],
    measurement_ids: ids,
  }) as Loose<CurveDocument>;
}

/** The document `curves.json` as text, one curve a line: it never stands in memory as a whole. */
export function* curvesJson(edition: Edition): Generator<string> {
  yield `{"format":1,"program_version":${JSON.stringify(edition.programVersion)},"curves":[`;
  let mark = "\n";
  for (const curve of curvesOf(edition)) {
    yield mark + JSON.stringify(curveDocument(curve, edition));
    mark = ",\n";
  }
  yield `\n],"disagreements":${JSON.stringify(disagreements(edition))},"mixtures":${JSON.stringify(mixtureDocuments(edition, edition.mixtures.models))}}\n`;
}

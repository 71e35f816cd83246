import { hubConverter } from "../../pipeline/bases/hub-converter.ts";
import type { Needs } from "../../pipeline/bases/needs.ts";
import { parseTemperatureUnit } from "../../pipeline/bases/temperature.ts";
import { parseUnit } from "../../pipeline/bases/units.ts";
import type { MeasurementTable } from "../../pipeline/records/measurements.ts";
import type { Change, RereadRow } from "../../pipeline/records/reread.ts";

/** What conversions need to know of an invented world. */
export interface Converting {
  readonly table: MeasurementTable;
  /** By system. */
  readonly needs: readonly Needs[];
  /** By source. */
  readonly temperatureUnits: readonly string[];
}

/** Number in a unit that says ln x, the solute weighed as said. */
export function write(
  needs: Needs,
  unit: string,
  lnX: number,
  basis: "anhydrous" | "hydrate equivalent per total solvent",
): number {
  return converter(needs, unit, basis)!.fromHub(massRatio(needs, Math.exp(lnX)));
}

const units = new Map<string, ReturnType<typeof parseUnit>>();

function converter(needs: Needs, unit: string, basis: Parameters<typeof hubConverter>[2]) {
  const parsed = units.get(unit) ?? parseUnit(unit);
  units.set(unit, parsed);
  if (parsed.kind !== "unit") return undefined;
  const found = hubConverter(parsed.unit, needs, basis);
  return found.kind === "converter" ? found.converter : undefined;
}

const massRatio = (needs: Needs, x: number) =>
  ((x / (1 - x)) * needs.soluteMolarMass!.value) / needs.solventMolarMass!.value;
const moleFraction = (needs: Needs, r: number) => {
  const ratio = (r * needs.solventMolarMass!.value) / needs.soluteMolarMass!.value;
  return ratio / (1 + ratio);
};

/** Puts a reported number into a row, with all that follows from it. */
export function setValue(b: Converting, row: number, value: number): void {
  const { table } = b;
  const system = table.identity[row]!;
  const r = converter(b.needs[system]!, table.texts.texts[table.reportedUnit[row]!]!, "anhydrous")!.toHub(value);
  table.reportedValue[row] = value;
  table.massRatio[row] = r;
  table.moleFraction[row] = moleFraction(b.needs[system]!, r);
  table.massConcentration[row] = converter(b.needs[system]!, "mg/mL solution", "anhydrous")!.fromHub(r);
  if (!(r > 0)) table.state[row] = 2;
}

/** The row under a change, as the merge would compute it. */
export function reread(b: Converting, row: number, change: Change): RereadRow | undefined {
  const { table } = b;
  const own = table.identity[row]!;
  const unit = table.texts.texts[table.reportedUnit[row]!]!;
  const value = table.reportedValue[row]!;
  let system = own;
  let [number, read, T] = [value, unit, table.temperatureK[row]!];
  let basis: "anhydrous" | "hydrate per added solvent" | "hydrate equivalent per total solvent" = "anhydrous";
  if (change.kind === "factor") number *= change.factor;
  else if (change.kind === "value") number = change.value;
  else if (change.kind === "unit") read = change.unit;
  else if (change.kind === "temperature") T = change.temperatureK;
  else if (change.kind === "solute basis") basis = change.basis;
  else if (change.kind === "solvent") system = change.system;
  else {
    const scale = b.temperatureUnits[table.source[row]!]!;
    if (scale === change.scale) return undefined;
    T = parseTemperatureUnit(change.scale)!.toKelvin(parseTemperatureUnit(scale)!.fromKelvin(T));
  }
  if (basis !== "anhydrous" && b.needs[own]!.crystalMolarMass === undefined) return undefined;
  if (change.kind === "solute basis" && basis === "anhydrous") return undefined;
  const r = converter(b.needs[system]!, read, basis)?.toHub(number);
  if (r === undefined || !(r > 0)) return undefined;
  const lnValue = Math.log(moleFraction(b.needs[system]!, r));
  const reportedValue = converter(b.needs[own]!, unit, "anhydrous")!.fromHub(r);
  return Number.isFinite(lnValue) && T > 0 ? { lnValue, temperatureK: T, reportedValue } : undefined;
}

import { moleFractionAt } from "../bases/hub-values.ts";
import { isOpenAt, standardFromRelative, type Unit } from "../bases/unit.ts";
import type { Problem } from "../problems/catalogue.ts";
import { type CellFault, readingProblem } from "../records/cells.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import { codeOf, type MeasurementTable, RowState } from "../records/measurements.ts";
import type { Reading } from "../records/readings.ts";
import type { Settings } from "../records/settings.ts";
import type { Identity } from "../records/systems.ts";
import type { LiquorModel } from "./liquor.ts";
import { type ReportedValue, readReportedValue } from "./reported-value.ts";
import { readDensity, readVolumeTemperature } from "./row-volume.ts";
import { sourceCells } from "./source-cells.ts";
import { type RowTemperature, readRowTemperature } from "./temperature.ts";
import { bindUnit, readSoluteBasis, readUnit, type UnitContext } from "./unit-context.ts";
import { impossibleValue } from "./value-checks.ts";
import { rowUncertainty } from "./value-uncertainty.ts";

/** Methods whose values are shown and never fitted. */
const NEVER_FITTED: ReadonlySet<string> = new Set(["cloud-point", "kinetic-from-stock"]);
const METHODS: readonly string[] = [
  ...["gravimetric", "titration", "hplc", "uv", "refractive-index", "isothermal-synthetic"],
  ...["clear-point", "cloud-point", "kinetic-from-stock", "unspecified"],
];
const EXCESS_SOLID: readonly string[] = ["", "yes", "no", "unknown"];
const TERM_UNIT = "pharmacopoeia term";

/** What normalising a source needs besides its rows. */
export interface NormaliseContext {
  readonly identities: readonly Identity[];
  /** Properties of the liquor of an identity, the same object at every call. */
  readonly liquorOf: (who: Identified) => LiquorModel;
  readonly settings: Settings;
}

/** One row on its way into the table. */
interface Row {
  readonly reading: Reading;
  readonly who: Identified;
  readonly text: string;
  readonly reported: ReportedValue;
  readonly temperature: RowTemperature;
  readonly volumeTemperatureK: number;
  readonly solutionDensity: number;
  readonly method: string;
  readonly context: UnitContext;
}

const isFault = (value: object): value is CellFault => "code" in value;

/** The word of a field with fixed words, or the fault that lists them. */
function choice(field: string, text: string, words: readonly string[]): CellFault | undefined {
  if (words.includes(text)) return undefined;
  const known = words.filter((word) => word !== "").join(", ");
  return { field, code: "bad-choice", found: `${field} "${text}"`, expected: `one of ${known}` };
}

/**
 * Normalises one source: every identified reading becomes a row of the table on the common basis, or is refused with its
 * place. Rows of one unit, solute and solvent share one conversion; only densities change with their temperature.
 */
export function normaliseSource(
  { source, readings, who: whos }: IdentifiedSource,
  sourceIndex: number,
  table: MeasurementTable,
  { identities, liquorOf, settings }: NormaliseContext,
): Problem[] {
  const cells = sourceCells(source);
  const refused: Problem[] = [];
  const units = new Map<string, Unit | CellFault>();
  const contexts = new Map<Identified, Map<string, UnitContext>>();
  const defaultMethod = source.card.method ?? "unspecified";
  const handbook = source.card.origin === "handbook";
  const columnCode = source.headings.map((heading) => codeOf(table.texts, heading));

  const unitOf = (text: string): Unit | CellFault => {
    let unit = units.get(text);
    if (unit === undefined) {
      unit = readUnit(text);
      units.set(text, unit);
    }
    return unit;
  };

  const contextOf = (
    who: Identified,
    unitText: string,
    reading: Reading,
    valueText: string,
  ): UnitContext | CellFault => {
    const basisText = cells.text.solute_basis(reading);
    let known = contexts.get(who);
    if (known === undefined) {
      known = new Map();
      contexts.set(who, known);
    }
    // What a conversion assumes follows from which densities it has, so those are part of the key.
    const { solutionDensity: model, solventDensityAtVolumeTemperature: atVolume } = liquorOf(who).needs;
    const key = `${unitText}\u0000${basisText}\u0000${model?.kind}\u0000${atVolume === undefined}`;
    const found = known.get(key);
    if (found !== undefined) return found;
    const unit = unitOf(unitText);
    if (isFault(unit)) return unit;
    if (unit.namedSolvent !== undefined && identities[who.index]?.solvent !== unit.namedSolvent) {
      return { field: "solubility", code: "open-unit", found: `"${unitText}" in ${identities[who.index]?.solvent}` };
    }
    const basis = readSoluteBasis(basisText, who, unit, valueText);
    if (typeof basis !== "string") return basis;
    const context = bindUnit(unit, basis, liquorOf(who));
    if (!isFault(context)) known.set(key, context);
    else if (context.code === "no-density")
      return { ...context, found: liquorOf(who).missingDensity() ?? context.found };
    return context;
  };

  const readRow = (reading: Reading, who: Identified): Row | CellFault => {
    const text = reading.cells[reading.valueIndex] ?? "";
    const reported = readReportedValue(text, cells.decimal);
    if (isFault(reported)) return reported;
    const method = cells.text.method(reading) || defaultMethod;
    const wrong =
      choice("method", method, METHODS) ?? choice("excess_solid", cells.text.excess_solid(reading), EXCESS_SOLID);
    if (wrong !== undefined) return wrong;
    const temperature = readRowTemperature(
      cells,
      reading,
      method === "clear-point" || method === "cloud-point",
      settings,
    );
    if (isFault(temperature)) return temperature;
    const liquor = liquorOf(who);
    const volume = readVolumeTemperature(cells, reading);
    if (typeof volume !== "number") return volume;
    const density = readDensity(cells, reading);
    if (typeof density !== "number") return density;
    liquor.setConditions(temperature.kelvin, volume, density);
    const unitText = reported.kind === "range" && reported.term ? TERM_UNIT : cells.unitOf.solubility(reading);
    const context = contextOf(who, unitText, reading, text);
    return isFault(context)
      ? context
      : {
          reading,
          who,
          text,
          reported,
          temperature,
          volumeTemperatureK: volume,
          solutionDensity: density,
          method,
          context,
        };
  };

  readings.forEach((reading, i) => {
    const who = whos[i] as Identified;
    const row = readRow(reading, who);
    const fault = isFault(row) ? row : writeRow(row);
    if (fault !== undefined) refused.push(readingProblem(source, reading, fault));
  });
  return refused;

  /** Converts a row and appends it, or says why it cannot be. */
  function writeRow(row: Row): CellFault | undefined {
    const { reported, context, text } = row;
    if (reported.kind === "range") return writeRange(row, reported.low, reported.high);
    const impossible = impossibleValue(reported.value, context.unit, text);
    if (impossible !== undefined) return impossible;
    if (isOpenAt(context.unit, reported.value)) {
      const readings = context.unit.readings;
      const found = `${text} ${context.unit.canonical} can be ${readings.join(", or ")}`;
      return { field: "solubility", code: "open-volume-basis", found, expected: `one of ${readings.join(", ")}` };
    }
    const r = context.converter.toHub(reported.value);
    if (!(r > 0)) return noRatio(row);
    if (cells.text.excess_solid(row.reading) === "no") return writeRange(row, reported.value, Number.NaN);
    return writePoint(row, reported.value, r);
  }

  function writePoint(row: Row, value: number, r: number): CellFault | undefined {
    const { context, who } = row;
    const { unit, converter, liquor } = context;
    const identity = identities[who.index] as Identity;
    const c = liquor.massConcentration(r);
    const level = Number.isNaN(c) ? 1000 * r : c;
    const u = rowUncertainty(
      {
        cells,
        reading: row.reading,
        value,
        unit,
        level,
        massRatio: r,
        method: row.method,
        handbookSalt: handbook && identity.aqueousSalt,
      },
      identity.aqueousSalt,
      settings,
    );
    if ("code" in u) return u;
    const x = moleFractionAt(r, liquor.needs);
    const relative = converter.relativeUncertainty(value, standardFromRelative(unit.scale, value, u.relative), r);
    const at = startRow(row);
    const window = settings.temperature_window_K;
    const inside = row.temperature.kelvin >= window.low && row.temperature.kelvin <= window.high;
    table.state[at] = NEVER_FITTED.has(row.method) || !inside ? RowState.notFitted : RowState.point;
    table.reportedValue[at] = value;
    table.massRatio[at] = r;
    table.moleFraction[at] = x;
    table.massConcentration[at] = c;
    table.molPerL[at] = c / identity.soluteMolarMass;
    // d ln x/d ln r = 1 - x: what is relative to r is less so to x when the solution is rich.
    table.relativeU[at] = Number.isNaN(x) ? relative : relative * (1 - x);
    table.assumptions[at] = assumptionsCode(
      row,
      u.assumption,
      inside ? undefined : "outside the temperature window: not fitted",
    );
    return undefined;
  }

  /** An interval: limits in the reported unit, and as mass ratios in ascending order. */
  function writeRange(row: Row, low: number, high: number): CellFault | undefined {
    const { converter, unit } = row.context;
    for (const limit of [low, high]) {
      const impossible = Number.isNaN(limit) ? undefined : impossibleValue(limit, unit, String(limit));
      if (impossible !== undefined && !(limit === 0)) return impossible;
    }
    const [a, b] = [converter.toHub(low), converter.toHub(high)];
    if (Number.isNaN(a) && Number.isNaN(b)) return noRatio(row);
    const descending = unit.scale.kind === "reciprocal" || unit.scale.sign < 0;
    const at = startRow(row);
    table.state[at] = RowState.interval;
    table.reportedText[at] = codeOf(table.texts, row.text);
    table.valueLow[at] = low;
    table.valueHigh[at] = high;
    table.massRatioLow[at] = descending ? b : a;
    table.massRatioHigh[at] = descending ? a : b;
    const bound = row.reported.kind === "number" ? "no excess solid: a lower bound" : undefined;
    table.assumptions[at] = assumptionsCode(row, bound, undefined);
    return undefined;
  }

  function noRatio({ context, text }: Row): CellFault {
    const missing = context.liquor.missingDensity();
    if (missing !== undefined && context.unit.basis.includes("volume")) {
      return { field: "solubility", code: "no-density", found: missing };
    }
    const found = `${text} ${context.unit.canonical} leaves no room for the solvent, or is beyond what the density is known for`;
    return { field: "solubility", code: "fraction-at-or-above-one", found };
  }

  /** Appends a row with what every row has; returns its number. */
  function startRow({ reading, who, temperature, method, context, volumeTemperatureK, solutionDensity }: Row): number {
    const at = table.count++;
    table.source[at] = sourceIndex;
    table.line[at] = reading.line;
    table.column[at] = columnCode[reading.valueIndex] ?? 0;
    table.identity[at] = who.index;
    table.temperatureK[at] = temperature.kelvin;
    table.temperatureU[at] = temperature.u;
    table.temperatureUnit[at] = codeOf(table.texts, cells.unitOf.temperature(reading));
    table.reportedUnit[at] = codeOf(table.texts, unitShown(reading));
    table.soluteBasis[at] = codeOf(table.texts, context.soluteBasis);
    table.volumeTemperatureK[at] = volumeTemperatureK;
    table.solutionDensity[at] = solutionDensity;
    table.method[at] = codeOf(table.texts, method);
    table.reference[at] = codeOf(table.texts, cells.text.reference(reading) || (source.card.reference ?? ""));
    table.doi[at] = codeOf(table.texts, cells.text.doi(reading) || (source.card.doi ?? ""));
    table.carried[at] = codeOf(table.texts, carriedText(reading));
    return at;
  }

  function unitShown(reading: Reading): string {
    return cells.unitOf.solubility(reading);
  }

  function carriedText(reading: Reading): string {
    let text = "";
    for (const { heading, index } of source.carried) {
      const cell = reading.cells[index];
      if (cell) text += `${text === "" ? "" : "; "}${heading}=${cell}`;
    }
    return text;
  }

  function assumptionsCode(
    { who, context, temperature }: Row,
    value: string | undefined,
    more: string | undefined,
  ): number {
    const all = [...who.assumptions, ...context.assumptions, temperature.assumption, value, more];
    return codeOf(table.texts, all.filter((text) => text !== undefined && text !== "").join("; "));
  }
}

import { moleFractionAt } from "../bases/hub-values.ts";
import { isOpenAt, type Unit } from "../bases/unit.ts";
import type { Problem } from "../problems/catalogue.ts";
import { type CellFault, readingProblem } from "../records/cells.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import { codeOf, type MeasurementTable, RowState } from "../records/measurements.ts";
import type { Reading } from "../records/readings.ts";
import type { Settings } from "../records/settings.ts";
import type { Identity } from "../records/systems.ts";
import { isNeverFitted, wrongExcessSolid, wrongMethod } from "./fixed-words.ts";
import type { LiquorModel } from "./liquor.ts";
import { type ReportedValue, readReportedValue } from "./reported-value.ts";
import { rowCautions } from "./row-cautions.ts";
import { contextFinder } from "./row-contexts.ts";
import { readDensity, readVolumeTemperature } from "./row-volume.ts";
import { createSolidCheck } from "./solid-check.ts";
import { sourceCells } from "./source-cells.ts";
import { type RowTemperature, readRowTemperature } from "./temperature.ts";
import type { UnitContext } from "./unit-context.ts";
import { impossibleValue } from "./value-checks.ts";
import { rowUncertainty } from "./value-uncertainty.ts";

const TERM_UNIT = "pharmacopoeia term";
/** Unit of the limits of a term, for tables and messages. */
const TERM_LIMITS_UNIT = "mL solvent/g";

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

/** True for a descriptive term, whose range is in mL solvent per g whatever the unit of the column. */
const isTerm = (reported: ReportedValue): boolean => reported.kind === "range" && reported.term;

/** True for a unit whose number falls as the solubility grows: mL solvent per g, -ln x. */
const isDescending = ({ scale }: Unit): boolean => scale.kind === "reciprocal" || scale.sign < 0;

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
  const solidChecked = createSolidCheck(cells, identities);
  const refused: Problem[] = [];
  const defaultMethod = source.card.method ?? "unspecified";
  const handbook = source.card.origin === "handbook";
  const columnCode = source.headings.map((heading) => codeOf(table.texts, heading));

  const contextOf = contextFinder(cells, identities, liquorOf);

  const readRow = (reading: Reading, who: Identified): Row | CellFault => {
    const text = reading.cells[reading.valueIndex] ?? "";
    const reported = readReportedValue(text, cells.decimal);
    if (isFault(reported)) return reported;
    const method = cells.text.method(reading) || defaultMethod;
    const wrong = wrongMethod(method) ?? wrongExcessSolid(cells.text.excess_solid(reading));
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
    const unitText = isTerm(reported) ? TERM_UNIT : cells.unitOf.solubility(reading);
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
    if (cells.text.excess_solid(row.reading) === "no") {
      // At least this much dissolves: of mL solvent per g, or of -ln x, that is at most the number.
      return isDescending(context.unit)
        ? writeRange(row, Number.NaN, reported.value)
        : writeRange(row, reported.value, Number.NaN);
    }
    return context.liquor.takeNearby(r) ? writeNearby(row, reported.value) : writePoint(row, reported.value, r);
  }

  /** A row whose solution density comes from one measured nearby: bound again, for its assumptions are others. */
  function writeNearby(row: Row, value: number): CellFault | undefined {
    const context = contextOf(row.who, unitShown(row.reading), row.reading, row.text);
    if (isFault(context)) return context;
    const r = context.converter.toHub(value);
    return r > 0 ? writePoint({ ...row, context }, value, r) : noRatio(row);
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
    const withoutMass = Number.isNaN(x);
    // d ln x/d ln r = 1 - x: what is relative to r is less so to x when the solution is rich.
    const own = converter.ownUncertainty(r, u.relative) * (withoutMass ? 1 : 1 - x);
    const shared = converter.sharedUncertainty(value, r, withoutMass ? "mass ratio" : "mole fraction");
    const at = startRow(row);
    const window = settings.temperature_window_K;
    const inside = row.temperature.kelvin >= window.low && row.temperature.kelvin <= window.high;
    table.state[at] = isNeverFitted(row.method) || !inside ? RowState.notFitted : RowState.point;
    table.reportedValue[at] = value;
    table.massRatio[at] = r;
    table.moleFraction[at] = x;
    table.massConcentration[at] = c;
    table.molPerL[at] = c / identity.soluteMolarMass;
    table.relativeU[at] = Math.sqrt(own * own + shared * shared);
    table.sharedU[at] = shared;
    const notFitted = inside ? undefined : "outside the temperature window: not fitted";
    table.assumptions[at] = assumptionsCode(row, [u.assumption, rowCautions(context, value, u.relative, r), notFitted]);
    return undefined;
  }

  /** An interval: limits in the reported unit, and as mass ratios in ascending order. */
  function writeRange(row: Row, low: number, high: number): CellFault | undefined {
    const { converter, unit } = row.context;
    const descending = isDescending(unit);
    for (const limit of [low, high]) {
      const impossible = Number.isNaN(limit) ? undefined : impossibleValue(limit, unit, String(limit));
      // A range may start at nothing (0-0.5); none ends there.
      if (impossible !== undefined && !(limit === 0 && high > 0 && !descending)) return impossible;
    }
    const [a, b] = [converter.toHub(low), converter.toHub(high)];
    if (Number.isNaN(a) && Number.isNaN(b)) return noRatio(row);
    const at = startRow(row);
    table.state[at] = RowState.interval;
    table.reportedText[at] = codeOf(table.texts, row.text);
    table.valueLow[at] = low;
    table.valueHigh[at] = high;
    table.massRatioLow[at] = descending ? b : a;
    table.massRatioHigh[at] = descending ? a : b;
    const bound = row.reported.kind === "number" ? "no excess solid: a lower bound" : undefined;
    table.assumptions[at] = assumptionsCode(row, [bound]);
    return undefined;
  }

  function noRatio({ context, text }: Row): CellFault {
    const missing = context.liquor.missingDensity();
    if (missing !== undefined && context.unit.basis.includes("volume")) {
      return { field: "solubility", code: "no-density", found: missing };
    }
    const { unit, liquor } = context;
    const { solutionDensity: model } = liquor.needs;
    if (unit.basis.includes("volume of solution") && model?.kind !== "measured") {
      const why =
        model?.kind === "additive volumes"
          ? `an assumed apparent density of the solute of ${Math.round(model.apparentSoluteDensity.value)} kg/m3 can hold`
          : "the published densities reach";
      return { field: "solubility", code: "no-density", found: `${text} ${unit.canonical} is more than ${why}` };
    }
    const found = `${text} ${unit.canonical} leaves no room for the solvent`;
    return { field: "solubility", code: "fraction-at-or-above-one", found };
  }

  /** Appends a row with what every row has; returns its number. */
  function startRow({
    reading,
    reported,
    who,
    temperature,
    method,
    context,
    volumeTemperatureK,
    solutionDensity,
  }: Row): number {
    const at = table.count++;
    table.source[at] = sourceIndex;
    table.line[at] = reading.line;
    table.column[at] = columnCode[reading.valueIndex] ?? 0;
    table.identity[at] = who.index;
    const { fractions } = context.liquor;
    table.firstFraction[at] = fractions[0];
    table.secondFraction[at] = fractions[1];
    table.fractionU[at] = fractions[2];
    table.temperatureK[at] = temperature.kelvin;
    table.temperatureU[at] = temperature.u;
    table.temperatureUnit[at] = codeOf(table.texts, cells.unitOf.temperature(reading));
    table.reportedUnit[at] = codeOf(table.texts, isTerm(reported) ? TERM_LIMITS_UNIT : unitShown(reading));
    table.soluteBasis[at] = codeOf(table.texts, context.soluteBasis);
    table.volumeTemperatureK[at] = volumeTemperatureK;
    table.solutionDensity[at] = solutionDensity;
    table.method[at] = codeOf(table.texts, method);
    table.replicate[at] = codeOf(table.texts, cells.text.replicate(reading));
    table.reference[at] = codeOf(table.texts, cells.text.reference(reading) || (source.card.reference ?? ""));
    table.doi[at] = codeOf(table.texts, cells.text.doi(reading) || (source.card.doi ?? ""));
    table.carried[at] = codeOf(table.texts, carriedText(reading));
    table.solidChecked[at] = solidChecked(reading, who);
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

  function assumptionsCode({ who, context, temperature }: Row, more: readonly (string | undefined)[]): number {
    let text = "";
    const add = (one: string | undefined) => {
      if (one) text = text === "" ? one : `${text}; ${one}`;
    };
    who.assumptions.forEach(add);
    context.assumptions.forEach(add);
    add(temperature.assumption);
    more.forEach(add);
    return codeOf(table.texts, text);
  }
}

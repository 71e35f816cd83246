import type { Edition } from "../records/edition.ts";
import type { CheckResult, SystemOffset } from "../records/generated/check-result.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import { solventInWords } from "../records/systems.ts";
import { fileOffsets } from "../screen/file-offset.ts";
import type { JudgedRow } from "../screen/verdicts.ts";

/** Half-width of 95 % limits in standard deviations. */
const NORMAL_95 = 1.959963984540054;

const percent = (ln: number) => 100 * Math.expm1(ln);

/** A row with its deviation in ln r: of mole fractions, ln r = ln x - ln(1 - x) and a constant. */
function asMassRatio(row: JudgedRow, { systems }: Edition): JudgedRow {
  const { system = -1, deviation, expectedLn } = row;
  if (deviation === undefined || expectedLn === undefined || systems[system]?.fitBasis !== "ln x") return row;
  const solvent = (lnX: number) => Math.log1p(-Math.exp(lnX));
  return { ...row, deviation: deviation - solvent(expectedLn + deviation) + solvent(expectedLn) };
}

/** How the file stands to the curves of the collection, in g per g of solvent: an offset a system, and one over all. */
export function standingOf(
  judged: readonly JudgedRow[],
  table: MeasurementTable,
  edition: Edition,
): Pick<CheckResult, "offsets" | "pooled_offset"> {
  const curveOf = (system: number, T: number) =>
    edition.fits[system]?.curves.find(({ temperatureRangeK: [low, high] }) => T >= low && T <= high);
  const inRatio = judged.map((row) => asMassRatio(row, edition));
  const { offsets, pooled } = fileOffsets(inRatio, table, ({ system = -1, row, expectedLn = 0 }) => {
    const T = table.temperatureK[row] as number;
    const half = curveOf(system, T)?.limits(T).curve ?? 0;
    const solvent = edition.systems[system]?.fitBasis === "ln x" ? 1 - Math.exp(expectedLn) : 1;
    return half / NORMAL_95 / solvent;
  });
  const told = offsets.map(({ system: index, rows, offset, low, high }): SystemOffset => {
    const system = edition.systems[index] as Edition["systems"][number];
    const { solute, solidForm } = system.identity;
    return {
      system: system.id,
      solute,
      solid_form: solidForm,
      solvent: solventInWords(system.identity),
      rows: rows.length,
      other_sources: Math.max(0, ...(edition.fits[index]?.curves ?? []).map(({ nSources }) => nSources)),
      offset_percent: percent(offset),
      low_percent: percent(low),
      high_percent: percent(high),
    };
  });
  if (pooled === undefined) return { offsets: told };
  return {
    offsets: told,
    pooled_offset: {
      systems: pooled.systems,
      offset_percent: percent(pooled.offset),
      low_percent: percent(pooled.low),
      high_percent: percent(pooled.high),
      between_systems_percent: percent(pooled.between),
    },
  };
}

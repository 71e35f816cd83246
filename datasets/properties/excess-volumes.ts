import type { ReferenceRow } from "./reference-files.ts";
import type { Row } from "./table-text.ts";

/** Of several fits for one solvent the one to take: by the mark of its source. */
const PREFERRED: ReadonlyMap<string, string> = new Map([
  ["ethanol", "298.15"],
  ["2-propanol", "je201010s"],
  ["ethylene glycol", "j.fluid.2013.01.025"],
  ["glycerol", "j.jct.2014.06.031"],
]);

/** Rows of the excess-volume coefficients of solvents with water. */
export function excessVolumeRows(fits: readonly ReferenceRow[]): Row[] {
  return fits.filter(isPreferred).flatMap((row) =>
    ["A0", "A1", "A2", "A3", "A4"]
      .filter((column) => row(column) !== "")
      .map((column) => ({
        name: row("component1"),
        property: `excess_volume_with_water_${column}`,
        value: row(column),
        unit: "cm3/mol",
        T_min_K: Number(row("T_K")),
        T_max_K: Number(row("T_K")),
        reference: reference(row),
      })),
  );
}

function isPreferred(row: ReferenceRow): boolean {
  const mark = PREFERRED.get(row("component1"));
  return mark === undefined || row("source").includes(mark) || row("T_K") === mark;
}

function reference(row: ReferenceRow): string {
  const doi = /doi (\S+?),? /.exec(`${row("source")} `)?.[1];
  const data = doi === undefined ? row("source").replace(/,? read via.*$/, "") : `doi ${doi}`;
  return `fit to ${row("n_points")} densities: ${data.replace(" formula", "").replace("20 C", "20 °C")}`;
}

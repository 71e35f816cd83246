import { expect, test } from "vitest";
import { csvTable } from "../../pipeline/publish/csv.ts";
import { mixtureDocuments, mixtureRows } from "../../pipeline/publish/tables/mixtures.ts";
import { MIXTURES_COLUMNS } from "../../pipeline/records/generated/mixtures.ts";
import { fitsOf, type MixtureReading, mixtureWorld, readingsOn, textbook } from "../fit/mixture-support.ts";
import { mixtureEdition } from "../report/mixture-edition.ts";
import { documentErrors, recordErrors } from "../schemas/table-rows.ts";

const TEMPERATURES = [278.15, 288.15, 298.15, 308.15, 318.15];
const truth = textbook([5, -2200, 1, -2900, 1700, 900]);
const readings = (compositions: readonly number[]): MixtureReading[] => readingsOn(compositions, TEMPERATURES, truth);
const { model, edition } = mixtureEdition(readings([0, 0.2, 0.4, 0.6, 0.8, 0.9, 1]));

/** Cells of a row as they are written. */
function cells(row: object): string[] {
  const values = MIXTURES_COLUMNS.map((column) => (row as Record<string, string | number | undefined>)[column]);
  const [, line = ""] = [...csvTable(MIXTURES_COLUMNS, [values])].join("").split("\n");
  return line.split(",");
}

test("A row of mixtures.csv keeps its schema, and its coefficients in its equation give the surface", () => {
  const [row] = mixtureRows(edition, [model], []);
  expect(recordErrors("mixtures", MIXTURES_COLUMNS, cells(row!))).toEqual([]);
  expect(row?.equation).toBe("ln x = w1 (A1 + B1/T) + w2 (A2 + B2/T) + (w1 w2/T) (J0 + J1 (w1 - w2))");
  expect(textbook([row!.A1!, row!.B1!, row!.A2!, row!.B2!, row!.J0!, row!.J1!])(0.3, 300)).toBeCloseTo(
    truth(0.3, 300),
    9,
  );
  expect(row?.J2).toBeUndefined();
  expect(row?.systems.split("; ")).toHaveLength(7);
  expect(row?.inner_maximum_T_K).toBe(293.15);
});

test("A mixture without a model has a row that says why", () => {
  const world = mixtureWorld(readings([0.3, 0.6]));
  const few = { ...edition, systems: world.systems };
  const [row] = mixtureRows(few, [], fitsOf(world).without);
  expect(row).toMatchObject({ solute: "invented", no_model: "2 compositions where a surface needs 3" });
  expect(recordErrors("mixtures", MIXTURES_COLUMNS, cells(row!))).toEqual([]);
});

test("The document of a mixture keeps its schema and tells domain, members and the measurements used", () => {
  const documents = JSON.parse(JSON.stringify(mixtureDocuments(edition, [model])));
  const file = { format: 1, program_version: "test", curves: [], mixtures: documents };
  expect(documentErrors("curves-json", file)).toEqual([]);
  expect(documents[0].domain).toEqual([
    [0, 278.15],
    [1, 278.15],
    [1, 318.15],
    [0, 318.15],
  ]);
  expect(documents[0].members).toHaveLength(7);
  expect(documents[0].measurement_ids).toHaveLength(35);
  expect(new Set(documents[0].measurement_ids).size).toBe(35);
});

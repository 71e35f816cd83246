import { describe, expect, test } from "vitest";
import { curated, flagsOf, rowsOf, type SmallSource } from "./small-collection.ts";

/** Invented solubilities of salicylic acid in ethanol, g/100 g solvent, near a van 't Hoff line. */
const CELSIUS = [10, 20, 30, 40, 50, 60];
const VALUES = [23.21, 28.94, 35.68, 43.57, 52.71, 63.22];

/** The series off by a factor and a small scatter, in four digits. */
function series(factor: number, seed: number): [number, number][] {
  return CELSIUS.map((T, i) => {
    const scatter = 1 + 0.006 * Math.sin(7.3 * i + seed);
    return [T, Number((VALUES[i]! * factor * scatter).toPrecision(4))];
  });
}

const source = (values: readonly (readonly [number, number])[], more: Partial<SmallSource> = {}): SmallSource => ({
  rows: rowsOf("salicylic acid", "ethanol", values),
  ...more,
});

const inLaboratory = (laboratory: string) => ({ card: { laboratory } });
const [A, B] = [series(1, 1), series(1.03, 2)];

/** Points, sources and laboratories of the one curve, and the laboratories that the grade counts. */
async function counts(sources: Readonly<Record<string, SmallSource>>) {
  const edition = await curated(sources);
  const [curve] = edition.fits[0]!.curves;
  const laboratories = /^(\d+) independent/.exec(
    edition.grades[0]!.reasons.find((why) => /independent/.test(why)) ?? "",
  );
  return {
    edition,
    codes: flagsOf(edition).map(({ code, severity }) => `${code} ${severity}`),
    n: curve?.n,
    nSources: curve?.nSources,
    nLaboratories: curve?.nLaboratories,
    graded: Number(laboratories?.[1]),
  };
}

describe("independent measurements", () => {
  test("count each, though two of them may be equal by chance", async () => {
    const chance = B.map(([T, S], i): [number, number] => [T, i === 2 ? A[2]![1] : S]);
    const found = await counts({ a: source(A, inLaboratory("one")), b: source(chance, inLaboratory("two")) });
    expect(found).toMatchObject({ codes: [], n: 12, nSources: 2, nLaboratories: 2, graded: 2 });
  });

  test("count each where replicates of one value are told apart, and once where they are not", async () => {
    const twice = rowsOf("salicylic acid", "ethanol", [...A, A[2]!]);
    const plain = await counts({ a: { rows: twice } });
    expect(plain).toMatchObject({ codes: ["exact-repeat notice"], n: 6 });
    const numbered = twice.map((row, i) => [...row, i === 6 ? 2 : 1]);
    const more = { headings: ["run"], columns: { replicate: { column: "run" } } };
    expect(await counts({ a: { rows: numbered, ...more } })).toMatchObject({ codes: [], n: 7 });
  });
});

describe("one measurement written twice", () => {
  test("in two units of one source counts once, and is told", async () => {
    // w = S/(100 + S)
    const again = A.map(([T, S]) => [
      "salicylic acid",
      "ethanol",
      T,
      ((100 * S) / (100 + S)).toFixed(2),
      "g/100 g solution",
    ]);
    const first = rowsOf("salicylic acid", "ethanol", A).map((row) => [...row, "g/100 g solvent"]);
    const found = await counts({
      a: {
        rows: [...first, ...again],
        headings: ["unit"],
        columns: { solubility: { column: "S", unit_column: "unit" } },
      },
    });
    expect(found).toMatchObject({
      codes: Array(6).fill("one-value-in-two-units notice"),
      n: 6,
      nSources: 1,
      graded: 1,
    });
  });

  test("by a second source counts once in curve, vote and grade, to the digits given and in any unit", async () => {
    const rounded = A.map(([T, S]): [number, number] => [T, Number(((10 * S) / (100 + S)).toFixed(3))]);
    const copy = source(rounded, { unit: "g/10 g solution", ...inLaboratory("two") });
    const found = await counts({
      a: source(A, inLaboratory("one")),
      b: {
        ...copy,
        unit: "mass fraction",
        rows: rowsOf(
          "salicylic acid",
          "ethanol",
          rounded.map(([T, w]) => [T, w / 10]),
        ),
      },
    });
    expect(found).toMatchObject({ codes: ["re-reported notice"], n: 6, nSources: 1, nLaboratories: 1, graded: 1 });
    expect(found.edition.flags[0]?.evidence).toMatch(
      /^6 of its 6 values are those of a at the same temperatures, to the digits given; by chance about 1 in 10\^\d+$/,
    );
  });

  test("does not make a majority of a wrong source and its copy", async () => {
    const wrong = A.map(([T, S]): [number, number] => [T, Number((1.5 * S).toPrecision(4))]);
    const found = await counts({ a: source(wrong), b: source(wrong), c: source(B), d: source(series(0.99, 5)) });
    const { robust } = found.edition.fits[0]!;
    expect([robust.agreement, robust.soundSources, robust.apartSources]).toEqual(["agreed", [2, 3], [0]]);
    expect(found.nSources).toBe(2);
  });

  test("lets the values that a copying source has of its own count, but makes it no laboratory of its own", async () => {
    const partly: [number, number][] = [...A.slice(0, 4), [45, 47.9], [55, 57.9]];
    const found = await counts({ a: source(A, inLaboratory("one")), b: source(partly, inLaboratory("two")) });
    expect(found).toMatchObject({ codes: ["re-reported notice"], n: 8, graded: 1 });
  });

  test("but for one digit is told at that value, however small the change", async () => {
    const misprint = A.map(([T, S], i): [number, number] => [T, i === 3 ? S + 0.3 : S]);
    const found = await counts({ a: source(A), b: source(misprint) });
    expect(found.codes).toEqual(["re-reported notice", "changed-copy notice"]);
    expect(found.edition.flags[1]?.evidence).toMatch(
      new RegExp(`reads ${misprint[3]![1]} where line 5 reads ${A[3]![1]} g/100 g solvent$`),
    );
  });
});

describe("two collections of log S at one temperature", () => {
  const SOLUTES = ["benzoic acid", "salicylic acid", "paracetamol", "caffeine", "succinic acid", "adipic acid", "urea"];
  const FIRST = [-1.55, -1.82, -1.02, -0.97, -0.21, -0.81, 0.3];
  const collection = (values: readonly number[]): SmallSource => ({
    rows: SOLUTES.map((solute, i) => [solute, "water", 25, values[i]!.toFixed(3)]),
    unit: "log10(mol/L)",
  });
  const sourcesOfCurves = (edition: Awaited<ReturnType<typeof curated>>) =>
    edition.fits.map(({ curves }) => curves[0]?.nSources ?? 0);

  test("of which one repeats the other within 0.01 for most solutes are told once, and those values count once", async () => {
    const again = FIRST.map((value, i) => value + [0, 0.004, -0.006, 0, 0.008, 0.002, 0.6][i]!);
    const edition = await curated({ a: collection(FIRST), b: collection(again) });
    const told = edition.flags.filter(({ code }) => code === "re-reporting-source");
    expect(told).toMatchObject([{ scope: "source", severity: "notice", source: 1 }]);
    expect(told[0]?.evidence).toMatch(/ 6 of 7 of a \(by chance about 0\)$/);
    expect(sourcesOfCurves(edition).filter((n) => n === 1)).toHaveLength(6);
  });

  test("which differ as collections do count each", async () => {
    const apart = FIRST.map((value, i) => value + [0.12, -0.3, 0.05, 0.44, -0.16, 0.21, 0.004][i]!);
    const edition = await curated({ a: collection(FIRST), b: collection(apart) });
    expect(edition.flags.filter(({ code }) => code === "re-reporting-source")).toEqual([]);
    expect(sourcesOfCurves(edition)).not.toContain(1);
  });
});

describe("a source that averages others", () => {
  const mean = A.map(([T, S], i): [number, number] => [T, Number(((S + B[i]![1]) / 2).toPrecision(4))]);

  test("is told with the chance, and does not count beside them", async () => {
    const found = await counts({
      a: source(A, inLaboratory("one")),
      b: source(B, inLaboratory("two")),
      c: source(mean, inLaboratory("three")),
    });
    expect(found).toMatchObject({ codes: ["averaged-copy notice"], n: 12, nSources: 2, nLaboratories: 2, graded: 2 });
    expect(found.edition.flags[0]?.evidence).toMatch(
      /^6 of its 6 values are the mean of those of a and b at the same temperatures, to the digits given; by chance about 1 in 10\^\d+$/,
    );
  });

  test("is found among three others, whichever two it averages", async () => {
    const found = await counts({ a: source(A), b: source(B), c: source(series(0.96, 9)), d: source(mean) });
    expect(found.codes).toEqual(["averaged-copy notice"]);
    expect(found).toMatchObject({ n: 18, nSources: 3 });
  });

  test("is not suspected of a third source that lies between two by chance", async () => {
    const found = await counts({ a: source(A), b: source(B), c: source(series(1.015, 11)) });
    expect(found).toMatchObject({ codes: [], n: 18, nSources: 3 });
  });
});

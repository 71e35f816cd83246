import { describe, expect, test } from "vitest";
import { changeSections, changesMarkdown } from "../../pipeline/publish/changes-text.ts";
import { compareEditions } from "../../pipeline/publish/edition-changes.ts";
import type { EditionTables, PublishedGrid, PublishedMeasurement } from "../../pipeline/records/edition-tables.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import type { AppliedRuling, EditionDocument } from "../../pipeline/records/generated/edition.ts";

/** A curve of mole fractions at °C, each with its half-width in percent. */
function grid(points: readonly (readonly [celsius: number, x: number, percent: number])[]): PublishedGrid {
  return {
    system: "s-in-w",
    quantity: "mole fraction",
    points: points.map(([t, value, percent]) => {
      const half = Math.log1p(percent / 100);
      return { temperatureK: t + 273.15, value, low: value * Math.exp(-half), high: value * Math.exp(half) };
    }),
  };
}

interface Given {
  readonly curve?: PublishedGrid;
  readonly grade?: string;
  readonly systems?: readonly string[];
  readonly measurements?: Readonly<Record<string, Partial<PublishedMeasurement>>>;
  readonly rulings?: readonly Partial<AppliedRuling>[];
  readonly settings?: Partial<EditionDocument["settings"]>;
}

/** An edition with one system, some of it given. */
function edition(name: string, given: Given = {}): EditionTables {
  const { systems = ["s-in-w"], grade = "tentative", measurements = {}, curve } = given;
  const plain = { source: "a", system: "s-in-w", temperatureK: 298.15, reported: "1 g/100 g solvent", status: "kept" };
  const rulings = (given.rulings ?? []).map((r) => ({ by: "steward", date: "2026-04-01", reason: "why", ...r }));
  return {
    document: {
      ...{ edition: name, date: "2026-04-02", program_version: "0.1.0", rulings, outputs: [] },
      settings: { ...DEFAULT_SETTINGS, ...given.settings },
    } as unknown as EditionDocument,
    systems: new Map(
      systems.map((id) => [id, { name: `name of ${id}`, grade, reasons: "why", hasCurve: curve !== undefined }]),
    ),
    measurements: new Map(Object.entries(measurements).map(([id, own]) => [id, { ...plain, ...own }])),
    curves: new Map(curve === undefined ? [] : [["s-in-w-1", curve]]),
  };
}

const compared = (old: Given, now: Given) => compareEditions(edition("1", old), edition("2", now));

describe("a curve has moved", () => {
  const old = grid([
    [20, 0.01, 5],
    [30, 0.02, 5],
    [40, 0.04, 5],
  ]);

  test("where it lies outside the limits of the other edition, and the other's outside its own", () => {
    const now = grid([
      [20, 0.0104, 5],
      [30, 0.0212, 5],
      [40, 0.048, 8],
      [50, 0.09, 5],
    ]);
    const [move] = compared({ curve: old }, { curve: now }).curves_moved;
    expect(move).toMatchObject({
      compared_from_K: 293.15,
      compared_to_K: 313.15,
      beyond_from_K: 303.15,
      beyond_to_K: 313.15,
    });
    expect(move?.largest_at_K).toBe(313.15);
    expect(move?.change_percent).toBeCloseTo(20, 9);
    expect(move?.limit_percent).toBeCloseTo(8, 9);
    const lines = changeSections(compared({ curve: old }, { curve: now })).flatMap(({ lines }) => lines);
    expect(lines).toEqual([
      "name of s-in-w: up by 20 % at 40.0 °C (mole fraction 0.04, now 0.048; limits 8 %); beyond its limits from 30.0 °C to 40.0 °C, compared from 20.0 °C to 40.0 °C",
    ]);
  });

  test("not where one of the two editions has limits wide enough to hold the other's curve", () => {
    for (const [a, b] of [
      [5, 21],
      [21, 5],
    ] as const) {
      const before = grid([[40, 0.04, a]]);
      const after = grid([[40, 0.048, b]]);
      expect(compared({ curve: before }, { curve: after }).curves_moved).toEqual([]);
    }
  });

  test("by the same measure downwards, and in an edition whose upper limit is open", () => {
    const open = grid([[40, 0.03, 5]]);
    const now = { ...open, points: open.points.map((point) => ({ ...point, high: Number.NaN })) };
    const [move] = compared({ curve: old }, { curve: now }).curves_moved;
    expect(move?.change_percent).toBeCloseTo(-25, 9);
  });

  test("is not said where the two have no temperature in common: that is told instead", () => {
    const result = compared({ curve: old }, { curve: grid([[25, 0.5, 1]]) });
    expect([result.curves_moved, result.curves_not_compared]).toEqual([[], ["s-in-w-1"]]);
  });
});

describe("measurements", () => {
  test("added, gone, set aside, taken back and reported otherwise are told apart", () => {
    const result = compared(
      { measurements: { "a:1": {}, "a:2": {}, "a:3": { status: "set aside" }, "a:4": {} } },
      {
        measurements: {
          "a:2": { status: "set aside" },
          "a:3": {},
          "a:4": { reported: "2 g/100 g solvent" },
          "a:5": { temperatureK: 300 },
        },
        rulings: [{ ruling_id: "R1", action: "set aside", measurement_ids: ["a:2"], reason: "cold filter" }],
      },
    );
    const ids = (list: readonly { measurement_id: string }[]) => list.map(({ measurement_id }) => measurement_id);
    expect(ids(result.measurements_added)).toEqual(["a:5"]);
    expect(ids(result.measurements_gone)).toEqual(["a:1"]);
    expect(result.measurements_set_aside).toMatchObject([
      { measurement_id: "a:2", ruling: "set aside by steward on 2026-04-01: cold filter (R1)" },
    ]);
    expect(ids(result.measurements_taken_back)).toEqual(["a:3"]);
    expect(ids(result.measurements_reported_otherwise)).toEqual(["a:4"]);
  });

  test("on another line of their source, with nothing else changed, are counted and not listed", () => {
    const rows = (...lines: readonly number[]) =>
      Object.fromEntries(lines.map((line, i) => [`a:${line}`, { reported: `${i} g/100 g solvent` }]));
    const result = compared({ measurements: rows(2, 3, 4) }, { measurements: rows(7, 8, 9) });
    expect([result.measurements_added, result.measurements_gone, result.measurements_moved]).toEqual([[], [], 3]);
    expect(result.different).toBe(true);
  });

  test("corrected are told with the ruling, and again only where the correction is another one", () => {
    const measurements = { "a:2": {} };
    const to = (value: number) => [
      { ruling_id: "R1", action: "correct" as const, corrected_value: value, measurement_ids: ["a:2"] },
    ];
    const first = compared({ measurements }, { measurements, rulings: to(3) });
    expect(first.measurements_corrected[0]?.ruling).toBe("corrected to 3 by steward on 2026-04-01: why (R1)");
    const same = compared({ measurements, rulings: to(3) }, { measurements, rulings: to(3) });
    expect([same.measurements_corrected, same.different]).toEqual([[], false]);
    expect(
      compared({ measurements, rulings: to(3) }, { measurements, rulings: to(4) }).measurements_corrected,
    ).toHaveLength(1);
  });

  test("of one source, system and ruling are told in one line where they are many", () => {
    const many = Object.fromEntries(Array.from({ length: 9 }, (_, i) => [`a:${i}`, { temperatureK: 283.15 + i }]));
    const [section] = changeSections(compared({}, { measurements: many }));
    expect(section?.lines).toEqual(["a: 9 of name of s-in-w from 10.0 °C to 18.0 °C"]);
  });
});

test("systems, grades, curves that came or went and settings are told", () => {
  const result = compared(
    { systems: ["s-in-w", "gone"], grade: "doubtful", curve: grid([[20, 0.1, 5]]) },
    { systems: ["s-in-w", "new"], settings: { grid_step_K: 10 } },
  );
  expect(result.systems_added).toEqual([{ system: "new", name: "name of new" }]);
  expect(result.systems_gone).toEqual([{ system: "gone", name: "name of gone" }]);
  expect(result.grades_changed).toMatchObject([{ system: "s-in-w", old_grade: "doubtful", new_grade: "tentative" }]);
  expect(result.curves_gone).toEqual([{ system: "s-in-w", name: "name of s-in-w" }]);
  expect(result.settings_changed).toEqual(["grid_step_K: 5, now 10"]);
});

test("CHANGES.md makes markup, escape characters and line breaks in data harmless", () => {
  const hostile = { reported: "<img src=x onerror=alert(1)> [a](b) `c`\u001b[31m\n# no heading" };
  const text = [...changesMarkdown(compared({}, { measurements: { "a:1": hostile } }))].join("");
  expect(text).not.toMatch(/<img|\n# no heading|\[a\]\(b\)/);
  expect(text).not.toContain("\u001b");
  expect(text).toContain("&#60;img");
});

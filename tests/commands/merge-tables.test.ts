import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { CurvesFile } from "../../pipeline/records/generated/curves-json.ts";
import type { MergeResult } from "../../pipeline/records/generated/merge-result.ts";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { documentErrors, recordErrors } from "../schemas/table-rows.ts";
import { copyOf, type Run, readJson, readTable, saltern, scratch, type Table } from "./saltern.ts";

const folder = scratch();

const SCHEMA_OF: Readonly<Record<string, string>> = {
  "measurements.csv": "measurements",
  "refused.csv": "refused",
  "flags.csv": "flags",
  "sources.csv": "sources",
  "substances.csv": "substances-out",
  "systems.csv": "systems",
  "curves.csv": "curves",
  "grid.csv": "grid",
  "mixtures.csv": "mixtures",
  "planning-cooling.csv": "planning-cooling",
};

/** Rows of a table as `a/b` of two columns, to compare orders. */
const inCodeUnitOrder = (values: readonly string[]) => values.every((v, i) => i === 0 || values[i - 1]! <= v);

describe.each(["demo", "handbook"])("merging datasets/%s", (collection) => {
  const out = join(folder, `${collection}-out`);
  let run: Run;
  let summary: Summary;
  const tables: Record<string, Table> = {};
  const rowsOf = (name: string) => tables[name]?.rows ?? [];
  const keys = (name: string, column: string) => new Set(rowsOf(name).map((row) => row[column]));

  beforeAll(async () => {
    const copy = copyOf(collection, join(folder, collection));
    run = await saltern(["merge", copy, "--out", out, "--json"]);
    summary = readJson<Summary>(out, "summary.json");
    for (const name of Object.keys(SCHEMA_OF)) tables[name] = readTable(out, name);
  }, 60_000);

  test("ends with 1, for some readings need a person, and prints a result that a script can read", () => {
    expect(run.code).toBe(1);
    const result = JSON.parse(run.stdout) as MergeResult;
    expect(documentErrors("merge-result", result)).toEqual([]);
    expect(result).toMatchObject({ collection: summary.collection.name, counts: summary.counts, needs_you: true });
    expect(result.problems).toHaveLength(summary.counts.refused);
    expect(statSync(result.open).isFile()).toBe(true);
  });

  test("loses no reading: readings = accepted + refused, for each source and in all", () => {
    const { counts, sources } = summary;
    for (const source of sources) expect(source.readings, source.source).toBe(source.accepted + source.refused);
    const sum = (of: "readings" | "accepted" | "refused") => sources.reduce((all, source) => all + source[of], 0);
    expect([counts.readings, counts.accepted, counts.refused]).toEqual([
      sum("readings"),
      sum("accepted"),
      sum("refused"),
    ]);
    expect(counts.accepted).toBeGreaterThan(300);
  });

  test("accounts for as many readings as the table files hold: no more, no fewer", () => {
    for (const { source, readings, missing_cells } of summary.sources) {
      const inFile = rowsOf("sources.csv").find((row) => row.source === source);
      const text = readFileSync(join(folder, collection, "sources", inFile?.file?.split("/").at(-1) ?? ""), "utf8");
      const card = readJson<{ table?: { header_line?: number } }>(
        join(folder, collection, "sources"),
        `${source}.source.json`,
      );
      // No cell of these collections holds a line break, so that lines can be counted.
      const lines = text.split(/\r?\n/).filter((line) => line !== "").length - (card.table?.header_line ?? 1);
      expect([source, readings + missing_cells]).toEqual([source, lines]);
    }
  });

  test("writes a measurement for each accepted reading and a line in refused.csv for each refused one", () => {
    for (const { source, accepted, refused } of summary.sources) {
      const of = (name: string) => rowsOf(name).filter((row) => row.source === source).length;
      expect([source, of("measurements.csv"), of("refused.csv")]).toEqual([source, accepted, refused]);
    }
    expect(rowsOf("measurements.csv")).toHaveLength(summary.counts.accepted);
    expect(rowsOf("refused.csv")).toHaveLength(summary.counts.refused);
  });

  test("counts what the tables hold", () => {
    const { counts } = summary;
    const status = (word: string) => rowsOf("measurements.csv").filter((row) => row.status === word).length;
    expect({
      ...{ sources: rowsOf("sources.csv").length, substances: rowsOf("substances.csv").length },
      ...{ systems: rowsOf("systems.csv").length, families: keys("systems.csv", "family").size },
      ...{ curves: rowsOf("curves.csv").length, flags: rowsOf("flags.csv").length },
      blocking_flags: rowsOf("flags.csv").filter((row) => row.severity === "blocking" && row.ruling === "").length,
      ...{ kept: status("kept"), intervals: status("interval"), not_fitted: status("not fitted") },
      set_aside: status("set aside"),
    }).toEqual({
      ...{ sources: counts.sources, substances: counts.substances, systems: counts.systems },
      ...{ families: counts.families, curves: counts.curves, flags: counts.flags, kept: counts.kept },
      ...{ blocking_flags: counts.blocking_flags, intervals: counts.intervals, not_fitted: counts.not_fitted },
      set_aside: counts.set_aside,
    });
  });

  test.each(Object.entries(SCHEMA_OF))("writes %s with rows that keep their schema", (name, schema) => {
    const { columns, records } = tables[name] as Table;
    // The handbook holds no mixed solvents; the demo holds rows for every table.
    if (!(collection === "handbook" && name === "mixtures.csv")) expect(records.length).toBeGreaterThan(0);
    const errors = records.flatMap((record, i) =>
      recordErrors(schema, columns, record).map((error) => `${name}:${i + 2} ${error}`),
    );
    expect(errors.slice(0, 5)).toEqual([]);
  });

  test("writes summary.json and curves.json as their schemas say", () => {
    expect(documentErrors("summary", summary)).toEqual([]);
    expect(documentErrors("curves-json", readJson(out, "curves.json"))).toEqual([]);
  });

  test("writes every file with the size and SHA-256 that summary.json tells, and no file more", () => {
    for (const { path, bytes, sha256 } of summary.files) {
      const content = readFileSync(join(out, path));
      expect([path, content.length, createHash("sha256").update(content).digest("hex")]).toEqual([path, bytes, sha256]);
    }
    const written = readdirSync(out, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) =>
        join(entry.parentPath, entry.name)
          .slice(out.length + 1)
          .replaceAll("\\", "/"),
      );
    expect(written.filter((path) => path !== "summary.json").sort()).toEqual(summary.files.map(({ path }) => path));
  });

  test("gives every key in a table a row that it points to", () => {
    const systems = keys("systems.csv", "system");
    const [sources, substances] = [keys("sources.csv", "source"), keys("substances.csv", "key")];
    const [curves, measurements] = [keys("curves.csv", "curve_id"), keys("measurements.csv", "measurement_id")];
    const [flags, families] = [keys("flags.csv", "flag_id"), keys("systems.csv", "family")];
    const points = (name: string, column: string, known: ReadonlySet<string | undefined>, mark = "") =>
      rowsOf(name)
        .flatMap((row) => (mark === "" ? [row[column] ?? ""] : (row[column] ?? "").split(mark)))
        .filter((key) => key !== "" && !known.has(key))
        .map((key) => `${name} ${column} ${key}`);
    expect([
      ...["measurements.csv", "curves.csv", "grid.csv", "planning-cooling.csv", "flags.csv"].flatMap((name) =>
        points(name, "system", systems),
      ),
      ...["measurements.csv", "refused.csv", "flags.csv"].flatMap((name) => points(name, "source", sources)),
      ...["measurements.csv", "systems.csv"].flatMap((name) => [
        ...points(name, "solute", substances),
        ...points(name, "solvent", substances, " + "),
        ...points(name, "family", families),
      ]),
      ...["grid.csv", "planning-cooling.csv"].flatMap((name) => points(name, "curve_id", curves)),
      ...points("systems.csv", "curve_ids", curves, ";"),
      ...points("flags.csv", "measurement_id", measurements),
      ...points("measurements.csv", "flags", flags, ";"),
    ]).toEqual([]);
  });

  test("lists every id once, and sorts each table by its key in code units", () => {
    const ids: Readonly<Record<string, string>> = {
      ...{ "measurements.csv": "measurement_id", "flags.csv": "flag_id", "sources.csv": "source" },
      ...{ "substances.csv": "key", "systems.csv": "system", "curves.csv": "curve_id" },
    };
    for (const [name, column] of Object.entries(ids)) {
      expect([name, keys(name, column).size]).toEqual([name, rowsOf(name).length]);
    }
    for (const name of ["sources.csv", "substances.csv", "systems.csv", "curves.csv"]) {
      expect([name, inCodeUnitOrder(rowsOf(name).map((row) => row[ids[name] as string] as string))]).toEqual([
        name,
        true,
      ]);
    }
    const place = (row: Readonly<Record<string, string>>) =>
      `${row.source}\u0000${row.line?.padStart(9, "0")}\u0000${row.column}`;
    for (const name of ["measurements.csv", "refused.csv"]) {
      expect([name, inCodeUnitOrder(rowsOf(name).map(place))]).toEqual([name, true]);
    }
  });

  test("writes -0, NaN and infinity nowhere, and no carriage return", () => {
    for (const name of Object.keys(SCHEMA_OF)) {
      const { records } = tables[name] as Table;
      expect([name, records.flat().filter((cell) => /^(-0|NaN|-?Infinity|undefined|null)$/.test(cell))]).toEqual([
        name,
        [],
      ]);
      expect(readFileSync(join(out, name), "latin1").includes("\r"), name).toBe(false);
    }
  });

  test("tells each curve's measurements by their ids, as many as the curve has points", () => {
    const { curves } = readJson<CurvesFile>(out, "curves.json");
    const measurements = keys("measurements.csv", "measurement_id");
    expect(curves.map(({ curve_id }) => curve_id)).toEqual(rowsOf("curves.csv").map((row) => row.curve_id));
    for (const { curve_id, n, measurement_ids } of curves) {
      expect([curve_id, measurement_ids.length]).toEqual([curve_id, n]);
      expect(measurement_ids.filter((id) => !measurements.has(id))).toEqual([]);
    }
  });

  test("keeps every point of the grid inside the measured range, and every limit on its side", () => {
    const curves = new Map(rowsOf("curves.csv").map((row) => [row.curve_id, row]));
    for (const row of rowsOf("grid.csv")) {
      const [t, curve] = [Number(row.temperature_K), curves.get(row.curve_id)];
      expect(t).toBeGreaterThanOrEqual(Number(curve?.T_min_K));
      expect(t).toBeLessThanOrEqual(Number(curve?.T_max_K));
      const [newLow, low, middle, high] = ["new_low", "curve_low", "", "curve_high"].map((end) =>
        Number(row[`g_per_100g_solvent${end === "" ? "" : `_${end}`}`] || Number.POSITIVE_INFINITY),
      ) as [number, number, number, number];
      expect([newLow <= low, low <= middle, middle <= high]).toEqual([true, true, true]);
    }
  });

  test("plans no recovery outside 0 to 100 %, and each inside its own limits", () => {
    const planned = rowsOf("planning-cooling.csv").filter((row) => row.max_recovery_equilibrium_percent !== "");
    expect(planned.length).toBeGreaterThan(10);
    const wrong = planned.filter((row) => {
      const [low, value, high] = ["_low", "", "_high"].map((end) =>
        Number(row[`max_recovery_equilibrium_percent${end}`]),
      );
      const working = Number(row.working_recovery_percent);
      return !(0 <= low! && low! <= value! && value! <= high! && high! <= 100 && 0 <= working && working <= value!);
    });
    expect(wrong.map((row) => `${row.system}: ${row.max_recovery_equilibrium_percent} %`)).toEqual([]);
  });

  test("says in every row of a planning table either a figure or the reason why there is none", () => {
    for (const row of rowsOf("planning-cooling.csv")) {
      expect([row.system, row.max_recovery_equilibrium_percent === ""]).toEqual([row.system, row.blank_reason !== ""]);
    }
  });

  test("writes a report that opens without a network: no address, and every link leads to a file", () => {
    const pages = summary.files.map(({ path }) => path).filter((path) => path.endsWith(".html"));
    expect(pages.length).toBeGreaterThan(summary.counts.systems);
    const targets = new Set<string>();
    for (const path of pages) {
      const text = readFileSync(join(out, path), "utf8");
      expect(text).toMatch(
        /^<!doctype html>\n<html lang="en">[\s\S]*<meta charset="utf-8">[\s\S]*<title>[^<]+<\/title>/,
      );
      const markup = text.replaceAll('xmlns="http://www.w3.org/2000/svg"', "").replace(/>[^<]*</g, "><");
      expect([path, markup.match(/https?:[^" ]*|<link|<iframe|<img|\son\w+=|\bsrc=/gi) ?? []]).toEqual([path, []]);
      expect([path, text.match(/@import|url\((?!#)|\bfetch\(|XMLHttpRequest/g) ?? []]).toEqual([path, []]);
      for (const [, target = ""] of markup.matchAll(/\shref="([^"#]*)/g)) targets.add(join(out, path, "..", target));
    }
    expect([...targets].filter((target) => !existsSync(target))).toEqual([]);
  });

  test("lets no page of the report run a script but the program's own, named by its checksum", () => {
    for (const { path } of summary.files.filter(({ path }) => path.endsWith(".html"))) {
      const text = readFileSync(join(out, path), "utf8");
      const policy = /<meta http-equiv="Content-Security-Policy" content="([^"]*)">/.exec(text)?.[1] ?? "";
      const scripts = [...text.matchAll(/<script\b([^>]*)>([\s\S]*?)<\/script>/gi)];
      const hashes = scripts.map(([, , code = ""]) => `'sha256-${createHash("sha256").update(code).digest("base64")}'`);
      expect([path, policy]).toEqual([path, expect.stringContaining("default-src 'none'")]);
      expect([path, policy]).toEqual([path, expect.stringContaining(`script-src ${hashes[0] ?? "'none'"}`)]);
      expect([path, scripts.length <= 1, scripts.every(([, attributes]) => attributes === "")]).toEqual([
        path,
        true,
        true,
      ]);
    }
  });
});

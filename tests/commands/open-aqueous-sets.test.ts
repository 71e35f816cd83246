import { cpSync, existsSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { beforeAll, describe, expect, test } from "vitest";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { COMMAND, cardFor, type Run, readJson, readTable, run, scratch, writeFiles } from "./saltern.ts";

// Sorkun, Khetan, Er: AqSolDB, Scientific Data 6 (2019) 143, doi 10.1038/s41597-019-0151-1, data CC0; nine sets A to I.
const SETS = fileURLToPath(new URL("../../../shared/datasets/aqsoldb/", import.meta.url));
// Wall time depends on what else the machine does: the command itself is made to tell its CPU time at its end.
const TELL_CPU =
  "data:text/javascript,process.on('exit',()=>process.stderr.write('cpu '+JSON.stringify(process.cpuUsage())+'\\n'))";

const absent = !existsSync(SETS);
if (absent) console.warn(`skipped: the nine aqueous data sets are not on this machine (${SETS})`);

describe.skipIf(absent)("nine open aqueous sets, merged", () => {
  const folder = scratch();
  const [collection, out] = [join(folder, "collection"), join(folder, "out")];
  const merge = ["merge", collection, "--out", out, "--no-report", "--quiet"];
  let result: Run;
  let summary: Summary;
  let cpuSeconds: number;

  beforeAll(async () => {
    writeFiles(collection, { "collection.json": '{ "format": 1, "name": "aqueous" }' });
    for (const set of "abcdefghi") {
      const card = cardFor(`set-${set}`, {
        ...{ origin: "open-dataset", licence: "CC0", doi: "10.1038/s41597-019-0151-1" },
        columns: {
          ...{ solute: { column: "Name" }, inchikey: { column: "InChIKey" }, smiles: { column: "SMILES" } },
          solubility: { column: "Solubility", unit: "log10(mol/L)" },
        },
        constants: { solvent: "water", temperature: { value: 25, unit: "°C" } },
      });
      writeFiles(collection, { [`sources/set-${set}.source.json`]: card });
      cpSync(`${SETS}dataset-${set.toUpperCase()}.csv`, join(collection, "sources", `set-${set}.csv`));
    }
    result = await run(process.execPath, ["--import", TELL_CPU, COMMAND, ...merge]);
    const { user, system } = JSON.parse(/^cpu (.*)$/m.exec(result.stderr)?.[1] ?? "{}");
    cpuSeconds = (user + system) / 1e6;
    summary = readJson<Summary>(out, "summary.json");
  }, 120_000);

  test("hold 19,795 readings, and every one is accepted or refused with its reason", () => {
    const { readings, accepted, refused } = summary.counts;
    console.info(
      `aqueous sets: ${accepted} accepted, ${refused} refused of ${readings}, ${cpuSeconds.toFixed(1)} CPU seconds`,
    );
    expect([readings, accepted + refused]).toEqual([19_795, 19_795]);
    expect(summary.sources.map(({ readings }) => readings).reduce((a, b) => a + b)).toBe(19_795);
    expect(readTable(out, "measurements.csv").rows).toHaveLength(accepted);
    expect(readTable(out, "refused.csv").rows).toHaveLength(refused);
    expect(result.code).toBe(refused > 0 ? 1 : 0);
  });

  test("are accepted but for values that no solution can have, or that need a density nobody gave", () => {
    expect(summary.counts.accepted).toBeGreaterThan(0.98 * 19_795);
    const codes = new Set(readTable(out, "refused.csv").rows.map(({ code }) => code));
    // The contradictions are the sets' own: maleic acid with the key of fumaric acid, L-tartaric acid with the flat one.
    const known = ["fraction-at-or-above-one", "no-molar-mass", "no-density", "contradictory-identity"];
    expect([...codes].filter((code) => !known.includes(code ?? ""))).toEqual([]);
  });

  test("hold 9,982 solutes, and every one is listed or has all of its readings refused", () => {
    const accepted = new Set(readTable(out, "measurements.csv").rows.map(({ source, line }) => `${source}:${line}`));
    const all = new Map<string, boolean>();
    for (const set of "abcdefghi") {
      const { rows } = readTable(join(collection, "sources"), `set-${set}.csv`);
      // One record a line in these files, the header on the first.
      rows.forEach(({ InChIKey = "" }, i) => {
        all.set(InChIKey, all.get(InChIKey) === true || accepted.has(`set-${set}:${i + 2}`));
      });
    }
    expect(all.size).toBe(9_982);
    const listed = readTable(out, "substances.csv").rows.filter(({ role = "" }) => role.split(";").includes("solute"));
    const usable = [...all.values()].filter((usable) => usable).length;
    console.info(`aqueous sets: ${listed.length} solutes listed, ${all.size - usable} with no reading accepted`);
    // Citric acid with its monohydrate, three drawings of D-fructose and two of warfarin are one solute each; three names
    // of the tables stand beside a key of no table, which then leads to a second solute.
    expect(Math.abs(listed.length - usable)).toBeLessThanOrEqual(5);
    const named = new Set(readTable(out, "measurements.csv").rows.map(({ solute }) => solute));
    expect(new Set(listed.map(({ key }) => key))).toEqual(named);
  });

  test("re-report one another, and what is one measurement counts once", () => {
    const told = readTable(out, "flags.csv").rows.filter(({ code }) => code === "re-reporting-source");
    const pairs = told.flatMap(({ source = "", evidence = "" }) =>
      [...evidence.matchAll(/(\d+) of (\d+) of (set-[a-i]) \(by chance about (\d+)\)/g)].map(
        ([, equal, compared, from, chance]) => ({
          pair: `${from} ${source}`,
          ...{ equal: Number(equal), compared: Number(compared), chance: Number(chance) },
        }),
      ),
    );
    console.info(
      `aqueous sets, equal of compared: ${pairs.map(({ pair, equal, compared }) => `${pair} ${equal}/${compared}`).join(", ")}`,
    );
    // Set D is mostly made of set B, as the authors of the collection say of values within 0.01 log unit.
    expect(pairs.find(({ pair }) => pair === "set-b set-d")?.equal).toBeGreaterThan(1_600);
    expect(pairs.reduce((sum, { equal }) => sum + equal, 0)).toBeGreaterThan(7_500);
    for (const { equal, chance } of pairs) expect(chance).toBeLessThanOrEqual(0.1 * equal + 1);
    // 3,292 solutes stand in several sets; half of them rest on one measurement written more than once.
    const several = readTable(out, "curves.csv").rows.filter(({ n_sources }) => Number(n_sources) > 1);
    expect(several.length).toBeLessThan(1_800);
  });
});

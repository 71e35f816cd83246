import { appendFileSync, cpSync, existsSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { EditionDocument } from "../../pipeline/records/generated/edition.ts";
import type { PublishResult } from "../../pipeline/records/generated/publish-result.ts";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { compare, FLAG, hidden, publish, rule, writeCollection } from "./ruled-collection.ts";
import { readJson, readTable, saltern, scratch } from "./saltern.ts";

const folder = scratch();
const place = join(folder, "collection");
const editions = join(folder, "editions");
const edition = join(editions, "2026-1");

/** Every file below a folder with its bytes, as text. */
const bytesOf = (where: string) =>
  readdirSync(where, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => [entry.name, readFileSync(join(entry.parentPath, entry.name), "latin1")])
    .sort();

beforeAll(() => {
  writeCollection(place);
});

describe("while a blocking flag has no ruling", () => {
  test("the edition is held back with 1, and the command that settles the flag is told", async () => {
    const run = await publish(place, "2026-1", editions);
    expect(run.code).toBe(1);
    expect(run.stdout).toContain(`saltern rule ${place} ${FLAG} ACTION --by NAME --reason WHY`);
    expect(readdirSync(editions)).toEqual([]);
  });

  test("the same is told as JSON of its schema", async () => {
    const result = JSON.parse((await publish(place, "2026-1", editions, { json: true })).stdout) as PublishResult;
    expect(documentErrors("publish-result", result)).toEqual([]);
    expect([result.published, result.to_settle.map(({ flag_id }) => flag_id)]).toEqual([false, [FLAG]]);
  });
});

describe("once every blocking flag has a ruling", () => {
  beforeAll(async () => {
    await rule(place, FLAG, "set aside");
    const run = await publish(place, "2026-1", editions);
    expect([run.code, run.stderr]).toEqual([0, ""]);
  });

  test("the edition appears as a whole with every table and nothing beside it", () => {
    expect(hidden(editions)).toEqual([]);
    const expected = ["curves.csv", "edition.json", "flags.csv", "measurements.csv", "summary.json", "systems.csv"];
    expect(readdirSync(edition)).toEqual(expect.arrayContaining(expected));
  });

  test("edition.json names inputs, settings, rulings and every other file, and follows its schema", () => {
    const document = readJson<EditionDocument>(edition, "edition.json");
    expect(documentErrors("edition", document)).toEqual([]);
    expect(document.date).toBe("2026-04-01");
    expect(document.rulings.map(({ ruling_id, measurement_ids }) => [ruling_id, measurement_ids])).toEqual([
      ["R0001", ["alpha:4"]],
    ]);
    expect(document.settings).toEqual(readJson<Summary>(edition, "summary.json").settings);
    const own = document.inputs.filter(({ of }) => of === "collection").map(({ path }) => path);
    const sources = ["alpha", "beta", "gamma"].flatMap((name) => [
      `sources/${name}.csv`,
      `sources/${name}.source.json`,
    ]);
    expect(own).toEqual(["collection.json", "rulings.csv", ...sources].sort());
    expect(document.outputs.map(({ path }) => path)).toEqual(
      readdirSync(edition)
        .filter((name) => name !== "edition.json")
        .sort(),
    );
  });

  test("flags.csv, measurements.csv and systems.csv show the flag as settled", () => {
    const flag = readTable(edition, "flags.csv").rows.find(({ flag_id }) => flag_id === FLAG);
    expect(flag?.ruling).toBe("R0001 set aside");
    const row = readTable(edition, "measurements.csv").rows.find(({ measurement_id }) => measurement_id === "alpha:4");
    expect([row?.status, row?.weight, row?.reported_value]).toEqual(["set aside", "0", "150.686"]);
    expect(row?.assumptions).toContain("set aside by data steward on 2026-04-01: looked at (R0001)");
    const [system] = readTable(edition, "systems.csv").rows;
    expect([system?.n_kept, system?.n_set_aside, system?.n_blocking_flags]).toEqual(["17", "1", "0"]);
  });

  test("it is never overwritten", async () => {
    const before = bytesOf(edition);
    for (const command of ["publish", "merge"]) {
      const run =
        command === "merge"
          ? await saltern(["merge", place, "--out", edition])
          : await publish(place, "2026-1", editions);
      expect([run.code, run.stdout]).toEqual([3, ""]);
      expect(run.stderr).toContain("[edition-exists]");
    }
    expect(bytesOf(edition)).toEqual(before);
  });

  test("it has the same bytes when published again elsewhere, in another time zone and locale", async () => {
    const run = await saltern(
      ["publish", "collection", "--edition", "2026-1", "--out", join(folder, "again"), "--no-report"],
      { cwd: folder, env: { TZ: "Asia/Kolkata", LC_ALL: "de_DE.UTF-8" } },
    );
    expect(run.code).toBe(0);
    expect(bytesOf(join(folder, "again", "2026-1"))).toEqual(bytesOf(edition));
  });

  test("its date can be given, and a date or a name that is none is refused", async () => {
    await publish(place, "dated", editions, { date: "2027-01-31" });
    expect(readJson<EditionDocument>(join(editions, "dated"), "edition.json").date).toBe("2027-01-31");
    const refused = [
      ...["31.01.2027", "2027-02-30", "2027", ""].map((date) => ["x", { date }] as const),
      ...["../x", "a/b", ".x", "", "x".repeat(65)].map((name) => [name, {}] as const),
    ];
    for (const [name, more] of refused) {
      const run = await publish(place, name, editions, more);
      expect([run.code, run.stdout], `${name} ${JSON.stringify(more)}`).toEqual([2, ""]);
    }
  });

  test("without any date it needs one", async () => {
    const undated = join(folder, "undated");
    cpSync(place, undated, { recursive: true });
    rmSync(join(undated, "rulings.csv"));
    for (const name of ["alpha", "beta", "gamma"]) {
      const file = join(undated, "sources", `${name}.source.json`);
      writeFileSync(file, readFileSync(file, "utf8").replace(/"date": "[^"]*"/, '"date": null'));
    }
    const run = await publish(undated, "2026-1", join(folder, "undated-editions"));
    expect(run.code).toBe(2);
    expect(run.stderr).toContain("[no-date]");
  });

  test("a stale ruling does not settle its flag, and is named with its line", async () => {
    const edited = join(folder, "edited");
    cpSync(place, edited, { recursive: true });
    const file = join(edited, "sources", "alpha.csv");
    writeFileSync(file, readFileSync(file, "utf8").replace("150.686", "149.686"));
    const run = await publish(edited, "2026-1", join(folder, "edited-editions"));
    expect(run.code).toBe(1);
    expect(run.stdout).toContain(FLAG);
    expect(run.stderr).toContain("rulings.csv:2: R0001 on off-curve@alpha:4");
    expect(run.stderr).toContain("[stale-ruling]");
  });
});

describe("with an earlier edition named by --since", () => {
  test("CHANGES.md says what changed, word for word what compare says", async () => {
    appendFileSync(join(place, "sources", "beta.csv"), "salicylic acid,ethanol,15,9.61\n");
    const run = await publish(place, "2026-2", editions, { since: edition });
    expect(run.code).toBe(0);
    const changes = readFileSync(join(editions, "2026-2", "CHANGES.md"), "utf8");
    expect(changes).toContain("# Edition 2026-2 (2026-04-01) against edition 2026-1 (2026-04-01)");
    expect(changes).toContain(
      "## Measurements added\n\n- beta:8: salicylic acid in ethanol, 9.61 g/100 g solvent at 15.0 °C",
    );
    const { stdout } = await compare(edition, join(editions, "2026-2"));
    expect(stdout).toContain(
      "Measurements added\n  beta:8: salicylic acid in ethanol, 9.61 g/100 g solvent at 15.0 °C",
    );
    const { since } = readJson<EditionDocument>(join(editions, "2026-2"), "edition.json");
    expect(since).toEqual({ edition: "2026-1", sha256: readJson<EditionDocument>(edition, "edition.json").sha256 });
  });

  test("a folder that is no edition is refused before anything is written", async () => {
    const run = await publish(place, "2026-3", editions, { since: place });
    expect([run.code, run.stdout]).toEqual([2, ""]);
    expect(run.stderr).toContain("[not-an-edition]");
    expect(existsSync(join(editions, "2026-3"))).toBe(false);
    expect(hidden(editions)).toEqual([]);
  });
});

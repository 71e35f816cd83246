import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { RuleResult } from "../../pipeline/records/generated/rule-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { inProcess } from "./in-process.ts";
import { FLAG, hidden, rule, writeCollection } from "./ruled-collection.ts";
import { readTable, saltern, scratch } from "./saltern.ts";

const folder = scratch();
const HEADER = "ruling_id,target,action,corrected_value,corrected_unit,reason,evidence,by,date,fingerprint";
const rulings = (place: string) => readFileSync(join(place, "rulings.csv"), "utf8");

describe("saltern rule", () => {
  const place = join(folder, "first");
  beforeAll(() => {
    writeCollection(place);
  });

  test("writes the first decision into a new rulings.csv and tells what it settles", async () => {
    const { code, stdout } = await rule(place, FLAG, "set aside");
    expect(code).toBe(0);
    expect(rulings(place)).toMatch(
      new RegExp(`^${HEADER}\nR0001,${FLAG},set aside,,,looked at,,data steward,2026-04-01,sha256:[0-9a-f]{16}\n$`),
    );
    expect(stdout).toContain(`settled: ${FLAG}`);
    expect(stdout).toContain("doubtful, now tentative");
    expect(stdout).toContain("the collection can be published");
    expect(hidden(place)).toEqual([]);
  });

  test("gives the next one the next number, quotes what needs quotes, and answers in JSON of its schema", async () => {
    const reason = 'said "yes", twice';
    const run = await rule(place, "beta:3", "keep", { by: "chemist, bench 2", reason, date: "2026-04-02", json: true });
    const result = JSON.parse(run.stdout) as RuleResult;
    expect(documentErrors("rule-result", result)).toEqual([]);
    expect(result.ruling).toMatchObject({ ruling_id: "R0002", reason, measurement_ids: ["beta:3"] });
    const last = readTable(place, "rulings.csv").rows.at(-1);
    expect(last).toMatchObject({ ruling_id: "R0002", reason, by: "chemist, bench 2" });
  });

  test("has today's date where none is given", async () => {
    expect((await rule(place, "gamma:3", "keep", { date: undefined })).code).toBe(0);
    expect(readTable(place, "rulings.csv").rows.at(-1)?.date).toMatch(/^20\d\d-\d\d-\d\d$/);
  });
});

describe("a decision that is incomplete or cannot be applied ends with 2 and is not written", () => {
  const place = join(folder, "second");
  beforeAll(() => {
    writeCollection(place);
  });
  const correct = (value: string) => ({ correctedValue: value, evidence: "x" });

  test.each([
    ["no target", undefined, undefined, {}, "missing-argument", "TARGET is missing"],
    ["no action", FLAG, undefined, {}, "missing-argument", "ACTION is missing"],
    ["no reason", FLAG, "keep", { reason: undefined }, "missing-argument", "--reason is missing"],
    ["nobody", FLAG, "keep", { by: undefined }, "missing-argument", "--by is missing"],
    ["a blank name", FLAG, "keep", { by: "  " }, "missing-argument", "--by is missing"],
    ["no evidence", FLAG, "correct", { correctedValue: "15" }, "missing-argument", "--evidence is missing"],
    ["no correction", FLAG, "correct", { evidence: "x" }, "missing-argument", "neither"],
    ["an unknown action", FLAG, "delete", {}, "bad-argument", '"delete"'],
    ["a value for keep", FLAG, "keep", { correctedValue: "15" }, "bad-argument", "correct alone"],
    ["no such flag", "off-curve@beta:4", "keep", {}, "unknown-target", 'no flag "off-curve@beta:4"'],
    ["no such measurement", "alpha:99", "keep", {}, "unknown-target", '"alpha:99"'],
    ["a date in another order", FLAG, "keep", { date: "01.04.2026" }, "bad-argument", "01.04.2026"],
    ["a value no solution has", FLAG, "correct", correct("-15"), "correction-impossible", "-15"],
    ["one value for a source", "alpha", "correct", correct("1"), "wrong-ruling", "6 measurements"],
  ])("%s", async (_, target, action, more, code, found) => {
    const run = await rule(place, target, action, more);
    expect([run.code, run.stdout]).toEqual([2, ""]);
    expect(run.stderr).toContain(`[${code}]`);
    expect(run.stderr).toContain(found);
    expect(existsSync(join(place, "rulings.csv"))).toBe(false);
    expect(hidden(place)).toEqual([]);
  });

  test("a mistyped flag is answered with the one that may have been meant", async () => {
    const run = await rule(place, "of-curve@alpha:4", "keep");
    expect(run.stderr).toContain(`perhaps ${FLAG}`);
  });

  test("the command itself takes the same arguments, and its exit code is 2", async () => {
    const run = await saltern(["rule", place, FLAG, "set-aside", "--by", "a"]);
    expect([run.code, run.stdout]).toEqual([2, ""]);
    expect(run.stderr).toContain("--reason is missing");
  });
});

test("a file that a spreadsheet saved again keeps its style, and not a byte before the new line changes", async () => {
  const place = writeCollection(join(folder, "third"));
  await rule(place, "beta:3", "keep");
  const [, line = ""] = rulings(place).trimEnd().split("\n");
  const columns = ["by", "date", ...HEADER.split(",").slice(0, 7), "fingerprint"];
  const cells = Object.fromEntries(HEADER.split(",").map((name, i) => [name, line.split(",")[i] ?? ""]));
  const before = `\ufeff${columns.join(";")}\r\n${columns.map((name) => cells[name]).join(";")}`;
  writeFileSync(join(place, "rulings.csv"), before);
  const { code, stderr } = await rule(place, FLAG, "set aside", { evidence: "a; b" });
  expect([code, stderr]).toEqual([0, ""]);
  expect(rulings(place)).toMatch(
    /\r\ndata steward;2026-04-01;R0002;off-curve@alpha:4;set aside;;;looked at;"a; b";sha256:\w+\r\n$/,
  );
  expect(rulings(place).startsWith(before)).toBe(true);
  const merge = await inProcess(["merge", place, "--out", join(folder, "third-tables"), "--no-report"]);
  expect(merge.stderr).toContain("rulings.csv: a byte-order mark, semicolons between the cells, line ends CR LF");
  expect(
    readTable(join(folder, "third-tables"), "flags.csv").rows.find(({ flag_id }) => flag_id === FLAG)?.ruling,
  ).toBe("R0002 set aside");
});

test("four decisions at once all stand in the file, each with a name of its own", async () => {
  const place = writeCollection(join(folder, "fourth"));
  const targets = ["beta:2", "beta:3", "gamma:2", "gamma:3"];
  const by = ["--by", "data steward", "--reason", "looked at"];
  const runs = await Promise.all(targets.map((target) => saltern(["rule", place, target, "keep", ...by])));
  expect(runs.map(({ code }) => code)).toEqual(targets.map(() => 0));
  const { rows } = readTable(place, "rulings.csv");
  expect(rows.map(({ target }) => target).sort()).toEqual(targets);
  expect(rows.map(({ ruling_id }) => ruling_id).sort()).toEqual(["R0001", "R0002", "R0003", "R0004"]);
  expect(hidden(place)).toEqual([]);
}, 60_000);

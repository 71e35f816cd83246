import { spawn } from "node:child_process";
import { appendFileSync, cpSync, existsSync, mkdirSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { beforeAll, describe, expect, test } from "vitest";
import { merge } from "../../pipeline/commands/merge.ts";
import { readEditionDocument } from "../../pipeline/read/edition-folder.ts";
import { FLAG, here, hidden, publish, rule, writeCollection } from "./ruled-collection.ts";
import { COMMAND, saltern, scratch } from "./saltern.ts";

/** Commands killed in all; the long test (SALTERN_CRASHES=200) kills ten times as many. */
const CRASHES = Number(process.env.SALTERN_CRASHES ?? 20);
const AT_ONCE = 2;
const PRELOAD = fileURLToPath(new URL("kill-at-call.mjs", import.meta.url));

const folder = scratch();
const collection = join(folder, "collection");
const changed = join(folder, "changed");
const NOT_MADE = "not there";

/** Every file below a folder with its bytes, as one text; NOT_MADE where there is no folder. */
function contentOf(where: string): string {
  if (!existsSync(where)) return NOT_MADE;
  const names = readdirSync(where, { recursive: true }).map(String).sort();
  return names.map((name) => `${name}\n${readFileSync(join(where, name), "latin1")}`).join("\n");
}

/** Arguments of the three commands that write, in a folder of their own. */
const COMMANDS = {
  merge: (place: string) => ["merge", changed, "--out", join(place, "out"), "--no-report"],
  publish: (place: string) => ["publish", changed, "--edition", "e", "--out", join(place, "editions"), "--no-report"],
  rule: (place: string) => [
    ...["rule", join(place, "collection"), "beta:3", "keep", "--by", "a", "--reason", "b", "--date", "2026-04-01"],
  ],
} as const;
type Name = keyof typeof COMMANDS;
const NAMES = Object.keys(COMMANDS) as Name[];

/** The folder of one crash: tables of an earlier merge, no edition yet, a collection with one ruling. */
function prepare(place: string): string {
  mkdirSync(join(place, "editions"), { recursive: true });
  cpSync(join(folder, "old"), join(place, "out"), { recursive: true });
  cpSync(collection, join(place, "collection"), { recursive: true });
  return place;
}

/** Runs a command that is killed just before its n-th writing call, or after some milliseconds. */
function killed(name: Name, place: string, env: Readonly<Record<string, string>>, afterMs?: number): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, ["--import", PRELOAD, COMMAND, ...COMMANDS[name](place)], {
      env: { ...process.env, NO_COLOR: "1", ...env },
      stdio: "ignore",
    });
    const timer = afterMs === undefined ? undefined : setTimeout(() => child.kill("SIGKILL"), afterMs);
    child.on("close", (_, signal) => {
      clearTimeout(timer);
      resolve(signal === "SIGKILL");
    });
  });
}

const expected = { old: "", tables: "", edition: "", rulings: ["", ""] };
const calls: Record<Name, number> = { merge: 0, publish: 0, rule: 0 };
const durationMs: Record<Name, number> = { merge: 0, publish: 0, rule: 0 };

beforeAll(async () => {
  writeCollection(collection);
  await rule(collection, FLAG, "set aside");
  cpSync(collection, changed, { recursive: true });
  appendFileSync(join(changed, "sources", "beta.csv"), "salicylic acid,ethanol,15,9.61\n");
  expect((await saltern(["merge", collection, "--out", join(folder, "old"), "--no-report"])).code).toBe(0);
  const place = prepare(join(folder, "whole"));
  for (const name of NAMES) {
    const file = join(folder, `calls-${name}`);
    const start = performance.now();
    await killed(name, place, { SALTERN_CALLS: file });
    durationMs[name] = performance.now() - start;
    calls[name] = Number(readFileSync(file, "utf8"));
  }
  expected.old = contentOf(join(folder, "old"));
  expected.tables = contentOf(join(place, "out"));
  expected.edition = contentOf(join(place, "editions", "e"));
  expected.rulings = [collection, join(place, "collection")].map((at) => readFileSync(join(at, "rulings.csv"), "utf8"));
}, 60_000);

test("the commands write in many steps, and what they write differs from what was there", () => {
  expect(calls.merge).toBeGreaterThan(20);
  expect(calls.publish).toBeGreaterThan(20);
  expect(calls.rule).toBeGreaterThanOrEqual(3);
  expect(expected.tables).not.toBe(expected.old);
  expect(expected.edition).not.toBe(NOT_MADE);
  expect(expected.rulings[1]).not.toBe(expected.rulings[0]);
});

/** What must hold after a crash at any moment, and after the next command. */
const CHECKS: Readonly<Record<Name, (place: string) => Promise<void>>> = {
  merge: async (place) => {
    expect([expected.old, expected.tables, NOT_MADE]).toContain(contentOf(join(place, "out")));
    const options = { out: join(place, "out"), report: false, version: "0.1.0" };
    expect((await here((terminal) => merge(join(folder, "nowhere"), options, terminal))).code).toBe(2);
    expect([expected.old, expected.tables]).toContain(contentOf(join(place, "out")));
    expect(hidden(place)).toEqual([]);
  },
  publish: async (place) => {
    const edition = join(place, "editions", "e");
    expect([expected.edition, NOT_MADE]).toContain(contentOf(edition));
    const again = await publish(changed, "e", join(place, "editions"));
    expect([0, 3]).toContain(again.code);
    expect(contentOf(edition)).toBe(expected.edition);
    expect((await readEditionDocument(edition)).edition).toBe("e");
    expect(hidden(join(place, "editions"))).toEqual([]);
  },
  rule: async (place) => {
    const at = join(place, "collection");
    const text = readFileSync(join(at, "rulings.csv"), "utf8");
    expect(expected.rulings).toContain(text);
    expect((await rule(at, "gamma:3", "keep")).code).toBe(0);
    expect(readFileSync(join(at, "rulings.csv"), "utf8").startsWith(text)).toBe(true);
    expect(hidden(at)).toEqual([]);
  },
};

describe(`${CRASHES} commands killed at seeded random moments leave the old state, the new one, or one that the next command repairs`, () => {
  const random = xoroshiro128plus(20260401);
  const upTo = (n: number) => 1 + ((random.next() >>> 0) % n);
  const crashes = Array.from({ length: CRASHES }, (_, i) => ({
    name: NAMES[[0, 1, 0, 1, 2][i % 5] as number] as Name,
    byCall: i % 4 !== 3,
    place: join(folder, `crash-${i}`),
    draw: upTo(1_000_000) / 1_000_000,
  }));

  test(
    "whether just before one of their writing calls or after a random time",
    async () => {
      let kills = 0;
      for (let i = 0; i < crashes.length; i += AT_ONCE) {
        const batch = crashes.slice(i, i + AT_ONCE).map(async ({ name, byCall, place, draw }) => {
          prepare(place);
          const at = String(Math.ceil(draw * calls[name]));
          const wasKilled = byCall
            ? await killed(name, place, { SALTERN_KILL_AT: at })
            : await killed(name, place, {}, draw * durationMs[name]);
          if (wasKilled) kills++;
          await CHECKS[name](place);
        });
        await Promise.all(batch);
      }
      expect(kills).toBeGreaterThanOrEqual(0.7 * CRASHES);
    },
    30_000 + 3000 * CRASHES,
  );
});

test("of two commands that write one place at once, one writes and the other writes after it or is refused in words", async () => {
  const place = prepare(join(folder, "twice"));
  for (const name of ["merge", "publish"] as const) {
    const runs = await Promise.all([saltern(COMMANDS[name](place)), saltern(COMMANDS[name](place))]);
    expect(runs.some(({ code }) => code === 0)).toBe(true);
    for (const { code, stderr } of runs.filter((run) => run.code !== 0)) {
      expect(code).toBe(3);
      expect(stderr).toMatch(/\[(in-use|edition-exists)\]/);
    }
  }
  expect(contentOf(join(place, "out"))).toBe(expected.tables);
  expect(contentOf(join(place, "editions", "e"))).toBe(expected.edition);
  expect([...hidden(place), ...hidden(join(place, "editions"))]).toEqual([]);
});

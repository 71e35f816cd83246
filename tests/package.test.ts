import { cpSync, existsSync, mkdirSync, readdirSync, readFileSync, symlinkSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { ROOT, type Run, run, scratch, writeFiles } from "./commands/saltern.ts";

const folder = scratch();
const [project, user] = [join(folder, "project"), join(folder, "user")];
const installed = join(user, "node_modules", "saltern");
let pack: Run;
let install: Run;

/** A copy of what the package is made from, so that packing, which builds anew, does not disturb the other tests. */
function copyProject(): void {
  mkdirSync(project);
  const skip = new Set(["node_modules", "build", "reports", "tests"]);
  for (const name of readdirSync(ROOT).filter((name) => !name.startsWith(".") && !skip.has(name))) {
    cpSync(join(ROOT, name), join(project, name), { recursive: true });
  }
  symlinkSync(join(ROOT, "node_modules"), join(project, "node_modules"));
}

beforeAll(async () => {
  copyProject();
  pack = await run("npm", ["pack", "--pack-destination", folder, "--loglevel", "error"], { cwd: project });
  const tarball = readdirSync(folder).find((name) => name.endsWith(".tgz")) ?? "none was packed";
  writeFiles(user, { "package.json": '{ "name": "somebody", "private": true }' });
  const quietly = ["--no-audit", "--no-fund", "--prefer-offline", "--omit", "dev", "--loglevel", "error"];
  install = await run("npm", ["install", join(folder, tarball), ...quietly], { cwd: user, timeoutMs: 120_000 });
}, 240_000);

/** Runs the installed command as its user would. */
const saltern = (...arguments_: readonly string[]) =>
  run("npx", ["--no", "--", "saltern", ...arguments_], { cwd: user });

describe("the package, packed and installed in another folder", () => {
  test("is built and packed by npm pack alone", () => {
    expect(pack.code, pack.stderr).toBe(0);
    expect(install.code, install.stderr).toBe(0);
  });

  test("holds the built command, schemas, data and licence, and neither tests nor sources", () => {
    const { files } = JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8")) as { files: string[] };
    for (const name of files.filter((name) => !name.includes("*"))) {
      expect([name, existsSync(join(installed, name))]).toEqual([name, true]);
    }
    expect(readdirSync(installed).filter((name) => ["pipeline", "tests", "reports"].includes(name))).toEqual([]);
  });

  test("has a command that shows its help", async () => {
    const help = await saltern("--help");
    expect([help.code, help.stderr]).toEqual([0, ""]);
    expect(help.stdout).toContain("Usage: saltern");
  });

  test("merges its own demo collection, with data found beside the program", async () => {
    const out = join(user, "tables");
    const merged = await saltern("merge", join(installed, "datasets", "demo"), "--out", out, "--json");
    expect(merged.code, merged.stderr).toBe(1);
    expect(JSON.parse(merged.stdout).counts).toMatchObject({ sources: 11, readings: 434, refused: 9 });
    expect(existsSync(join(out, "report", "index.html"))).toBe(true);
  });

  test("starts a new collection with the schemas it brings along", async () => {
    const started = await saltern("new", join(user, "mine"));
    expect(started.code, started.stderr).toBe(0);
    expect(existsSync(join(user, "mine", "schemas", "source-card.schema.json"))).toBe(true);
  });
});

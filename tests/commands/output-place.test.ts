import {
  chmodSync,
  cpSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { inProcess } from "./in-process.ts";
import { cardFor, ROOT, type Run, run, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const collection = join(folder, "collection");
const isRoot = process.getuid?.() === 0;

beforeAll(() => {
  const rows = Array.from({ length: 400 }, (_, i) => `paracetamol,water,${5 + i / 8},${1 + i / 400}`);
  writeFiles(collection, {
    "collection.json": '{ "format": 1, "name": "small" }',
    "sources/bench.csv": `Compound,Solvent,T,S\n${rows.join("\n")}\n`,
    "sources/bench.source.json": cardFor("bench"),
  });
});

/** A run that could not write: exit code 3, a message with a remedy, nothing on standard output. */
function couldNotWrite({ code, stdout, stderr }: Run, problem: string): void {
  expect([code, stdout], stderr).toEqual([3, ""]);
  expect(stderr).toContain(`[${problem}]`);
  expect(stderr).toMatch(/to mend: /);
  expect(stderr).not.toMatch(/^\s+at /m);
}

const hidden = (place: string) => readdirSync(place).filter((name) => name.startsWith("."));

describe("a place for the tables that cannot be used ends with 3", () => {
  test("where it holds somebody's files, which stay as they are", async () => {
    writeFiles(folder, { "letters/dear.txt": "dear", "letters/summary.json": '{ "pages": 3 }' });
    couldNotWrite(await saltern(["merge", collection, "--out", join(folder, "letters")]), "output-not-ours");
    expect(readFileSync(join(folder, "letters", "dear.txt"), "utf8")).toBe("dear");
    expect(hidden(folder)).toEqual([]);
  });

  test("where it is the collection, a folder that holds it, or its sources", async () => {
    for (const out of [collection, folder, join(collection, "sources")]) {
      couldNotWrite(await inProcess(["merge", collection, "--out", out]), "output-is-input");
    }
    expect(readdirSync(collection).sort()).toEqual(["collection.json", "sources"]);
  });

  test("where it lies below a file", async () => {
    writeFiles(folder, { "a-file": "x" });
    couldNotWrite(
      await inProcess(["merge", collection, "--out", join(folder, "a-file", "out")]),
      "output-not-writable",
    );
  });

  test("where the folder around it may not be written to", async (context) => {
    // Root may write everywhere: the command then runs as another user, if that one may read the project at all.
    const uid = isRoot ? 65_534 : undefined;
    const place = mkdtempSync(join(tmpdir(), "saltern-read-only-"));
    const copy = join(place, "collection");
    cpSync(collection, copy, { recursive: true });
    for (const path of [place, copy, join(copy, "sources")]) chmodSync(path, 0o555);
    try {
      if (uid !== undefined && (await saltern(["--version"], { uid })).code !== 0) {
        context.skip("the project cannot be read by another user, and root may write everywhere");
      }
      const where = uid === undefined ? {} : { uid };
      couldNotWrite(await saltern(["merge", copy, "--out", join(place, "out")], where), "output-not-writable");
    } finally {
      for (const path of [place, copy, join(copy, "sources")]) chmodSync(path, 0o755);
      rmSync(place, { recursive: true });
    }
  });
});

describe("a disk that is full", () => {
  const disk = join(folder, "disk");
  let mounted = false;

  beforeAll(async () => {
    mkdirSync(disk);
    const mount = await run("mount", ["-t", "tmpfs", "-o", "size=128k", "tmpfs", disk]).catch(() => undefined);
    mounted = mount?.code === 0;
    if (!mounted) console.warn("skipped: no small disk can be mounted here, so that none can be filled");
  });
  afterAll(async () => {
    if (mounted) await run("umount", [disk]);
  });

  test("ends with 3, leaves the earlier tables as they were, and no half-written folder", async (context) => {
    if (!mounted) context.skip();
    const out = join(disk, "out");
    mkdirSync(out);
    const earlier = JSON.stringify({ format: 1, program_version: "0.1.0", files: [] });
    writeFileSync(join(out, "summary.json"), earlier);
    couldNotWrite(await saltern(["merge", collection, "--out", out]), "no-space");
    expect(readdirSync(disk)).toEqual(["out"]);
    expect(readFileSync(join(out, "summary.json"), "utf8")).toBe(earlier);
  });
});

describe("the tables appear as a whole", () => {
  test("over those of an earlier run, with nothing of it left and nothing beside them", async () => {
    const out = join(folder, "tables");
    writeFiles(out, { "summary.json": '{"format":1,"program_version":"0","files":[]}', "planning-old.csv": "x" });
    expect((await inProcess(["merge", collection, "--out", out, "--no-report"])).code).toBe(0);
    expect(existsSync(join(out, "planning-old.csv"))).toBe(false);
    expect(existsSync(join(out, "measurements.csv"))).toBe(true);
    expect(hidden(folder)).toEqual([]);
  });

  test("after an interrupted swap, even where the next command refuses its input", async () => {
    const place = join(folder, "interrupted");
    writeFiles(place, { ".out.saltern-old/summary.json": '{"format":1,"program_version":"0","files":[]}' });
    const { code } = await inProcess(["merge", join(folder, "nowhere"), "--out", join(place, "out")]);
    expect(code).toBe(2);
    expect(readdirSync(place)).toEqual(["out"]);
  });

  test("and a command that is refused its input leaves no temporary folder", async () => {
    const place = join(folder, "refused");
    mkdirSync(place);
    expect((await inProcess(["merge", join(folder, "nowhere"), "--out", join(place, "out")])).code).toBe(2);
    expect(readdirSync(place)).toEqual([]);
  });

  test("in a folder named relative to the working folder, however far away it is", async () => {
    const { code } = await saltern(["merge", collection, "--out", "deep/er/out", "--no-report"], { cwd: folder });
    expect(code).toBe(0);
    expect(existsSync(join(folder, "deep", "er", "out", "summary.json"))).toBe(true);
    expect(existsSync(join(ROOT, "deep"))).toBe(false);
  });
});

import * as fs from "node:fs";
import { join } from "node:path";
import { afterEach, describe, expect, test, vi } from "vitest";
import { appendRuling } from "../../pipeline/publish/append-ruling.ts";
import { OutputError, openEditionFolder, openOutputFolder } from "../../pipeline/publish/output-folder.ts";
import { temporaryFolder } from "../read/temporary-collection.ts";

/** What goes wrong with the file system: the call number `at` of those that write, or every write but its first bytes. */
const disk = vi.hoisted(() => ({ calls: 0, at: 0, code: "", bytesAtOnce: Number.POSITIVE_INFINITY }));

// The file system under test is the real one, in which the calls of the writer are counted and made to fail.
vi.mock("node:fs", async (original) => {
  const real = await original<typeof fs>();
  const failing = (call: (...given: never[]) => unknown) =>
    ((...given: never[]) => {
      disk.calls++;
      if (disk.calls === disk.at) throw Object.assign(new Error(`${disk.code}: injected`), { code: disk.code });
      return call(...given);
    }) as never;
  const write = (descriptor: number, bytes: Buffer, from: number) =>
    real.writeSync(descriptor, bytes, from, Math.min(bytes.length - from, disk.bytesAtOnce));
  return {
    ...real,
    mkdirSync: failing(real.mkdirSync),
    symlinkSync: failing(real.symlinkSync),
    openSync: failing(real.openSync),
    fsyncSync: failing(real.fsyncSync),
    renameSync: failing(real.renameSync),
    writeSync: failing(write as (...given: never[]) => unknown),
  };
});

const SUMMARY = JSON.stringify({ format: 1, program_version: "0.1.0", files: [] });

/** Makes the n-th writing call from now on fail; those after it work again, as after room was made. */
function failAt(n: number, code: string): void {
  Object.assign(disk, { calls: 0, at: n, code });
}

/** Stops the failing; returns how many writing calls were made. */
function repaired(): number {
  Object.assign(disk, { at: 0, bytesAtOnce: Number.POSITIVE_INFINITY });
  return disk.calls;
}
afterEach(repaired);

function problemOf(action: () => void): string {
  try {
    action();
  } catch (error) {
    if (error instanceof OutputError) return error.problem.code;
    throw error;
  }
  return "none";
}

const filesOf = (folder: string) => (fs.existsSync(folder) ? fs.readdirSync(folder).sort() : []);

describe.each([
  ["ENOSPC", "no-space"],
  ["EDQUOT", "no-space"],
  ["EROFS", "output-not-writable"],
  ["EIO", "output-not-writable"],
])("%s at any call of the writer", (code, problem) => {
  test("leaves the old tables or the new ones, told as a problem, and nothing beside them", () => {
    for (let n = 1; ; n++) {
      const base = temporaryFolder({ "c/collection.json": "{}", "out/summary.json": SUMMARY, "out/old.csv": "old" });
      failAt(n, code);
      let folder: ReturnType<typeof openOutputFolder> | undefined;
      const found = problemOf(() => {
        folder = openOutputFolder(join(base, "out"), join(base, "c"));
        folder.write("new.csv", ["new"]);
        folder.write("summary.json", [SUMMARY]);
        folder.commit();
      });
      const calls = repaired();
      folder?.discard();
      const files = filesOf(join(base, "out"));
      if (found === "none") expect(files).toEqual(["new.csv", "summary.json"]);
      else expect([found, files], `call ${n}`).toEqual([problem, ["old.csv", "summary.json"]]);
      expect(filesOf(base), `call ${n}`).toEqual(["c", "out"]);
      if (calls < n) return;
    }
  });

  test("leaves no edition or a whole one", () => {
    for (let n = 1; ; n++) {
      const base = temporaryFolder({ "c/collection.json": "{}" });
      failAt(n, code);
      let folder: ReturnType<typeof openOutputFolder> | undefined;
      const found = problemOf(() => {
        folder = openEditionFolder(join(base, "editions", "e"), join(base, "c"));
        folder.write("edition.json", ["{}"]);
        folder.commit();
      });
      const calls = repaired();
      folder?.discard();
      expect(filesOf(join(base, "editions")), `call ${n}: ${found}`).toEqual(found === "none" ? ["e"] : []);
      if (found !== "none") expect(found).toBe(problem);
      if (calls < n) return;
    }
  });

  test("while a ruling is appended leaves the file as it was, or with the whole line", () => {
    const before = "ruling_id,target,action,reason,by,date,fingerprint\nR0001,a,keep,b,c,2026-01-01,d\n";
    const ruling = { target: "a", action: "ask", reason: "b", by: "c", date: "2026-01-02", fingerprint: "d" };
    for (let n = 1; ; n++) {
      const base = temporaryFolder({ "rulings.csv": before });
      failAt(n, code);
      const found = problemOf(() => appendRuling(base, ruling));
      const calls = repaired();
      const text = fs.readFileSync(join(base, "rulings.csv"), "utf8");
      expect([before, `${before}R0002,a,ask,b,c,2026-01-02,d\n`]).toContain(text);
      expect(text === before, `call ${n}: ${found}`).toBe(found !== "none");
      expect(filesOf(base)).toEqual(["rulings.csv"]);
      if (calls < n) return;
    }
  });
});

test("a write that the disk takes in part only is taken back where the rest fails, and completed where it does not", () => {
  const before = "ruling_id,target,action,reason,by,date,fingerprint\n";
  const ruling = { target: "a", action: "ask", reason: "b", by: "c", date: "2026-01-02", fingerprint: "d" };
  const base = temporaryFolder({ "rulings.csv": before });
  const text = () => fs.readFileSync(join(base, "rulings.csv"), "utf8");
  // Calls: lock, open, first 7 bytes, the rest.
  failAt(4, "ENOSPC");
  disk.bytesAtOnce = 7;
  expect(problemOf(() => appendRuling(base, ruling))).toBe("no-space");
  expect(text()).toBe(before);
  failAt(0, "");
  disk.bytesAtOnce = 7;
  expect(problemOf(() => appendRuling(base, ruling))).toBe("none");
  expect(text()).toBe(`${before}R0001,a,ask,b,c,2026-01-02,d\n`);
});

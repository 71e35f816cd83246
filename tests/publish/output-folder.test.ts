import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, symlinkSync } from "node:fs";
import { hostname } from "node:os";
import { dirname, join } from "node:path";
import { describe, expect, test } from "vitest";
import { OutputError, openEditionFolder, openOutputFolder } from "../../pipeline/publish/output-folder.ts";
import { temporaryFolder } from "../read/temporary-collection.ts";

const SUMMARY = JSON.stringify({ format: 1, program_version: "0.1.0", files: [] });

/** A place with a collection in it; the output folder is not made. */
function place(files: Readonly<Record<string, string>> = {}) {
  const base = temporaryFolder({ "collection/collection.json": "{}", "collection/sources/a.csv": "x", ...files });
  return { base, collection: join(base, "collection"), out: join(base, "out") };
}

/** Code of the problem that an attempt is refused with. */
function refusal(attempt: () => unknown): string {
  try {
    attempt();
  } catch (error) {
    if (error instanceof OutputError) return error.problem.code;
    throw error;
  }
  throw new Error("not refused");
}

const hidden = (folder: string) => readdirSync(folder).filter((name) => name.startsWith("."));

describe("an output folder", () => {
  test("appears as a whole when it is committed, not before, and leaves nothing beside it", () => {
    const { base, collection, out } = place();
    const folder = openOutputFolder(out, collection);
    folder.write("a.csv", ["1\n", "2\n"]);
    folder.write("report/index.html", ["<p>"]);
    expect(existsSync(out)).toBe(false);
    folder.commit();
    expect(readdirSync(out, { recursive: true }).sort()).toEqual(["a.csv", "report", "report/index.html"]);
    expect(readFileSync(join(out, "a.csv"), "utf8")).toBe("1\n2\n");
    expect(hidden(base)).toEqual([]);
  });

  test("remembers size and SHA-256 of every file, in code-unit order", () => {
    const { collection, out } = place();
    const folder = openOutputFolder(out, collection);
    folder.write("b.csv", ["µ"]);
    folder.write("B.csv", []);
    folder.write("a/z.csv", ["abc"]);
    const sha256 = (text: string) => createHash("sha256").update(text, "utf8").digest("hex");
    expect(folder.files()).toEqual([
      { path: "B.csv", bytes: 0, sha256: sha256("") },
      { path: "a/z.csv", bytes: 3, sha256: "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad" },
      { path: "b.csv", bytes: 2, sha256: sha256("µ") },
    ]);
    folder.discard();
  });

  test("with an earlier edition of ours is replaced as a whole: what is no longer written is gone", () => {
    const { base, collection, out } = place({ "out/summary.json": SUMMARY, "out/old.csv": "old" });
    const folder = openOutputFolder(out, collection);
    folder.write("new.csv", ["new"]);
    expect(readFileSync(join(out, "old.csv"), "utf8")).toBe("old");
    folder.commit();
    expect(readdirSync(out)).toEqual(["new.csv"]);
    expect(hidden(base)).toEqual([]);
  });

  test("that is discarded leaves the earlier edition as it was and no temporary sibling", () => {
    const { base, collection, out } = place({ "out/summary.json": SUMMARY });
    const folder = openOutputFolder(out, collection);
    folder.write("new.csv", ["new"]);
    folder.discard();
    folder.discard();
    expect(readdirSync(out)).toEqual(["summary.json"]);
    expect(hidden(base)).toEqual([]);
  });

  test("may be new, empty, or below folders that do not exist yet", () => {
    const { base, collection } = place({});
    mkdirSync(join(base, "empty"));
    for (const out of [join(base, "empty"), join(base, "far", "away", "out")]) {
      const folder = openOutputFolder(out, collection);
      folder.write("a.csv", ["a"]);
      folder.commit();
      expect(readdirSync(out)).toEqual(["a.csv"]);
    }
  });
});

describe("a place that would lose somebody's files is refused", () => {
  test.each([
    ["files without a summary.json", { "out/letters.txt": "dear" }],
    ["a summary.json of another program", { "out/summary.json": '{"total": 3}', "out/thesis.doc": "x" }],
    ["a summary.json that is no JSON", { "out/summary.json": "{", "out/thesis.doc": "x" }],
    ["a summary.json that is an array", { "out/summary.json": "[]", "out/thesis.doc": "x" }],
  ] as [string, Record<string, string>][])("where it holds %s", (_, files) => {
    const { base, collection, out } = place(files);
    const before = readdirSync(out);
    expect(refusal(() => openOutputFolder(out, collection))).toBe("output-not-ours");
    expect(readdirSync(out)).toEqual(before);
    expect(hidden(base)).toEqual([]);
  });

  test("where it is a file", () => {
    const { collection, out } = place({ out: "a file" });
    expect(refusal(() => openOutputFolder(out, collection))).toBe("output-not-ours");
  });

  test("where it is the collection, a parent of it, or its sources", () => {
    const { base, collection } = place();
    for (const out of [collection, base, dirname(base), "/", join(collection, "sources"), `${collection}/.`]) {
      expect(
        refusal(() => openOutputFolder(out, collection)),
        out,
      ).toBe("output-is-input");
    }
    expect(existsSync(join(collection, "collection.json"))).toBe(true);
  });

  test("where it is the collection under another name, by a symbolic link", () => {
    const { base, collection } = place();
    symlinkSync(collection, join(base, "link"));
    expect(refusal(() => openOutputFolder(join(base, "link"), collection))).toBe("output-is-input");
    expect(refusal(() => openOutputFolder(join(base, "link", "sources", "x"), collection))).toBe("output-is-input");
  });

  test("but not where its name only begins like that of the collection", () => {
    const { collection } = place();
    const folder = openOutputFolder(`${collection}-tables`, collection);
    folder.discard();
    expect(existsSync(`${collection}-tables`)).toBe(false);
  });
});

describe("an interruption", () => {
  test("between the two renamings of a swap is repaired by the next command", () => {
    const { base, collection, out } = place({ "out/summary.json": SUMMARY, "out/kept.csv": "kept" });
    renameSync(out, join(base, ".out.saltern-old"));
    const folder = openOutputFolder(out, collection);
    expect(readFileSync(join(out, "kept.csv"), "utf8")).toBe("kept");
    folder.discard();
    expect(hidden(base)).toEqual([]);
  });

  test("after a swap leaves an old sibling, which the next command removes", () => {
    const { base, collection } = place({ "out/summary.json": SUMMARY, ".out.saltern-old/summary.json": SUMMARY });
    openOutputFolder(join(base, "out"), collection).discard();
    expect(hidden(base)).toEqual([]);
  });

  test("while writing leaves a temporary folder and the lock of a process that has ended, which are replaced", () => {
    const { base, collection, out } = place({ ".out.saltern-new/a": "half" });
    // No process has this number: the largest on Linux is 4194304.
    symlinkSync(`99999999||${hostname()}`, join(base, ".out.saltern-lock"));
    const folder = openOutputFolder(out, collection);
    folder.write("b", ["whole"]);
    folder.commit();
    expect(readdirSync(out)).toEqual(["b"]);
    expect(hidden(base)).toEqual([]);
  });

  test("is none where another process is writing the folder now: the second one stops and touches nothing", () => {
    const { base, collection, out } = place({ ".out.saltern-new/a": "half", ".out.saltern-old/summary.json": SUMMARY });
    symlinkSync(`${process.ppid}||${hostname()}`, join(base, ".out.saltern-lock"));
    expect(refusal(() => openOutputFolder(out, collection))).toBe("in-use");
    expect(hidden(base).sort()).toEqual([".out.saltern-lock", ".out.saltern-new", ".out.saltern-old"]);
    expect(readdirSync(join(base, ".out.saltern-new"))).toEqual(["a"]);
  });

  test("is none where a process of another machine holds the folder: nobody here can tell whether it lives", () => {
    const { base, collection, out } = place();
    symlinkSync("99999999||another-machine.example", join(base, ".out.saltern-lock"));
    expect(refusal(() => openOutputFolder(out, collection))).toBe("in-use");
  });

  test("of a process whose number another one has now leaves a lock that is seen through by its start time", () => {
    const { base, collection, out } = place();
    // The parent of this process runs, but did not start at the first tick of the clock.
    symlinkSync(`${process.ppid}|1|${hostname()}`, join(base, ".out.saltern-lock"));
    if (!existsSync("/proc/self/stat")) return;
    openOutputFolder(out, collection).discard();
    expect(hidden(base)).toEqual([]);
  });

  test("that keeps the new folder from its place puts the earlier one back", () => {
    const { base, collection, out } = place({ "out/summary.json": SUMMARY, "out/old.csv": "old" });
    const folder = openOutputFolder(out, collection);
    folder.write("new.csv", ["new"]);
    // Somebody removes the finished folder just before it is put in its place.
    rmSync(folder.building, { recursive: true });
    expect(refusal(() => folder.commit())).toBe("output-not-writable");
    expect(readdirSync(out).sort()).toEqual(["old.csv", "summary.json"]);
    folder.discard();
    expect(hidden(base)).toEqual([]);
  });

  test("by a file in the way is told as a problem with a remedy", () => {
    const { base, collection } = place({ blocked: "a file" });
    expect(refusal(() => openOutputFolder(join(base, "blocked", "out"), collection))).toBe("output-not-writable");
  });
});

describe("the folder of an edition", () => {
  test("appears in one renaming and is never overwritten, not even by working tables", () => {
    const { base, collection } = place();
    const out = join(base, "editions", "2026-1");
    const folder = openEditionFolder(out, collection);
    folder.write("edition.json", ["{}"]);
    folder.write("summary.json", [SUMMARY]);
    expect(readdirSync(join(base, "editions")).sort()).toEqual([".2026-1.saltern-lock", ".2026-1.saltern-new"]);
    folder.commit();
    expect(readdirSync(join(base, "editions"))).toEqual(["2026-1"]);
    expect(refusal(() => openEditionFolder(out, collection))).toBe("edition-exists");
    expect(refusal(() => openOutputFolder(out, collection))).toBe("edition-exists");
    expect(readdirSync(out).sort()).toEqual(["edition.json", "summary.json"]);
  });

  test("is refused where anything of its name stands, an empty folder or a file included", () => {
    const { base, collection } = place({ "editions/b": "a file" });
    mkdirSync(join(base, "editions", "a"));
    for (const name of ["a", "b"]) {
      expect(refusal(() => openEditionFolder(join(base, "editions", name), collection))).toBe("edition-exists");
    }
  });

  test("is written by one at a time", () => {
    const { base, collection } = place();
    const first = openEditionFolder(join(base, "e"), collection);
    expect(refusal(() => openEditionFolder(join(base, "e"), collection))).toBe("in-use");
    first.discard();
    openEditionFolder(join(base, "e"), collection).discard();
    expect(hidden(base)).toEqual([]);
  });
});

test("a link in the path is followed: the folder it leads to is replaced, the link stays", () => {
  const { base, collection } = place({ "far/out/summary.json": SUMMARY });
  symlinkSync(join(base, "far", "out"), join(base, "link"));
  const folder = openOutputFolder(join(base, "link"), collection);
  folder.write("a", ["a"]);
  folder.commit();
  expect(readdirSync(join(base, "far", "out"))).toEqual(["a"]);
  expect(readdirSync(join(base, "link"))).toEqual(["a"]);
  expect(hidden(base)).toEqual([]);
});

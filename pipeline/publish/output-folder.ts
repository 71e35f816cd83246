import { existsSync, mkdirSync, readdirSync, readFileSync, realpathSync, renameSync, rmSync, statSync } from "node:fs";
import { basename, dirname, join, resolve, sep } from "node:path";
import { type Problem, type ProblemCode, problem } from "../problems/catalogue.ts";
import type { WrittenFile } from "../records/generated/summary.ts";
import { type Lock, takeLock } from "./lock.ts";
import { flushFolder, writeWhole } from "./write-file.ts";

/** Raised when an output folder cannot be used or written; `problem` says why and how to mend it. */
export class OutputError extends Error {
  readonly problem: Problem;
  constructor(found: Problem) {
    super(found.found);
    this.problem = found;
  }
}

/** An output folder being built beside its final place. */
export interface OutputFolder {
  /** The temporary folder that the files are written to until they are committed. */
  readonly building: string;
  /** Writes one file, piece by piece, and remembers its SHA-256. */
  readonly write: (name: string, text: Iterable<string>) => void;
  /** Every file written so far with its size and SHA-256, in code-unit order of the paths. */
  readonly files: () => WrittenFile[];
  /** Puts the finished folder in its place; from here on readers see the new tables only. */
  readonly commit: () => void;
  /** Removes everything written; harmless after commit. */
  readonly discard: () => void;
}

/** The temporary siblings of an output folder: the one being written, the one being replaced, and the lock. */
const siblings = (folder: string) => {
  const beside = (suffix: string) => join(dirname(folder), `.${basename(folder)}.saltern-${suffix}`);
  return { fresh: beside("new"), old: beside("old"), lock: beside("lock") };
};

/** Turns a file-system error into a problem with a remedy. */
export function writeError(place: string, error: unknown): OutputError {
  if (error instanceof OutputError) return error;
  const { code, message } = error as NodeJS.ErrnoException;
  const kind = code === "ENOSPC" || code === "EDQUOT" ? "no-space" : "output-not-writable";
  return new OutputError(problem(kind, { file: place }, { found: message }));
}

function refuse(code: ProblemCode, folder: string, found: string): never {
  throw new OutputError(problem(code, { file: folder }, { found }));
}

/** Real path of a folder that need not exist yet: that of its nearest existing parent, with the rest appended. */
function realPath(folder: string): string {
  return existsSync(folder) ? realpathSync(folder) : join(realPath(dirname(folder)), basename(folder));
}

/** Refuses a folder that is the collection, a parent of it, or a part of it that holds inputs. */
function checkIsNoInput(folder: string, collection: string): void {
  const [out, input] = [realPath(folder), realPath(collection)];
  if (input === out || input.startsWith(out === sep ? sep : out + sep)) {
    refuse("output-is-input", folder, `${folder} holds the collection ${collection}`);
  }
  if (["sources", "schemas"].some((part) => out === join(input, part) || out.startsWith(join(input, part) + sep))) {
    refuse("output-is-input", folder, `${folder} is part of the collection`);
  }
}

/** Refuses a folder that holds somebody's files. */
function checkIsOurs(folder: string): void {
  if (!existsSync(folder)) return;
  if (!statSync(folder).isDirectory()) refuse("output-not-ours", folder, `${folder} is a file`);
  const names = readdirSync(folder);
  if (names.length > 0 && !hasOurSummary(folder)) {
    refuse("output-not-ours", folder, `${folder} holds ${names.length} entries and no summary.json of ours`);
  }
  // A published edition is never replaced, not even by working tables.
  if (names.includes("edition.json")) refuse("edition-exists", folder, `${folder} holds a published edition`);
}

/** True if the folder holds a summary.json written by this program. */
function hasOurSummary(folder: string): boolean {
  try {
    const summary = JSON.parse(readFileSync(join(folder, "summary.json"), "utf8")) as Record<string, unknown>;
    return (
      typeof summary.format === "number" && typeof summary.program_version === "string" && Array.isArray(summary.files)
    );
  } catch {
    return false;
  }
}

/**
 * Opens an output folder for working tables. Files go to a temporary sibling; `commit` swaps it in by renaming, so that a
 * reader sees the old tables or the new ones and never a mixture. A swap that was interrupted is repaired first. One
 * process at a time writes a folder; a second one is refused.
 * @throws OutputError if the place is the collection, holds other files or an edition, is in use, or cannot be written
 */
export function openOutputFolder(path: string, collection: string): OutputFolder {
  return openFolder(path, collection, checkIsOurs);
}

/**
 * Opens the folder of a new edition, DIR/E. It appears in one renaming and is never overwritten.
 * @throws OutputError `edition-exists`, or as {@link openOutputFolder}
 */
export function openEditionFolder(path: string, collection: string): OutputFolder {
  return openFolder(path, collection, (folder) => {
    if (existsSync(folder)) refuse("edition-exists", path, `${path} exists`);
  });
}

function openFolder(path: string, collection: string, check: (folder: string) => void): OutputFolder {
  const guarded = <T>(action: () => T): T => {
    try {
      return action();
    } catch (error) {
      throw writeError(path, error);
    }
  };
  // A link in the path is followed, so that the folder it leads to is replaced and not the link.
  const folder = guarded(() => realPath(resolve(path)));
  const { fresh } = siblings(folder);
  const files = new Map<string, WrittenFile>();
  let lock: Lock | undefined;
  const close = () => {
    lock?.release();
    lock = undefined;
  };
  guarded(() => {
    checkIsNoInput(folder, collection);
    mkdirSync(dirname(folder), { recursive: true });
    lock = lockOf(folder, path);
    try {
      repairSwap(folder);
      check(folder);
      rmSync(fresh, { recursive: true, force: true });
      mkdirSync(fresh);
    } catch (error) {
      close();
      throw error;
    }
  });

  return {
    building: fresh,
    write: (name, text) => guarded(() => files.set(name, { path: name, ...writeWhole(join(fresh, name), text) })),
    files: () => [...files.values()].sort((a, b) => (a.path < b.path ? -1 : 1)),
    commit: () =>
      guarded(() => {
        swapIn(folder);
        close();
      }),
    discard: () => {
      if (lock !== undefined) rmSync(fresh, { recursive: true, force: true });
      close();
    },
  };
}

function lockOf(folder: string, shown: string): Lock {
  const taken = takeLock(siblings(folder).lock);
  if ("heldBy" in taken) refuse("in-use", shown, `${taken.heldBy} is writing this folder now`);
  return taken;
}

/** Puts the finished folder in its place; what stood there is put back where that fails, and removed where it works. */
function swapIn(folder: string): void {
  const { fresh, old } = siblings(folder);
  const replaces = existsSync(folder);
  if (replaces) renameSync(folder, old);
  try {
    renameSync(fresh, folder);
  } catch (error) {
    if (replaces) renameSync(old, folder);
    throw error;
  }
  flushFolder(dirname(folder));
  rmSync(old, { recursive: true, force: true });
}

/** After an interrupted swap the folder is missing and its old state stands beside it: puts it back. */
function repairSwap(folder: string): void {
  const { old } = siblings(folder);
  if (!existsSync(old)) return;
  if (existsSync(folder)) rmSync(old, { recursive: true, force: true });
  else renameSync(old, folder);
}

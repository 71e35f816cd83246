import { createHash } from "node:crypto";
import {
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  readdirSync,
  readFileSync,
  realpathSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
  writeSync,
} from "node:fs";
import { basename, dirname, join, resolve, sep } from "node:path";
import { type Problem, problem } from "../problems/catalogue.ts";
import type { WrittenFile } from "../records/generated/summary.ts";

/** Raised when an output folder cannot be used or written; `problem` says why and how to mend it. */
export class OutputError extends Error {
  readonly problem: Problem;
  constructor(found: Problem) {
    super(found.found);
    this.problem = found;
  }
}

/** Text is written in pieces of about this many characters. */
const PIECE = 1 << 16;

/** An output folder being built beside its final place. */
export interface OutputFolder {
  /** Writes one file, piece by piece, and remembers its SHA-256. */
  readonly write: (name: string, text: Iterable<string>) => void;
  /** Every file written so far with its size and SHA-256, in code-unit order of the paths. */
  readonly files: () => WrittenFile[];
  /** Puts the finished folder in its place; from here on readers see the new tables only. */
  readonly commit: () => void;
  /** Removes everything written; harmless after commit. */
  readonly discard: () => void;
}

/** The temporary siblings of an output folder: the one being written, and the one being replaced. */
const siblings = (folder: string) => {
  const beside = (suffix: string) => join(dirname(folder), `.${basename(folder)}.saltern-${suffix}`);
  return { fresh: beside("new"), old: beside("old") };
};

/** True if a process with this number runs on this machine. */
function isRunning(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === "EPERM";
  }
}

/** Turns a file-system error into a problem with a remedy. */
function writeError(folder: string, error: unknown): OutputError {
  if (error instanceof OutputError) return error;
  const { code, message } = error as NodeJS.ErrnoException;
  const kind = code === "ENOSPC" || code === "EDQUOT" ? "no-space" : "output-not-writable";
  return new OutputError(problem(kind, { file: folder }, { found: message }));
}

/** Real path of a folder that need not exist yet: that of its nearest existing parent, with the rest appended. */
function realPath(folder: string): string {
  return existsSync(folder) ? realpathSync(folder) : join(realPath(dirname(folder)), basename(folder));
}

/** Refuses a folder that is the collection, a parent of it, or holds somebody's files. */
function checkIsOurs(folder: string, collection: string): void {
  const [out, input] = [realPath(folder), realPath(collection)];
  if (input === out || input.startsWith(out === sep ? sep : out + sep)) {
    throw new OutputError(
      problem("output-is-input", { file: folder }, { found: `${folder} holds the collection ${collection}` }),
    );
  }
  if (["sources", "schemas"].some((part) => out === join(input, part) || out.startsWith(join(input, part) + sep))) {
    throw new OutputError(
      problem("output-is-input", { file: folder }, { found: `${folder} is part of the collection` }),
    );
  }
  if (!existsSync(folder)) return;
  if (!statSync(folder).isDirectory()) {
    throw new OutputError(problem("output-not-ours", { file: folder }, { found: `${folder} is a file` }));
  }
  const names = readdirSync(folder);
  if (names.length > 0 && !hasOurSummary(folder)) {
    throw new OutputError(
      problem(
        "output-not-ours",
        { file: folder },
        { found: `${folder} holds ${names.length} entries and no summary.json of ours` },
      ),
    );
  }
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
 * Opens an output folder. Files go to a temporary sibling; `commit` swaps it in by renaming, so that a reader sees the
 * old tables or the new ones and never a mixture. A swap that was interrupted is repaired first.
 * @throws OutputError if the place is the collection, holds other files, is in use, or cannot be written.
 */
export function openOutputFolder(path: string, collection: string): OutputFolder {
  const folder = resolve(path);
  const { fresh, old } = siblings(folder);
  const files = new Map<string, WrittenFile>();
  let open = false;
  const guarded = <T>(action: () => T): T => {
    try {
      return action();
    } catch (error) {
      throw writeError(path, error);
    }
  };
  guarded(() => {
    mkdirSync(dirname(folder), { recursive: true });
    repairSwap(folder);
    checkIsOurs(folder, collection);
    claim(fresh);
    open = true;
  });

  return {
    write: (name, text) => guarded(() => files.set(name, { path: name, ...writeWhole(join(fresh, name), text) })),
    files: () => [...files.values()].sort((a, b) => (a.path < b.path ? -1 : 1)),
    commit: () =>
      guarded(() => {
        rmSync(join(fresh, CLAIM));
        if (existsSync(folder)) renameSync(folder, old);
        renameSync(fresh, folder);
        open = false;
        rmSync(old, { recursive: true, force: true });
      }),
    discard: () => {
      if (open) rmSync(fresh, { recursive: true, force: true });
      open = false;
    },
  };
}

/** File that names the process which builds a folder. */
const CLAIM = ".building";

/** Creates the temporary folder; one left by a process that has ended is removed, one of a living process refused. */
function claim(fresh: string): void {
  if (existsSync(fresh)) {
    const holder = existsSync(join(fresh, CLAIM)) ? Number(readFileSync(join(fresh, CLAIM), "utf8")) : Number.NaN;
    if (Number.isInteger(holder) && holder !== process.pid && isRunning(holder)) {
      const found = `process ${holder} is writing this folder now`;
      throw new OutputError(
        problem(
          "output-not-writable",
          { file: fresh },
          { found, mend: "wait until it has ended, then run the command again" },
        ),
      );
    }
    rmSync(fresh, { recursive: true, force: true });
  }
  mkdirSync(fresh);
  writeFileSync(join(fresh, CLAIM), String(process.pid));
}

/** After an interrupted swap the folder is missing and its old state stands beside it: puts it back. */
export function repairSwap(folder: string): void {
  const { old } = siblings(resolve(folder));
  if (!existsSync(old)) return;
  if (existsSync(folder)) rmSync(old, { recursive: true, force: true });
  else renameSync(old, folder);
}

/** Writes one file in pieces, flushes it to disk, and returns its size in bytes and its SHA-256 in hexadecimal. */
function writeWhole(file: string, text: Iterable<string>): { bytes: number; sha256: string } {
  mkdirSync(dirname(file), { recursive: true });
  const hash = createHash("sha256");
  const descriptor = openSync(file, "wx");
  let size = 0;
  try {
    let piece = "";
    const flush = () => {
      const bytes = Buffer.from(piece, "utf8");
      for (let done = 0; done < bytes.length; ) done += writeSync(descriptor, bytes, done);
      hash.update(bytes);
      size += bytes.length;
      piece = "";
    };
    for (const part of text) {
      piece += part;
      if (piece.length >= PIECE) flush();
    }
    flush();
    fsyncSync(descriptor);
  } finally {
    closeSync(descriptor);
  }
  return { bytes: size, sha256: hash.digest("hex") };
}

import {
  closeSync,
  existsSync,
  fstatSync,
  fsyncSync,
  ftruncateSync,
  openSync,
  readFileSync,
  renameSync,
  rmSync,
} from "node:fs";
import { join } from "node:path";
import { problem } from "../problems/catalogue.ts";
import { RULINGS_COLUMNS } from "../records/generated/rulings.ts";
import { csvRecord } from "./csv.ts";
import { takeLock } from "./lock.ts";
import { OutputError, writeError } from "./output-folder.ts";
import { flushFolder, writeAll, writeWhole } from "./write-file.ts";

/** A ruling as text, by column; its name is given by the file. */
export type NewRuling = Readonly<Partial<Record<Exclude<(typeof RULINGS_COLUMNS)[number], "ruling_id">, string>>>;

/** How long a second command waits for the first: so many times so many milliseconds. */
const TRIES = 200;
const PAUSE_MS = 50;

/** How an existing rulings.csv is written; a line appended is written in the same way. */
interface FileStyle {
  readonly columns: readonly string[];
  readonly delimiter: string;
  readonly lineEnd: string;
}

const OWN_STYLE: FileStyle = { columns: RULINGS_COLUMNS, delimiter: ",", lineEnd: "\n" };

/**
 * Appends a ruling to rulings.csv of a collection, under a lock, in one write that is taken back where it fails half-way.
 * What stands in the file is not touched; its delimiter, line ends and order of columns are kept. A file that does not
 * exist appears as a whole.
 *
 * @returns the name given to the ruling: the next free number
 * @throws OutputError where the file cannot be written, is no text in UTF-8, or another process holds it for ten seconds
 */
export function appendRuling(collection: string, ruling: NewRuling): string {
  const file = join(collection, "rulings.csv");
  try {
    return underLock(collection, () => {
      if (!existsSync(file)) return createWith(collection, file, ruling);
      const bytes = readFileSync(file);
      const text = bytes.toString("utf8").replace(/^\ufeff/, "");
      const style = styleOf(text);
      const id = nextId(text);
      const gap = bytes.length === 0 || bytes.at(-1) === 10 || bytes.at(-1) === 13 ? "" : style.lineEnd;
      append(file, Buffer.from(gap + line({ ...ruling, ruling_id: id }, style), "utf8"));
      return id;
    });
  } catch (error) {
    throw writeError(file, error);
  }
}

function underLock<T>(collection: string, action: () => T): T {
  const path = join(collection, ".rulings.csv.saltern-lock");
  const pause = new Int32Array(new SharedArrayBuffer(4));
  for (let attempt = 1; ; attempt++) {
    const lock = takeLock(path);
    if (!("heldBy" in lock)) {
      try {
        return action();
      } finally {
        lock.release();
      }
    }
    if (attempt === TRIES) {
      const found = `${lock.heldBy} is writing rulings.csv`;
      throw new OutputError(problem("in-use", { file: join(collection, "rulings.csv") }, { found }));
    }
    Atomics.wait(pause, 0, 0, PAUSE_MS);
  }
}

function createWith(collection: string, file: string, ruling: NewRuling): string {
  const id = nextId("");
  const fresh = join(collection, ".rulings.csv.saltern-new");
  rmSync(fresh, { force: true });
  try {
    writeWhole(fresh, [csvRecord(RULINGS_COLUMNS), line({ ...ruling, ruling_id: id }, OWN_STYLE)]);
    renameSync(fresh, file);
  } catch (error) {
    rmSync(fresh, { force: true });
    throw error;
  }
  flushFolder(collection);
  return id;
}

/** Appends bytes and flushes them; what was written of them is cut off again where not all can be. */
function append(file: string, bytes: Buffer): void {
  const descriptor = openSync(file, "a");
  const { size } = fstatSync(descriptor);
  try {
    writeAll(descriptor, bytes);
    fsyncSync(descriptor);
  } catch (error) {
    ftruncateSync(descriptor, size);
    throw error;
  } finally {
    closeSync(descriptor);
  }
}

/** Delimiter, line end and columns of a file, from its first line. @throws OutputError where that is no header of rulings */
function styleOf(text: string): FileStyle {
  const end = text.search(/\r\n|\n|\r/);
  const header = end < 0 ? text : text.slice(0, end);
  const lineEnd = end < 0 ? "\n" : (/^\r\n|^\n|^\r/.exec(text.slice(end))?.[0] ?? "\n");
  for (const delimiter of [",", ";", "\t", "|"]) {
    const columns = header.split(delimiter).map((cell) => cell.trim().replace(/^"(.*)"$/, "$1"));
    const needed = ["ruling_id", "target", "action", "fingerprint"];
    if (needed.every((name) => columns.includes(name))) return { columns, delimiter, lineEnd };
  }
  const details = { found: "its first line is no header of rulings", expected: RULINGS_COLUMNS.join(",") };
  throw new OutputError(problem("output-not-writable", { file: "rulings.csv", line: 1 }, details));
}

/** One record in the style of the file. */
function line(ruling: NewRuling & { readonly ruling_id: string }, { columns, delimiter, lineEnd }: FileStyle): string {
  const missing = Object.entries(ruling).find(
    ([name, text]) => text !== "" && text !== undefined && !columns.includes(name),
  );
  if (missing !== undefined) {
    const found = `rulings.csv has no column ${missing[0]}`;
    throw new OutputError(problem("output-not-writable", { file: "rulings.csv", line: 1 }, { found }));
  }
  const cells = columns.map((column) => {
    const text = (ruling as Readonly<Record<string, string | undefined>>)[column] ?? "";
    return text.includes(delimiter) || /["\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
  });
  return cells.join(delimiter) + lineEnd;
}

/** The next free name, R0001 and up: one more than the highest that stands anywhere in the file. */
function nextId(text: string): string {
  const numbers = [...text.matchAll(/\bR(\d{1,9})\b/g)].map(([, digits]) => Number(digits));
  const highest = numbers.reduce((most, n) => Math.max(most, n), 0);
  return `R${String(highest + 1).padStart(4, "0")}`;
}

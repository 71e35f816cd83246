import { closeSync, existsSync, openSync, readSync } from "node:fs";
import { join } from "node:path";
import { type Problem, problem } from "../problems/catalogue.ts";
import type { TableRow } from "../records/readings.ts";
import { readOwnTable } from "./own-tables.ts";

/** Bytes looked at for traces of a spreadsheet. */
const HEAD = 4096;

/** The rulings of a collection, and a notice where a spreadsheet has saved them again. */
export async function readRulings(
  dir: string,
): Promise<{ readonly rows: readonly TableRow[]; readonly notices: readonly Problem[] }> {
  const rows = await readOwnTable(dir, "rulings.csv");
  const file = join(dir, "rulings.csv");
  if (!existsSync(file)) return { rows, notices: [] };
  const traces = tracesOfSpreadsheet(headOf(file));
  if (traces.length === 0) return { rows, notices: [] };
  return { rows, notices: [problem("resaved-by-spreadsheet", { file: "rulings.csv" }, { found: traces.join(", ") })] };
}

function headOf(file: string): Buffer {
  const descriptor = openSync(file, "r");
  try {
    const head = Buffer.alloc(HEAD);
    return head.subarray(0, readSync(descriptor, head, 0, HEAD, 0));
  } finally {
    closeSync(descriptor);
  }
}

/** What in a file of ours must come from another program: we write commas, LF and no byte-order mark. */
function tracesOfSpreadsheet(head: Buffer): string[] {
  const mark = [
    [0xef, 0xbb, 0xbf],
    [0xff, 0xfe],
    [0xfe, 0xff],
  ].some((bytes) => head.subarray(0, bytes.length).equals(Buffer.from(bytes)));
  const header = head.toString("latin1").split("\n")[0] ?? "";
  return [
    ...(mark ? ["a byte-order mark"] : []),
    ...(header.includes(";") ? ["semicolons between the cells"] : []),
    ...(header.endsWith("\r") ? ["line ends CR LF"] : []),
  ];
}

import { spawn } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { afterAll, expect } from "vitest";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";

export const ROOT = fileURLToPath(new URL("../../", import.meta.url));

/** The command as it is built; `npm test` builds it before the tests run. */
export const COMMAND = join(ROOT, "build", "main.js");

/** What one run of the command left behind. */
export interface Run {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

interface Where {
  readonly cwd?: string;
  readonly env?: Readonly<Record<string, string>>;
  readonly uid?: number;
  readonly timeoutMs?: number;
}

/** Runs the built command with these arguments to its end; one that hangs is stopped and has no exit code. */
export function saltern(arguments_: readonly string[], where: Where = {}): Promise<Run> {
  return run(process.execPath, [COMMAND, ...arguments_], where);
}

/** Expects how a run ended; its messages are shown where it ended otherwise. */
export function ended({ code, stdout, stderr }: Run, expected: number): void {
  expect(code, `${stdout}\n${stderr}`).toBe(expected);
}

/** Runs any program to its end. */
export function run(program: string, arguments_: readonly string[], where: Where = {}): Promise<Run> {
  const { cwd = ROOT, env = {}, uid, timeoutMs = 60_000 } = where;
  return new Promise((resolve, reject) => {
    const child = spawn(program, arguments_, {
      cwd,
      env: { ...process.env, NO_COLOR: "1", ...env },
      timeout: timeoutMs,
      ...(uid === undefined ? {} : { uid, gid: uid }),
    });
    const text = { stdout: "", stderr: "" };
    for (const stream of ["stdout", "stderr"] as const) {
      child[stream].setEncoding("utf8").on("data", (piece: string) => {
        text[stream] += piece;
      });
    }
    child.on("error", reject);
    child.on("close", (code) => resolve({ code, ...text }));
    child.stdin.end();
  });
}

/** A folder that stays for all tests of a file and is removed after them. */
export function scratch(): string {
  const folder = mkdtempSync(join(tmpdir(), "saltern-commands-"));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

/** A copy of one of the project's collections, so that no test works in the real one. */
export function copyOf(collection: string, to: string): string {
  cpSync(join(ROOT, "datasets", collection), to, { recursive: true });
  return to;
}

/** Writes files below a folder; text as UTF-8, bytes as they are. */
export function writeFiles(folder: string, files: Readonly<Record<string, string | Uint8Array>>): void {
  for (const [name, content] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, name)), { recursive: true });
    writeFileSync(join(folder, name), content);
  }
}

/** A card for a table with the headings Compound, Solvent, T and S. */
export function cardFor(source: string, changes: Readonly<Record<string, unknown>> = {}): string {
  const card: SourceCard = {
    format: 1,
    source,
    file: `${source}.csv`,
    columns: {
      solute: { column: "Compound" },
      solvent: { column: "Solvent" },
      temperature: { column: "T", unit: "°C" },
      solubility: { column: "S", unit: "g/100 g solvent" },
    },
  };
  return JSON.stringify({ ...card, ...changes }, null, 2);
}

/** A written table: its columns, its records as text, and its rows by column. */
export interface Table {
  readonly columns: readonly string[];
  readonly records: readonly (readonly string[])[];
  readonly rows: readonly Readonly<Record<string, string>>[];
}

/** Reads a table that the command wrote. */
export function readTable(folder: string, name: string): Table {
  const lines = parse(readFileSync(join(folder, name), "utf8"), { record_delimiter: "\n" }) as string[][];
  const [columns = [], ...records] = lines;
  const rows = records.map((record) => Object.fromEntries(columns.map((column, i) => [column, record[i] ?? ""])));
  return { columns, records, rows };
}

/** Reads a JSON file that the command wrote. */
export function readJson<T>(folder: string, name: string): T {
  return JSON.parse(readFileSync(join(folder, name), "utf8")) as T;
}

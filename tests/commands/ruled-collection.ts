import { readdirSync } from "node:fs";
import { compare as compareCommand } from "../../pipeline/commands/compare.ts";
import { type PublishOptions, publish as publishCommand } from "../../pipeline/commands/publish.ts";
import { rule as ruleCommand } from "../../pipeline/commands/rule.ts";
import type { CommonOptions, Terminal } from "../../pipeline/commands/terminal.ts";
import { formatProblem } from "../../pipeline/problems/catalogue.ts";
import { InputError } from "../../pipeline/problems/input-error.ts";
import { OutputError } from "../../pipeline/publish/output-folder.ts";
import { cardFor, type Run, writeFiles } from "./saltern.ts";

/** Invented solubilities of salicylic acid in ethanol, g/100 g solvent, near a van 't Hoff line. */
const SERIES = [
  [10, 8.2],
  [20, 11.2],
  [30, 15.1],
  [40, 20.0],
  [50, 26.0],
  [60, 33.4],
] as const;

export const FLAG = "off-curve@alpha:4";

/** A collection of three sources that agree but for line 4 of alpha, which is ten times too large. */
export function writeCollection(folder: string): string {
  const names = ["alpha", "beta", "gamma"];
  const table = (factor: number, fault: number) => {
    const lines = SERIES.map(([t, s], i) => {
      const value = s * factor * (1 + 0.004 * (((i * 7) % 5) - 2)) * (i === fault ? 10 : 1);
      return `salicylic acid,ethanol,${t},${value.toFixed(3)}`;
    });
    return `Compound,Solvent,T,S\n${lines.join("\n")}\n`;
  };
  writeFiles(folder, {
    "collection.json": '{ "format": 1, "name": "small", "steward": "data steward" }',
    ...Object.fromEntries(
      names.flatMap((name, i) => [
        [`sources/${name}.source.json`, cardFor(name, { laboratory: name, date: `2026-0${i + 1}-15` })],
        [`sources/${name}.csv`, table(1 + 0.01 * ((i % 3) - 1), i === 0 ? 2 : -1)],
      ]),
    ),
  });
  return folder;
}

/** Runs a command in this process, with what main.ts makes of its result: exit code, output, messages. */
export async function here(command: (terminal: Terminal) => Promise<number>): Promise<Run> {
  const text = { stdout: "", stderr: "" };
  const cleanUps: (() => void)[] = [];
  const terminal: Terminal = {
    print: (line) => {
      text.stdout += `${line}\n`;
    },
    tell: (line) => {
      text.stderr += `${line}\n`;
    },
    progress: () => {},
    onInterrupt: (cleanUp) => cleanUps.push(cleanUp),
  };
  try {
    return { code: await command(terminal), ...text };
  } catch (error) {
    if (!(error instanceof OutputError || error instanceof InputError)) throw error;
    text.stderr += formatProblem(error.problem);
    return { code: error instanceof OutputError ? 3 : 2, ...text };
  } finally {
    for (const cleanUp of cleanUps) cleanUp();
  }
}

/** Rules on a target of a collection, with a name, a reason and a date; what is undefined is left out. */
export function rule(
  folder: string,
  target: string | undefined,
  action: string | undefined,
  more: Readonly<Record<string, string | boolean | undefined>> = {},
): Promise<Run> {
  const all = { by: "data steward", reason: "looked at", date: "2026-04-01", target, action, ...more };
  const given = Object.fromEntries(Object.entries(all).filter(([, value]) => value !== undefined));
  return here((terminal) => ruleCommand(folder, { ...given, version: "0.1.0" }, terminal));
}

/** Publishes a collection as DIR/NAME without the report. */
export function publish(
  folder: string,
  edition: string,
  out: string,
  more: Readonly<Partial<PublishOptions>> = {},
): Promise<Run> {
  const options = { edition, out, report: false, version: "0.1.0", ...more };
  return here((terminal) => publishCommand(folder, options, terminal));
}

/** Compares two editions. */
export function compare(old: string, now: string, options: CommonOptions = {}): Promise<Run> {
  return here((terminal) => compareCommand(old, now, options, terminal));
}

/** Names that begin with a point: temporary folders and locks. */
export const hidden = (folder: string) => readdirSync(folder).filter((name) => name.startsWith("."));

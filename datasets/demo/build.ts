/**
 * Writes the demo collection: invented readings from a seeded generator, so that every file is the same on each run and
 * what was planted is known. Run with `npx tsx datasets/demo/build.ts`.
 */
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { chromatography, clearPoints, gravimetry } from "./harbour-laboratories.ts";
import { formulationNotes, northWorks, report, titration } from "./other-sites.ts";
import { notebook, salts } from "./salts.ts";
import { kiloLaboratory, solventScreen } from "./solvent-mixtures.ts";
import { cardText, lineOfRow, type SourceFile, tableText } from "./source-file.ts";

interface Planted {
  readonly source: string;
  readonly line: number;
  readonly about: string;
  readonly cause: string;
  readonly done: string;
  readonly truth: string;
}

const START = "<!-- planted mistakes: written by build.ts -->";
const END = "<!-- end of planted mistakes -->";

function folder(path: string): URL {
  return new URL(path, import.meta.url);
}

function plantedIn(file: SourceFile): Planted[] {
  return file.rows.flatMap(({ mistake, about }, index) =>
    mistake ? [{ source: file.card.source, line: lineOfRow(file, index), about, ...mistake }] : [],
  );
}

function plantedTable(planted: readonly Planted[]): string {
  const record = (cells: readonly (string | number)[]) =>
    cells.map((cell) => (/[",]/.test(String(cell)) ? `"${String(cell).replaceAll('"', '""')}"` : cell)).join(",");
  const lines = planted.map((p) => record([p.source, p.line, p.about, p.cause, p.done, p.truth]));
  return `${["source,line,about,cause,done,truth", ...lines].join("\n")}\n`;
}

/** One item of the README's list for each run of neighbouring rows that share a mistake. */
function plantedList(planted: readonly Planted[]): string {
  const runs: Planted[][] = [];
  for (const entry of planted) {
    const run = runs.at(-1);
    const last = run?.at(-1);
    const continues = last?.source === entry.source && last.done === entry.done && last.line + 1 === entry.line;
    if (run && continues) run.push(entry);
    else runs.push([entry]);
  }
  const items = runs.map((run, index) => {
    const [first, last] = [run[0], run.at(-1)];
    const lines = first?.line === last?.line ? `line ${first?.line}` : `lines ${first?.line} to ${last?.line}`;
    const where = first?.about === last?.about ? first?.about : `${first?.about} … ${last?.about}`;
    const truths = [...new Set(run.map((entry) => entry.truth))].join("; ");
    return `${index + 1}. ${first?.source}, ${lines} (${where}): **${first?.cause}**; ${first?.done}; true: ${truths}.`;
  });
  return items.join("\n");
}

function build(): void {
  const files = [
    ...[gravimetry(), chromatography(), clearPoints(), report(), titration(), northWorks(), formulationNotes()],
    ...[salts(), notebook(), kiloLaboratory(), solventScreen()],
  ];
  mkdirSync(folder("sources/"), { recursive: true });
  for (const file of files) {
    writeFileSync(folder(`sources/${file.card.file}`), tableText(file));
    writeFileSync(folder(`sources/${file.card.source}.source.json`), cardText(file.card));
  }
  const planted = files.flatMap(plantedIn);
  writeFileSync(folder("planted-mistakes.csv"), plantedTable(planted));
  const readme = readFileSync(folder("README.md"), "utf8");
  const [before, rest = ""] = readme.split(START);
  const after = rest.split(END)[1] ?? "\n";
  writeFileSync(folder("README.md"), `${before}${START}\n\n${plantedList(planted)}\n\n${END}${after}`);
  const readings = files.reduce((sum, file) => sum + file.rows.length, 0);
  console.log(`${files.length} sources, ${readings} rows, ${planted.length} rows with a planted mistake`);
}

build();

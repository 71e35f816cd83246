/**
 * Writes the handbook collection from the reference tables in ../shared (relative to the project). Its output is
 * committed, so this needs to run only when those tables change: `npx tsx datasets/handbook/build.ts`.
 */
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { type Entry, publishedEntries } from "./entries.ts";
import { ORIGINS, type Origin, type OriginCode } from "./origins.ts";

/** Fields that stand in a column where they vary within a source, in the card where they do not. */
const MOVABLE = ["solid_form", "solute_basis", "solvent", "reference", "doi"] as const;
const SOURCES_LIST = { start: "<!-- sources: written by build.ts -->", end: "<!-- end of sources -->" };

type Movable = (typeof MOVABLE)[number];

/** The one value that a field has throughout a source, or undefined where it varies. */
function onlyValue(entries: readonly Entry[], field: Movable | "unit"): string | undefined {
  const values = new Set(entries.map((entry) => entry[field]));
  return values.size === 1 ? entries[0]?.[field] : undefined;
}

function quoted(cell: string): string {
  return /[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}

function tableText(entries: readonly Entry[], columns: readonly (keyof Entry)[]): string {
  const lines = entries.map((entry) => columns.map((column) => quoted(entry[column])).join(","));
  return `${[columns.join(","), ...lines].join("\n")}\n`;
}

/** The columns of a source: what varies, the unit only where it does, and the two carried remarks. */
function columnsOf(entries: readonly Entry[]): (keyof Entry)[] {
  const varying = MOVABLE.filter((field) => onlyValue(entries, field) === undefined);
  const unit: (keyof Entry)[] = onlyValue(entries, "unit") === undefined ? ["unit"] : [];
  const remark: (keyof Entry)[] = entries.some((entry) => entry.remark !== "") ? ["remark"] : [];
  return ["solute", ...varying, "temperature", "value", ...unit, "obtained", ...remark];
}

function cardText(origin: Origin, entries: readonly Entry[], columns: readonly (keyof Entry)[]): string {
  const unit = onlyValue(entries, "unit");
  const fields = [
    `"solute": { "column": "solute" }`,
    ...MOVABLE.filter((field) => columns.includes(field)).map((field) => `"${field}": { "column": "${field}" }`),
    `"temperature": { "column": "temperature", "unit": "${entries[0]?.temperatureUnit}" }`,
    `"solubility": { "column": "value", ${unit === undefined ? `"unit_column": "unit"` : `"unit": "${unit}"`} }`,
  ];
  const constants = MOVABLE.filter((field) => field !== "doi" && field !== "reference")
    .map((field) => [field, onlyValue(entries, field) ?? ""] as const)
    .filter(([, value]) => value !== "")
    .map(([field, value]) => `"${field}": "${value}"`);
  const carried = columns.filter((column) => column === "obtained" || column === "remark");
  const properties: readonly (readonly [string, string])[] = [
    ["$schema", `"../../../schemas/source-card.schema.json"`],
    ["format", "1"],
    ["source", JSON.stringify(origin.source)],
    ["title", JSON.stringify(origin.title)],
    ["origin", JSON.stringify(origin.origin)],
    ["reported_by", JSON.stringify(origin.compiler)],
    ["laboratory", JSON.stringify(origin.compiler)],
    ["date", "null"],
    ["reference", JSON.stringify(origin.reference)],
    ["doi", JSON.stringify(origin.doi)],
    ["licence", JSON.stringify(origin.licence)],
    ["method", `"unspecified"`],
    ["file", JSON.stringify(`${origin.source}.csv`)],
    ["shape", `"long"`],
    ["columns", `{\n    ${fields.join(",\n    ")}\n  }`],
    ["constants", constants.length === 0 ? "{}" : `{ ${constants.join(", ")} }`],
    ["carry", JSON.stringify(carried).replaceAll(",", ", ")],
  ];
  return `{\n${properties.map(([key, value]) => `  "${key}": ${value}`).join(",\n")}\n}\n`;
}

function build(): void {
  const bySource = new Map<OriginCode, Entry[]>();
  for (const entry of publishedEntries()) {
    const entries = bySource.get(entry.origin);
    if (entries) entries.push(entry);
    else bySource.set(entry.origin, [entry]);
  }
  mkdirSync(new URL("sources/", import.meta.url), { recursive: true });
  const lines: string[] = [];
  for (const [code, entries] of bySource) {
    const origin = ORIGINS[code];
    const columns = columnsOf(entries);
    writeFileSync(new URL(`sources/${origin.source}.csv`, import.meta.url), tableText(entries, columns));
    writeFileSync(new URL(`sources/${origin.source}.source.json`, import.meta.url), cardText(origin, entries, columns));
    const solutes = new Set(entries.map((entry) => entry.solute)).size;
    const unit = onlyValue(entries, "unit") ?? "units as printed";
    lines.push(
      `- ${origin.source} (${entries.length} values, ${solutes === 1 ? "1 solute" : `${solutes} solutes`}, ${unit}): ${origin.reference}.`,
    );
  }
  const readme = new URL("README.md", import.meta.url);
  const [before = "", rest = ""] = readFileSync(readme, "utf8").split(SOURCES_LIST.start);
  const after = rest.split(SOURCES_LIST.end)[1] ?? "\n";
  writeFileSync(readme, `${before}${SOURCES_LIST.start}\n\n${lines.join("\n")}\n\n${SOURCES_LIST.end}${after}`);
  console.log(`${bySource.size} sources, ${[...bySource.values()].flat().length} values`);
}

build();

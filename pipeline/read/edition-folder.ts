import { createHash } from "node:crypto";
import { createReadStream, existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { EditionDocument } from "../records/generated/edition.ts";

/**
 * edition.json of a folder, and proof that every file is the one published: SHA-256 of each, none missing, none added.
 * @throws InputError `not-an-edition`, or `damaged-edition` with the file that differs
 */
export async function readEditionDocument(folder: string): Promise<EditionDocument> {
  const place: Place = { file: join(folder, "edition.json") };
  if (!existsSync(place.file)) {
    throw new InputError(problem("not-an-edition", { file: folder }, { found: `${folder} has no edition.json` }));
  }
  const text = readFileSync(place.file, "utf8");
  const document = parsed(text);
  if (!looksLikeEdition(document)) {
    throw new InputError(problem("damaged-edition", place, { found: "edition.json is not that of an edition" }));
  }
  const damage = (found: string, file: string) =>
    new InputError(problem("damaged-edition", { file: join(folder, file) }, { found }));
  if (text !== `${JSON.stringify(document, null, 2)}\n` || document.sha256 !== checksumOf(document)) {
    throw damage("edition.json is not as it was written", "edition.json");
  }
  const listed = new Set([...document.outputs.map(({ path }) => path), "edition.json"]);
  for (const path of filesBelow(folder)) {
    if (!listed.has(path)) throw damage(`${path} does not belong to the edition`, path);
  }
  for (const { path, bytes, sha256 } of document.outputs) {
    const file = join(folder, path);
    if (!existsSync(file)) throw damage(`${path} is missing`, path);
    if (statSync(file).size !== bytes) throw damage(`${path} has ${statSync(file).size} bytes, not ${bytes}`, path);
    if ((await sha256Of(file)) !== sha256) throw damage(`${path} has changed since it was published`, path);
  }
  return document;
}

/** The checksum an edition document carries: SHA-256 of its text with the checksum left empty. */
export function checksumOf(document: EditionDocument): string {
  const text = `${JSON.stringify({ ...document, sha256: "" }, null, 2)}\n`;
  return createHash("sha256").update(text, "utf8").digest("hex");
}

function parsed(text: string): EditionDocument | undefined {
  try {
    return JSON.parse(text) as EditionDocument;
  } catch {
    return undefined;
  }
}

function looksLikeEdition(value: EditionDocument | undefined): value is EditionDocument {
  const isText = (field: unknown) => typeof field === "string";
  return (
    typeof value === "object" &&
    value !== null &&
    value.format === 1 &&
    [value.edition, value.date, value.program_version, value.sha256].every(isText) &&
    Array.isArray(value.rulings) &&
    Array.isArray(value.inputs) &&
    Array.isArray(value.outputs) &&
    value.outputs.every(({ path }) => isText(path) && !path.split("/").includes(".."))
  );
}

function filesBelow(folder: string): string[] {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => !entry.isDirectory())
    .map((entry) => relative(folder, join(entry.parentPath, entry.name)).replaceAll(sep, "/"))
    .sort();
}

async function sha256Of(file: string): Promise<string> {
  if (statSync(file).size < 1 << 20) return createHash("sha256").update(readFileSync(file)).digest("hex");
  const hash = createHash("sha256");
  for await (const piece of createReadStream(file)) hash.update(piece as Buffer);
  return hash.digest("hex");
}

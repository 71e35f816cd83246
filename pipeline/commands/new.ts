import { cpSync, existsSync, mkdirSync, readdirSync, statSync, writeFileSync } from "node:fs";
import { basename, join } from "node:path";
import { fileURLToPath } from "node:url";
import { problem } from "../problems/catalogue.ts";
import { OutputError } from "../publish/output-folder.ts";
import { slug } from "../records/readable-ids.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

const starter = fileURLToPath(new URL("../../datasets/starter/", import.meta.url));
const schemas = fileURLToPath(new URL("../../schemas/", import.meta.url));

/** `saltern new DIR`: starts a collection with a worked example and a copy of the schemas. Never writes into a folder in use. */
export async function newCollection(dir: string, options: CommonOptions, terminal: Terminal): Promise<ExitCode> {
  if (existsSync(dir) && !(statSync(dir).isDirectory() && readdirSync(dir).length === 0)) {
    throw new OutputError(
      problem("output-not-ours", { file: dir }, { found: `${dir} exists and is not an empty folder` }),
    );
  }
  try {
    writeStarter(dir);
  } catch (error) {
    throw new OutputError(problem("output-not-writable", { file: dir }, { found: (error as Error).message }));
  }
  if (options.json) terminal.print(JSON.stringify({ format: 1, collection: dir }));
  else {
    terminal.print(`A collection with a worked example (invented data) stands in ${dir}.`);
    terminal.print(
      `Put your tables and their cards in ${join(dir, "sources")}, then: saltern merge ${dir} --out ${dir}-tables`,
    );
  }
  return Exit.done;
}

/** Copies the worked example and the schemas, and gives the collection the folder's name. */
function writeStarter(dir: string): void {
  mkdirSync(dir, { recursive: true });
  cpSync(starter, dir, { recursive: true });
  cpSync(schemas, join(dir, "schemas"), { recursive: true, filter: (path) => !path.endsWith(".ts") });
  const card = {
    $schema: "./schemas/collection.schema.json",
    format: 1,
    name: slug(basename(dir)) || "collection",
    title: "Worked example (invented data): replace it with your own",
    steward: "your role here",
  };
  writeFileSync(join(dir, "collection.json"), `${JSON.stringify(card, null, 2)}\n`);
}

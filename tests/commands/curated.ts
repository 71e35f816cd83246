import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { curate } from "../../pipeline/curate.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { type Edition, flagId } from "../../pipeline/records/edition.ts";
import type { Flag } from "../../pipeline/records/fits.ts";
import type { System } from "../../pipeline/records/systems.ts";
import type { Files } from "../read/temporary-collection.ts";

/** Writes files into a new folder, gives it to `use`, and removes it whatever happens. */
export async function inFolder<T>(files: Files, use: (folder: string) => Promise<T>): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), "saltern-curated-"));
  try {
    for (const [name, content] of Object.entries(files)) {
      mkdirSync(dirname(join(folder, name)), { recursive: true });
      writeFileSync(join(folder, name), content);
    }
    return await use(folder);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The edition of a collection made of these files, curated in this process. */
export function editionOf(files: Files): Promise<Edition> {
  return inFolder(
    { "collection.json": JSON.stringify({ format: 1, name: "test" }), ...files },
    async (folder) => (await curate(await readCollection(folder), "test")).edition,
  );
}

/** Flags whose code is one of these, by id, with scope, severity and evidence. */
export function flagsOf(edition: Edition, ...codes: readonly string[]): readonly (Flag & { readonly id: string })[] {
  return edition.flags
    .filter(({ code }) => codes.includes(code))
    .map((flag) => ({ ...flag, id: flagId(edition, flag) }));
}

/** The one system whose solid form is this. */
export function systemOfForm({ systems }: Edition, form: string): System {
  const found = systems.filter(({ identity }) => identity.solidForm === form);
  if (found.length !== 1) throw new Error(`${found.length} systems of ${form}`);
  return found[0] as System;
}

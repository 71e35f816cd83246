import { join } from "node:path";
import { curate } from "../curate.ts";
import { formatProblem, type ProblemCode, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { safeText } from "../problems/safe-text.ts";
import { changesMarkdown } from "../publish/changes-text.ts";
import { compareEditions } from "../publish/edition-changes.ts";
import { documentText, editionDocument, newestDate } from "../publish/edition-document.ts";
import { type OutputFolder, openEditionFolder } from "../publish/output-folder.ts";
import { countsOf, noticeOf } from "../publish/tables/summary.ts";
import { writeWorkingTables } from "../publish/working-tables.ts";
import { readCollection } from "../read/collection.ts";
import { readEditionDocument } from "../read/edition-folder.ts";
import { readEditionTables } from "../read/edition-tables.ts";
import { hashSmallInputs, inputFiles } from "../read/input-files.ts";
import { type Edition, flagId, needsRuling } from "../records/edition.ts";
import type { EditionTables } from "../records/edition-tables.ts";
import type { InputFile } from "../records/generated/edition.ts";
import type { FlagToSettle, PublishResult } from "../records/generated/publish-result.ts";
import { isoDate } from "../rule/ruling-text.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

export interface PublishOptions extends CommonOptions {
  readonly edition: string;
  readonly out: string;
  readonly since?: string;
  readonly date?: string;
  readonly report: boolean;
  readonly version: string;
}

function stop(argument: string, code: ProblemCode, found: string, expected?: string): never {
  const details = expected === undefined ? { found } : { found, expected };
  throw new InputError(problem(code, { file: `saltern publish, ${argument}` }, details));
}

/** `saltern publish COLLECTION --edition E --out DIR`: writes the edition DIR/E, or says which flags hold it back. */
export async function publish(dir: string, options: PublishOptions, terminal: Terminal): Promise<ExitCode> {
  checkArguments(options);
  const place = join(options.out, options.edition);
  const folder = openEditionFolder(place, dir);
  terminal.onInterrupt(folder.discard);
  const old = options.since === undefined ? undefined : await readOld(options.since);
  terminal.progress("read");
  const before = hashSmallInputs(dir);
  const collection = await readCollection(dir);
  const { edition } = await curate(collection, options.version, terminal.progress);
  const inputs = inputFiles(dir, before, edition.sources);
  const date =
    options.date ?? newestDate(edition) ?? stop("--date", "no-date", "no source card and no ruling has a date");
  const toSettle = flagsToSettle(edition, dir);
  const held = toSettle.length > 0;
  if (!held) {
    terminal.progress("write");
    await writeEdition(edition, folder, { ...options, date, inputs, old });
  }
  for (const notice of edition.notices) terminal.tell(`notice: ${formatProblem(notice)}`);
  const result: PublishResult = {
    format: 1,
    collection: edition.collection.name,
    edition: options.edition,
    published: !held,
    output: place,
    date,
    counts: countsOf(edition),
    to_settle: toSettle,
    notices: edition.notices.map(noticeOf),
  };
  if (options.json) terminal.print(JSON.stringify(result));
  else for (const line of account(result)) terminal.print(line);
  return held || result.counts.refused > 0 ? Exit.needsYou : Exit.done;
}

function checkArguments({ edition, date }: PublishOptions): void {
  if (!/^[A-Za-z0-9][A-Za-z0-9._-]{0,63}$/.test(edition)) {
    stop("--edition", "bad-argument", `"${edition}" cannot be the name of a folder`, NAME);
  }
  const read = date === undefined ? undefined : isoDate(date);
  if (date !== undefined && (read === undefined || read.text !== date)) {
    stop("--date", "bad-argument", `"${date}" is not a date`, "a date written YYYY-MM-DD");
  }
}

const NAME = "1 to 64 letters, digits, points, hyphens and underscores, such as 2026-1";

async function readOld(folder: string): Promise<EditionTables> {
  return readEditionTables(folder, await readEditionDocument(folder));
}

interface Published extends PublishOptions {
  readonly date: string;
  readonly inputs: readonly InputFile[];
  readonly old: EditionTables | undefined;
}

/** Tables and report, CHANGES.md where an earlier edition is named, and last edition.json with the checksums of all. */
async function writeEdition(edition: Edition, folder: OutputFolder, options: Published): Promise<void> {
  const { old, date, inputs } = options;
  const since = old && { edition: old.document.edition, sha256: old.document.sha256 };
  const name = { edition: options.edition, date, ...(since === undefined ? {} : { since }) };
  writeWorkingTables(edition, folder, options.report);
  if (old !== undefined) {
    // Read back from the files, so that CHANGES.md says what compare will say of the two folders.
    const now = await readEditionTables(folder.building, editionDocument(edition, name, inputs, folder.files()));
    folder.write("CHANGES.md", changesMarkdown(compareEditions(old, now)));
  }
  folder.write("edition.json", [documentText(editionDocument(edition, name, inputs, folder.files()))]);
  folder.commit();
}

/** A word as a shell takes it literally. */
function quoted(word: string): string {
  return /^[\w@:./-]+$/.test(word) ? word : `'${word.replaceAll("'", "'\\''")}'`;
}

function flagsToSettle(edition: Edition, dir: string): FlagToSettle[] {
  return edition.flags
    .filter((_, i) => needsRuling(edition, i))
    .map((flag) => {
      const id = flagId(edition, flag);
      const command = `saltern rule ${quoted(dir)} ${quoted(id)} ACTION --by NAME --reason WHY`;
      return { flag_id: id, evidence: flag.evidence, command };
    });
}

function account({ edition, output, published, date, counts, to_settle }: PublishResult): string[] {
  if (published) {
    const refused = counts.refused > 0 ? `; ${counts.refused} readings are refused and not in it, see refused.csv` : "";
    return [
      `edition ${edition} of ${date} published: ${counts.systems} systems, ${counts.curves} curves, ` +
        `${counts.kept} measurements kept, ${counts.set_aside} set aside${refused}`,
      `open ${join(output, "edition.json")}`,
    ];
  }
  const many = to_settle.length === 1 ? "1 blocking flag has" : `${to_settle.length} blocking flags have`;
  return [
    `edition ${edition} is held back: ${many} no ruling. Each is settled by its command, with ACTION one of`,
    `keep, "set aside", correct (with --corrected-value or --corrected-unit, and --evidence), ask:`,
    ...to_settle.flatMap(({ evidence, command }) => ["", safeText(evidence, 400), `  ${safeText(command, 1000)}`]),
  ];
}

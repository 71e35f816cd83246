import { changeSections, changesTitle, NO_CHANGES } from "../publish/changes-text.ts";
import { compareEditions } from "../publish/edition-changes.ts";
import { readEditionDocument } from "../read/edition-folder.ts";
import { readEditionTables } from "../read/edition-tables.ts";
import type { CompareResult } from "../records/generated/compare-result.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

/** `saltern compare OLD NEW`: proves that both editions are as published, then says what changed between them. */
export async function compare(old: string, now: string, options: CommonOptions, terminal: Terminal): Promise<ExitCode> {
  const [before, after] = [await read(old), await read(now)];
  const result = compareEditions(before, after);
  if (options.json) terminal.print(JSON.stringify(result));
  else for (const line of lines(result)) terminal.print(line);
  return result.different ? Exit.needsYou : Exit.done;
}

async function read(folder: string) {
  return readEditionTables(folder, await readEditionDocument(folder));
}

function lines(result: CompareResult): string[] {
  const sections = changeSections(result);
  const files = result.files_different;
  return [
    changesTitle(result),
    ...sections.flatMap(({ heading, lines }) => ["", heading, ...lines.map((line) => `  ${line}`)]),
    ...(sections.length === 0 ? ["", NO_CHANGES] : []),
    "",
    files.length === 0
      ? "The tables are the same, byte for byte."
      : `${files.length} ${files.length === 1 ? "file differs" : "files differ"}: ${files.slice(0, 12).join(", ")}${files.length > 12 ? " ..." : ""}`,
  ];
}

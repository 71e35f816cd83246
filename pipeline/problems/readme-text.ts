import { cellKinds } from "./cell-kinds.ts";
import { commandKinds } from "./command-kinds.ts";
import { fileKinds } from "./file-kinds.ts";
import { identityKinds } from "./identity-kinds.ts";
import type { Kind, Stops } from "./kind.ts";
import { rulingKinds } from "./ruling-kinds.ts";

const CONSEQUENCE: Readonly<Record<Stops, string>> = {
  reading: "the reading is refused",
  source: "the whole source is refused",
  command: "the command stops",
  nothing: "a notice: nothing is refused",
};

/** One part of the catalogue as Markdown: a heading, then an entry a problem in order of its code. */
function part(title: string, kinds: Readonly<Record<string, Kind>>): string {
  const codes = Object.keys(kinds).sort();
  const entries = codes.map((code) => {
    const { stops, meaning, expected, mend } = kinds[code] as Kind;
    return `### \`${code}\`\n\n${meaning}\n\n- Consequence: ${CONSEQUENCE[stops]}.\n- Expected: ${expected}.\n- To mend: ${mend}.\n`;
  });
  return `## ${title}\n\n${entries.join("\n")}`;
}

/** The whole catalogue of problems as the text of README.md. */
export function catalogueAsMarkdown(): string {
  const intro = `# What can be wrong with an input

Generated from the catalogue in this folder by \`npx tsx pipeline/problems/write-readme.ts\`: change the catalogue, not
this page. Every problem tells its place (file, line, column), what was found, what was expected and how to mend it;
the code in brackets is stable. Where a message is more precise than the general text below, the message holds.
`;
  return [
    intro,
    part("Files and their structure", fileKinds),
    part("Cells and what they say together", cellKinds),
    part("Which substance and which solid", identityKinds),
    part("Rulings", rulingKinds),
    part("Commands and their output", commandKinds),
  ].join("\n");
}

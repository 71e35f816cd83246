import { safeText } from "../../problems/safe-text.ts";

/** Text that is already safe HTML. Only {@link html} and {@link raw} make it. */
export interface Html {
  readonly html: string;
}

/** Longest text shown whole anywhere on a page; cells and headings have tighter bounds of their own. */
const LONGEST = 1000;

const ENTITIES: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
  // As an entity, so that a page without foreign names is stored in one byte a character: half the memory to move.
  "−": "&minus;",
};

/** Printable ASCII without markup: nearly every text, passed on as it is. */
const PLAIN = /^[ !#-%(-;=?-~°±×·]*$/;

/** Text with markup, control and bidirectional characters made harmless; a text over `longest` is cut and says so. */
export function escapeText(text: string, longest = LONGEST): string {
  if (text.length <= longest && PLAIN.test(text)) return text;
  return safeText(text, longest).replace(/[&<>"'−]/g, (c) => ENTITIES[c] as string);
}

/** Text from data, cut to `longest` characters with its whole length told. */
export function short(text: string, longest: number): Html {
  return { html: escapeText(text, longest) };
}

/** Marks a text as HTML without escaping it: for markup made by this program only. */
export function raw(markup: string): Html {
  return { html: markup };
}

type Part = string | number | undefined | Html | readonly Html[];

/** Adds a value to the pieces of a text, escaped unless it is markup already. */
function add(pieces: string[], part: Part): void {
  if (part === undefined) return;
  if (typeof part === "string") pieces.push(escapeText(part));
  else if (typeof part === "number") pieces.push(String(part));
  else if ("html" in part) pieces.push(part.html);
  else for (const piece of part) pieces.push(piece.html);
}

/** Template tag: every value is escaped unless it is {@link Html} itself. */
export function html(strings: TemplateStringsArray, ...parts: readonly Part[]): Html {
  const pieces: string[] = [];
  for (let i = 0; i < strings.length; i++) {
    pieces.push(strings[i] as string);
    add(pieces, parts[i]);
  }
  return { html: pieces.join("") };
}

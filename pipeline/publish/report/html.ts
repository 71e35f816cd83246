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
};

/** Printable ASCII without markup: nearly every text, passed on as it is. */
const PLAIN = /^[ !#-%(-;=?-~°±−×·–]*$/;

/** Text with markup, control and bidirectional characters made harmless; a text over `longest` is cut and says so. */
export function escapeText(text: string, longest = LONGEST): string {
  if (text.length <= longest && PLAIN.test(text)) return text;
  return safeText(text, longest).replace(/[&<>"']/g, (c) => ENTITIES[c] as string);
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

const render = (part: Part): string => {
  if (part === undefined) return "";
  if (typeof part === "string") return escapeText(part);
  if (typeof part === "number") return String(part);
  return "html" in part ? part.html : part.map((piece) => piece.html).join("");
};

/** Template tag: every value is escaped unless it is {@link Html} itself. */
export function html(strings: TemplateStringsArray, ...parts: readonly Part[]): Html {
  let out = strings[0] ?? "";
  parts.forEach((part, i) => {
    out += render(part) + (strings[i + 1] ?? "");
  });
  return { html: out };
}

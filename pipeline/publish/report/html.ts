/** Text that is already safe HTML. Only {@link html} and {@link raw} make it. */
export interface Html {
  readonly html: string;
}

const ENTITIES: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** Control, escape and bidirectional characters, shown as a code instead of being sent to a browser. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: these are the characters to find
const UNSAFE = /[\u0000-\u0008\u000b-\u001f\u007f-\u009f\u200e\u200f\u202a-\u202e\u2066-\u2069\ufeff]/g;

/** Text with markup and control characters made harmless. */
export function escapeText(text: string): string {
  const visible = text.replace(UNSAFE, (c) => `\\u${(c.codePointAt(0) as number).toString(16).padStart(4, "0")}`);
  return visible.replace(/[&<>"']/g, (c) => ENTITIES[c] as string);
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

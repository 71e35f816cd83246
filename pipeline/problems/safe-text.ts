/** Control and format characters, line separators, unpaired surrogates, private and unassigned code points. */
const UNSAFE = /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}\p{Co}\p{Cn}]/gu;

const SHORT: Readonly<Record<string, string>> = { "\n": "\\n", "\r": "\\r", "\t": "\\t", "\0": "\\0" };

/** One unsafe character as a visible escape: `\n`, `\x1b`, `\u{202e}`. */
function visible(character: string): string {
  const short = SHORT[character];
  if (short !== undefined) return short;
  const code = (character.codePointAt(0) ?? 0).toString(16);
  return code.length <= 2 ? `\\x${code.padStart(2, "0")}` : `\\u{${code}}`;
}

/**
 * Text from data made fit for a terminal or a page: control, escape and bidirectional characters become visible escapes,
 * and a long text is cut, with its whole length told.
 *
 * @param maxLength longest piece kept, in UTF-16 code units; the escapes and the note on the length come on top
 */
export function safeText(text: string, maxLength = 200): string {
  if (text.length <= maxLength) return text.replace(UNSAFE, visible);
  // A cut must not leave half of a character behind.
  const cut = (text.charCodeAt(maxLength - 1) & 0xfc00) === 0xd800 ? maxLength - 1 : maxLength;
  return `${text.slice(0, cut).replace(UNSAFE, visible)}… (${text.length} characters)`;
}

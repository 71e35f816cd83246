import { isUtf8 } from "node:buffer";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { countLines, type LineCount, startOfFile } from "./physical-lines.ts";

const LF = 10;

/** Byte-order marks and what they say. */
const MARKS = [
  { encoding: "utf-8", bytes: Buffer.from([0xef, 0xbb, 0xbf]) },
  { encoding: "utf-16le", bytes: Buffer.from([0xff, 0xfe]) },
  { encoding: "utf-16be", bytes: Buffer.from([0xfe, 0xff]) },
] as const;

/** What was learnt about a file while it was decoded. */
export interface Decoded {
  /** True if the file begins with a byte-order mark. */
  byteOrderMark: boolean;
  /** True if a line ends with CR LF. */
  crlf: boolean;
}

/**
 * The bytes of a text file as checked UTF-8 without byte-order mark. A byte-order mark beats the encoding asked for;
 * `auto` without one means strict UTF-8: nothing is guessed, because a wrong guess changes names without a trace.
 *
 * @param encoding `auto`, or a label of the Encoding Standard
 * @param learnt filled while the stream is read
 * @throws InputError, with the line: `bad-encoding`, `nul-byte`, or `oversized-cell` for an endless line
 */
export async function* asUtf8(
  bytes: AsyncIterable<Buffer>,
  encoding: string,
  place: Place,
  learnt: Decoded = { byteOrderMark: false, crlf: false },
): AsyncGenerator<Buffer> {
  const count = startOfFile();
  let decode: ((piece: Buffer | undefined) => Buffer) | undefined;
  for await (const piece of startsWhole(bytes)) {
    let body = piece;
    if (decode === undefined) {
      const mark = MARKS.find(({ bytes: mark }) => piece.subarray(0, mark.length).equals(mark));
      learnt.byteOrderMark = mark !== undefined;
      body = mark === undefined ? piece : piece.subarray(mark.bytes.length);
      decode = decoder(mark?.encoding ?? encoding, count, place);
    }
    const text = decode(body);
    checkNul(text, count, place);
    learnt.crlf ||= text.includes("\r\n");
    countLines(count, text, place);
    if (text.length > 0) yield text;
  }
  const rest = decode?.(undefined);
  if (rest !== undefined && rest.length > 0) yield rest;
}

/** The same bytes, with a first piece long enough to hold any byte-order mark. */
async function* startsWhole(bytes: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
  let first: Buffer | undefined = Buffer.alloc(0);
  for await (const piece of bytes) {
    if (first === undefined) yield piece;
    else {
      first = Buffer.concat([first, piece]);
      if (first.length < 3) continue;
      yield first;
      first = undefined;
    }
  }
  if (first !== undefined && first.length > 0) yield first;
}

/** Decoder of one encoding; called with undefined at the end of the file. */
function decoder(encoding: string, count: LineCount, place: Place): (piece: Buffer | undefined) => Buffer {
  if (encoding === "auto" || encoding === "utf-8") return utf8Decoder(count, place);
  const text = new TextDecoder(encoding, { fatal: true });
  return (piece) => {
    if (piece === undefined) return Buffer.from(decodePart(text, undefined, count.line, encoding, place), "utf8");
    let decoded = "";
    let line = count.line;
    for (let from = 0; from < piece.length; ) {
      // Line by line, so that a fault is told with its line.
      const feed = piece.indexOf(LF, from);
      const to = feed === -1 ? piece.length : feed + 1;
      const part = decodePart(text, piece.subarray(from, to), line, encoding, place);
      if (part.includes("\n")) line++;
      decoded += part;
      from = to;
    }
    return Buffer.from(decoded, "utf8");
  };
}

/** Some bytes decoded. Always as a stream: the other way some versions of Node take windows-1252 for ISO 8859-1. */
function decodePart(
  decoder: InstanceType<typeof TextDecoder>,
  part: Buffer | undefined,
  line: number,
  encoding: string,
  place: Place,
): string {
  try {
    return part === undefined ? decoder.decode() : decoder.decode(part, { stream: true });
  } catch {
    throw new InputError(problem("bad-encoding", { ...place, line }, { found: `the bytes are not valid ${encoding}` }));
  }
}

/** Passes valid UTF-8 through; a character cut by the end of a piece waits for the next. */
function utf8Decoder(count: LineCount, place: Place): (piece: Buffer | undefined) => Buffer {
  let waiting: Buffer = Buffer.alloc(0);
  return (piece) => {
    const all = piece === undefined ? waiting : waiting.length === 0 ? piece : Buffer.concat([waiting, piece]);
    const whole = piece === undefined ? all.length : all.length - cutCharacter(all);
    waiting = all.subarray(whole);
    const text = all.subarray(0, whole);
    if (!isUtf8(text)) throw notUtf8(text, count, place);
    return text;
  };
}

/** Bytes of a UTF-8 character that the end of a piece cuts off, 0 to 3. */
function cutCharacter(piece: Buffer): number {
  for (let back = 1; back <= Math.min(3, piece.length); back++) {
    const byte = piece[piece.length - back] ?? 0;
    if (byte < 0x80) return 0;
    if (byte >= 0xc0) return (byte >= 0xf0 ? 4 : byte >= 0xe0 ? 3 : 2) > back ? back : 0;
  }
  return 0;
}

/** The refusal of a piece that is no UTF-8, with the line and what the line would be in the commonest other encoding. */
function notUtf8(text: Buffer, count: LineCount, place: Place): InputError {
  const at = { ...count };
  for (let from = 0; ; ) {
    const feed = text.indexOf(LF, from);
    const to = feed === -1 ? text.length : feed + 1;
    const line = text.subarray(from, to);
    if (!isUtf8(line) || to === text.length) {
      if (text.includes(0)) return nulByte(text, count, place);
      const guess = new TextDecoder("windows-1252").decode(line, { stream: true }).trim();
      const found = `the line is not valid UTF-8; read as windows-1252 it would be "${guess.slice(0, 200)}"`;
      return new InputError(problem("bad-encoding", { ...place, line: at.line }, { found }));
    }
    countLines(at, line, place);
    from = to;
  }
}

function checkNul(text: Buffer, count: LineCount, place: Place): void {
  if (text.includes(0)) throw nulByte(text, count, place);
}

/** The refusal of a piece with a NUL byte, with its line and the encoding that the pattern of NULs suggests. */
function nulByte(text: Buffer, count: LineCount, place: Place): InputError {
  const first = text.indexOf(0);
  const at = { ...count };
  countLines(at, text.subarray(0, first), place);
  const sample = text.subarray(0, 400);
  const nuls = (odd: number) => sample.filter((byte, i) => byte === 0 && i % 2 === odd).length;
  const [even, odd] = [nuls(0), nuls(1)];
  const wide = Math.max(even, odd) > sample.length / 4 ? (odd > even ? "utf-16le" : "utf-16be") : undefined;
  const found = wide === undefined ? "the line contains a NUL byte" : `every second byte is NUL, as in ${wide}`;
  const mend = wide === undefined ? undefined : `state "encoding": "${wide}" in the card, or save the table as UTF-8`;
  return new InputError(
    problem("nul-byte", { ...place, line: at.line }, { found, ...(mend === undefined ? {} : { mend }) }),
  );
}

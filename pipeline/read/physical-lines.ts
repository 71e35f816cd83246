import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";

/** Largest row accepted, bytes. No honest row comes near; a lost quote or a hostile file does. */
export const MAX_ROW_BYTES = 1 << 20;

const LF = 10;
const CR = 13;

/** How far a stream of bytes has come, counted in physical lines (ended by LF, CRLF or CR). */
export interface LineCount {
  /** 1-based number of the line that the next byte belongs to. */
  line: number;
  /** Bytes of that line seen so far. */
  bytes: number;
  /** True if the last byte was a CR, so that an LF next would belong to the same line end. */
  afterCr: boolean;
}

export function startOfFile(): LineCount {
  return { line: 1, bytes: 0, afterCr: false };
}

/**
 * Moves the count over a piece of a file.
 * @throws InputError `oversized-cell` as soon as one physical line is longer than {@link MAX_ROW_BYTES}
 */
export function countLines(count: LineCount, piece: Buffer, place: Place): void {
  let from = 0;
  const hasCr = piece.includes(CR);
  if (count.afterCr && piece.length > 0) {
    if (piece[0] === LF) from = 1;
    count.afterCr = false;
  }
  for (;;) {
    const end = hasCr ? lineEnd(piece, from) : piece.indexOf(LF, from);
    count.bytes += (end === -1 ? piece.length : end) - from;
    if (count.bytes > MAX_ROW_BYTES) {
      const found = `the line is longer than ${MAX_ROW_BYTES} bytes`;
      throw new InputError(problem("oversized-cell", { ...place, line: count.line }, { found }));
    }
    if (end === -1) return;
    count.line++;
    count.bytes = 0;
    from = end + 1;
    if (piece[end] !== CR) continue;
    if (from === piece.length) count.afterCr = true;
    else if (piece[from] === LF) from++;
  }
}

/** Position of the next LF or CR, -1 where there is none. */
function lineEnd(piece: Buffer, from: number): number {
  for (let i = from; i < piece.length; i++) if (piece[i] === LF || piece[i] === CR) return i;
  return -1;
}

/** Line breaks inside a text: LF, CRLF or CR. */
export function lineBreaks(text: string): number {
  let breaks = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === LF || (code === CR && text.charCodeAt(i + 1) !== LF)) breaks++;
  }
  return breaks;
}

/** Leaves out the first physical lines of a stream, whatever they hold. */
export async function* withoutLines(pieces: AsyncIterable<Buffer>, skip: number): AsyncGenerator<Buffer> {
  let left = skip;
  let afterCr = false;
  for await (const piece of pieces) {
    let from = afterCr && piece[0] === LF ? 1 : 0;
    afterCr = false;
    while (left > 0) {
      const end = lineEnd(piece, from);
      if (end === -1) break;
      left--;
      from = end + 1;
      if (piece[end] !== CR) continue;
      if (from === piece.length) afterCr = true;
      else if (piece[from] === LF) from++;
    }
    if (left === 0 && from < piece.length) yield piece.subarray(from);
  }
}

/** The beginning of a stream as text, and the whole stream. */
export async function peek(
  pieces: AsyncGenerator<Buffer>,
  bytes: number,
): Promise<{ head: string; pieces: AsyncGenerator<Buffer> }> {
  const first: Buffer[] = [];
  let seen = 0;
  while (seen < bytes) {
    const { value, done } = await pieces.next();
    if (done) break;
    first.push(value);
    seen += value.length;
  }
  const head = Buffer.concat(first).subarray(0, bytes).toString("utf8");
  async function* whole(): AsyncGenerator<Buffer> {
    yield* first;
    yield* pieces;
  }
  return { head, pieces: whole() };
}

/** Runs a step between two readings of a stream; if it throws, the stream is closed, and with it the file behind it. */
export async function orClose<T>(stream: AsyncGenerator<Buffer>, step: () => T): Promise<T> {
  try {
    return step();
  } catch (error) {
    await stream.return(undefined);
    throw error;
  }
}

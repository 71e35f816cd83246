import type { Hash } from "node:crypto";
import { createReadStream, statSync } from "node:fs";
import { Readable } from "node:stream";
import { createGunzip } from "node:zlib";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";

/** Bytes read at a time. */
const PIECE = 1 << 18;

/** Most bytes a compressed table may unfold to: a small file could otherwise fill the machine. */
const MOST_UNPACKED = 2 ** 31;

/**
 * The bytes of a table, unpacked where its name ends in `.gz`.
 * @param hash takes the bytes as they stand on disk
 * @throws InputError `missing-file`, or `unreadable-file` where the file cannot be opened, is damaged, or unfolds
 *   beyond all measure
 */
export async function* tableBytes(path: string, hash: Hash, place: Place): AsyncGenerator<Buffer> {
  const stored = storedBytes(path, hash);
  try {
    // A pipe or a device might never end.
    if (!statSync(path).isFile()) throw new RangeError(`${path} is not an ordinary file`);
    yield* path.endsWith(".gz") ? unpacked(stored) : stored;
  } catch (error) {
    if (!isFileError(error)) throw error;
    const code = error.code === "ENOENT" ? "missing-file" : "unreadable-file";
    throw new InputError(problem(code, place, { found: error.message }));
  }
}

function isFileError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof RangeError || (error instanceof Error && "code" in error && "errno" in error);
}

async function* storedBytes(path: string, hash: Hash): AsyncGenerator<Buffer> {
  for await (const piece of createReadStream(path, { highWaterMark: PIECE })) {
    hash.update(piece);
    yield piece;
  }
}

async function* unpacked(stored: AsyncIterable<Buffer>): AsyncGenerator<Buffer> {
  const input = Readable.from(stored);
  const gunzip = createGunzip({ chunkSize: PIECE });
  input.on("error", (error) => gunzip.destroy(error)).pipe(gunzip);
  let total = 0;
  for await (const piece of gunzip) {
    total += piece.length;
    if (total > MOST_UNPACKED) throw new RangeError(`the file unpacks to more than ${MOST_UNPACKED} bytes`);
    yield piece;
  }
}

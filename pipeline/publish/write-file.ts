import { createHash } from "node:crypto";
import { closeSync, fsyncSync, mkdirSync, openSync, writeSync } from "node:fs";
import { dirname } from "node:path";

/** Text is written in pieces of about this many characters. */
const PIECE = 1 << 16;

/** Writes all bytes at the descriptor's place: the system may take them in parts. */
export function writeAll(descriptor: number, bytes: Buffer): void {
  for (let done = 0; done < bytes.length; ) done += writeSync(descriptor, bytes, done);
}

/** Writes one new file in pieces, flushes it to disk, and returns its size in bytes and its SHA-256 in hexadecimal. */
export function writeWhole(file: string, text: Iterable<string>): { bytes: number; sha256: string } {
  mkdirSync(dirname(file), { recursive: true });
  const hash = createHash("sha256");
  const descriptor = openSync(file, "wx");
  let size = 0;
  try {
    let piece = "";
    const flush = () => {
      const bytes = Buffer.from(piece, "utf8");
      writeAll(descriptor, bytes);
      hash.update(bytes);
      size += bytes.length;
      piece = "";
    };
    for (const part of text) {
      piece += part;
      if (piece.length >= PIECE) flush();
    }
    flush();
    fsyncSync(descriptor);
  } finally {
    closeSync(descriptor);
  }
  return { bytes: size, sha256: hash.digest("hex") };
}

/** Flushes a folder's entries to disk, where the system can do that: after it a renaming survives a power cut. */
export function flushFolder(folder: string): void {
  let descriptor: number | undefined;
  try {
    descriptor = openSync(folder, "r");
    fsyncSync(descriptor);
  } catch {
    // Not every file system flushes folders; the renaming itself is done all the same.
  } finally {
    if (descriptor !== undefined) closeSync(descriptor);
  }
}

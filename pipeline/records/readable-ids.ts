import { createHash } from "node:crypto";

/** Longest readable part of an id; the hash behind it keeps ids apart. */
const SLUG_LENGTH = 60;

/**
 * ASCII slug of a text: lower case, every run of other characters one hyphen, at most 60 characters.
 * @example slug("Copper sulfate, pentahydrate") // "copper-sulfate-pentahydrate"
 */
export function slug(text: string): string {
  const plain = text
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replaceAll("α", "alpha")
    .replaceAll("β", "beta");
  return plain
    .replaceAll("γ", "gamma")
    .replace(/[^a-z0-9]+/g, "-")
    .slice(0, SLUG_LENGTH)
    .replace(/^-+|-+$/g, "");
}

/** Readable id: slug of the words + 8 hex digits of SHA-256 of the key. */
export function readableId(words: readonly string[], key: string): string {
  const hash = createHash("sha256").update(key, "utf8").digest("hex").slice(0, 8);
  return `${slug(words.filter((word) => word !== "").join(" "))}-${hash}`.replace(/^-/, "");
}

import { isUtf8 } from "node:buffer";
import { readFileSync, statSync } from "node:fs";
import { findNodeAtLocation, type Node, type ParseError, parseTree, printParseErrorCode } from "jsonc-parser";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";

/** Largest JSON file read, bytes: cards and settings are written by hand. */
const MAX_BYTES = 1 << 20;

/** Most levels of brackets read: cards have five; a hostile file could exhaust the stack. */
const MAX_DEPTH = 50;

/** A strict JSON file with what is needed to tell the place of a fault in it. */
export interface JsonFile {
  readonly value: unknown;
  readonly text: string;
  readonly tree: Node;
}

/** A key or value of a JSON file as the path of keys and positions that leads to it. */
export type JsonPath = readonly (string | number)[];

/** 1-based line and column (in UTF-16 code units) of a position in a text. */
export function lineAndColumn(text: string, offset: number): { line: number; column: number } {
  const before = text.slice(0, offset).split(/\r\n|\n|\r/);
  return { line: before.length, column: (before.at(-1) ?? "").length + 1 };
}

/**
 * Line and column of the key or value at a path; where the path leads nowhere, of the nearest part that exists.
 * @param ofKey true for the place of the key, false for that of its value
 */
export function placeOf({ text, tree }: JsonFile, path: JsonPath, ofKey: boolean): { line: number; column: number } {
  for (let length = path.length; length > 0; length--) {
    const node = findNodeAtLocation(tree, path.slice(0, length));
    if (node === undefined) continue;
    const key = node.parent?.type === "property" ? node.parent.children?.[0] : undefined;
    return lineAndColumn(text, ofKey && key !== undefined ? key.offset : node.offset);
  }
  return lineAndColumn(text, tree.offset);
}

/**
 * Reads a strict JSON file: UTF-8, no comments, no trailing commas, every key once. A byte-order mark is passed over.
 * @throws InputError `not-json` (line and column of the first fault told), `bad-encoding`, `unreadable-file`
 */
export function readJsonFile(path: string, place: Place): JsonFile {
  const bytes = readBytes(path, place);
  if (!isUtf8(bytes)) {
    const mend = "save the file as UTF-8";
    throw new InputError(problem("bad-encoding", place, { found: "the file is not valid UTF-8", mend }));
  }
  const text = bytes.toString("utf8").replace(/^\ufeff/, "");
  if (text.trim() === "") throw notJson(place, "the file is empty");
  checkDepth(text, place);
  const errors: ParseError[] = [];
  const tree = parseTree(text, errors, { disallowComments: true, allowTrailingComma: false });
  const fault = errors[0];
  if (fault !== undefined) throw syntaxError(text, fault, place);
  if (tree === undefined) throw notJson(place, "the file holds no value");
  checkKeysOnce(text, tree, place);
  try {
    return { value: JSON.parse(text), text, tree };
  } catch (error) {
    // What the lenient parser lets pass, such as a number with a leading zero.
    throw notJson(place, (error as Error).message);
  }
}

function readBytes(path: string, place: Place): Buffer {
  try {
    const state = statSync(path);
    if (!state.isFile()) throw new RangeError(`${path} is not an ordinary file`);
    if (state.size > MAX_BYTES) throw notJson(place, `the file is larger than ${MAX_BYTES} bytes`);
    return readFileSync(path);
  } catch (error) {
    if (error instanceof InputError) throw error;
    const { code, message } = error as NodeJS.ErrnoException;
    throw new InputError(problem(code === "ENOENT" ? "missing-file" : "unreadable-file", place, { found: message }));
  }
}

function notJson(place: Place, found: string): InputError {
  return new InputError(problem("not-json", place, { found }));
}

/** Refuses deep nesting before any parser runs; brackets inside strings are not counted. */
function checkDepth(text: string, place: Place): void {
  let depth = 0;
  let inString = false;
  for (let i = 0; i < text.length; i++) {
    const character = text[i];
    if (inString && character === "\\") i++;
    else if (character === '"') inString = !inString;
    else if (!inString && (character === "{" || character === "[")) depth++;
    else if (!inString && (character === "}" || character === "]")) depth--;
    if (depth > MAX_DEPTH) {
      throw notJson({ ...place, line: lineAndColumn(text, i).line }, `more than ${MAX_DEPTH} brackets are open`);
    }
  }
}

/** Names of syntax faults in plain words; the parser's own name stands in for those that are rare. */
const FAULTS: Readonly<Record<string, string>> = {
  InvalidSymbol: "a word or character that JSON does not know",
  InvalidNumberFormat: "a number that JSON does not know",
  PropertyNameExpected: "a key in double quotes is expected, or there is a comma too many",
  ValueExpected: "a value is expected, or there is a comma too many",
  ColonExpected: "a colon is expected",
  CommaExpected: "a comma is expected",
  CloseBraceExpected: "a closing brace } is expected",
  CloseBracketExpected: "a closing bracket ] is expected",
  EndOfFileExpected: "something follows after the end of the value",
  InvalidCommentToken: "a comment, which strict JSON does not allow",
  UnexpectedEndOfString: "a text has no closing quote",
  InvalidUnicode: "a wrong \\u escape",
  InvalidEscapeCharacter: "a wrong escape after a backslash",
  InvalidCharacter: "a control character inside a text",
};

function syntaxError(text: string, { error, offset }: ParseError, place: Place): InputError {
  const { line, column } = lineAndColumn(text, offset);
  const name = printParseErrorCode(error);
  return notJson({ ...place, line }, `at line ${line}, column ${column}: ${FAULTS[name] ?? name}`);
}

/** Refuses a key given twice in one object: readers of JSON differ in which of the two they take. */
function checkKeysOnce(text: string, node: Node, place: Place): void {
  const seen = new Set<string>();
  for (const child of node.children ?? []) {
    const key = child.type === "property" ? child.children?.[0] : undefined;
    if (key !== undefined) {
      if (seen.has(key.value)) {
        const { line, column } = lineAndColumn(text, key.offset);
        throw notJson(
          { ...place, line, column: key.value },
          `at line ${line}, column ${column}: the key is given twice`,
        );
      }
      seen.add(key.value);
    }
    checkKeysOnce(text, child, place);
  }
}

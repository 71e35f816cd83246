import { flagId, type Named } from "../records/edition.ts";
import type { Flag } from "../records/fits.ts";
import { textOf } from "../records/measurements.ts";
import type { Reading, SourceTable } from "../records/readings.ts";
import type { TargetScope } from "../records/rulings.ts";
import { fingerprintOf, readingHasher } from "./fingerprint.ts";

/** What a ruling's target stands for. */
export interface Target {
  readonly scope: TargetScope;
  /** Rows covered, ascending; never empty. */
  readonly rows: readonly number[];
  /** Code of the flag, where the target is a flag id. */
  readonly flagCode?: string;
}

/** What targets are looked up in. */
export interface TargetInput extends Named {
  readonly flags: readonly Flag[];
}

/** Looks up targets and takes fingerprints. */
export interface Targets {
  /** What a text stands for; undefined where the collection has nothing of this name. */
  readonly find: (text: string) => Target | undefined;
  /** The flag with this id, by position in the edition's list. */
  readonly flagNamed: (id: string) => number | undefined;
  readonly fingerprint: (rows: readonly number[]) => string;
  /** Line of a row in its source. */
  readonly lineOf: (row: number) => number;
  /** Name of the source, and its rows, of a target of one measurement whether or not the line holds one. */
  readonly sourceOf: (text: string) => { readonly name: string; readonly rows: readonly number[] } | undefined;
  /** Rows that a flag is about, ascending; empty for a source refused as a whole. */
  readonly rowsOfFlag: (flag: Flag) => readonly number[];
}

const MEASUREMENT = /^([a-z0-9][a-z0-9-]*):(\d+)(?::(.*))?$/s;

/** Prepares the look-up; nothing is hashed or indexed before it is asked for. */
export function createTargets(input: TargetInput, sources: readonly SourceTable[]): Targets {
  const { table, systems } = input;
  const position = new Map(input.sources.map(({ name }, i) => [name, i]));
  const systemAt = new Map(systems.map((system) => [system.id, system]));
  const flagAt = lazily(() => new Map(input.flags.map((flag, i) => [flagId(input, flag), i])));
  const rowsBySource = lazily(() => {
    const rows = input.sources.map((): number[] => []);
    for (let row = 0; row < table.count; row++) rows[table.source[row] as number]?.push(row);
    return rows;
  });
  const rowsOf = (source: number): readonly number[] => rowsBySource()[source] ?? [];
  const isLong = (source: number) => (input.sources[source]?.card?.shape ?? "long") === "long";
  const columnOf = (row: number) => textOf(table, table.column[row] as number);

  const measurement = (text: string): Target | undefined => {
    const [, name = "", line = "", column] = MEASUREMENT.exec(text) ?? [];
    const source = position.get(name);
    if (source === undefined) return undefined;
    const row = rowsOf(source).find(
      (row) => table.line[row] === Number(line) && (isLong(source) ? column === undefined : columnOf(row) === column),
    );
    return row === undefined ? undefined : { scope: "measurement", rows: [row] };
  };

  /** A measurement, block, system or source. */
  const thing = (text: string): Target | undefined => {
    if (MEASUREMENT.test(text)) return measurement(text);
    const system = systemAt.get(text);
    if (system !== undefined) return some("system", Array.from(system.rows));
    const source = position.get(text);
    if (source !== undefined) return some("source", rowsOf(source));
    const [name, rest] = cutAtFirst(text);
    const [block, of] = [systemAt.get(rest), position.get(name)];
    if (block === undefined || of === undefined) return undefined;
    return some(
      "block",
      Array.from(block.rows).filter((row) => table.source[row] === of),
    );
  };

  const find = (text: string): Target | undefined => {
    const plain = thing(text);
    // A bare system id is no target of its own: it is reached through a flag on the system.
    if (plain !== undefined && plain.scope !== "system") return plain;
    const [flagCode, rest] = cutAtFirst(text);
    const flagged = rest === "" ? undefined : thing(rest);
    return flagged && { ...flagged, flagCode };
  };

  const hashes = createRowHashes(input, sources);
  return {
    find,
    flagNamed: (id) => flagAt().get(id),
    fingerprint: (rows) => fingerprintOf(rows.map(hashes)),
    lineOf: (row) => table.line[row] as number,
    sourceOf: (text) => {
      const parts = MEASUREMENT.exec(text) ?? MEASUREMENT.exec(cutAtFirst(text)[1]);
      const name = parts?.[1] ?? "";
      const source = position.get(name);
      return source === undefined ? undefined : { name, rows: rowsOf(source) };
    },
    rowsOfFlag: ({ scope, row, source, system }) => {
      if (scope === "measurement") return row === undefined ? [] : [row];
      if (scope === "source") return source === undefined ? [] : rowsOf(source);
      const rows = Array.from(system === undefined ? [] : (systems[system]?.rows ?? []));
      return scope === "system" ? rows : rows.filter((row) => table.source[row] === source);
    },
  };
}

function some(scope: TargetScope, rows: readonly number[]): Target | undefined {
  return rows.length === 0 ? undefined : { scope, rows };
}

/** The text before and behind the first `@`; "" behind where there is none. */
function cutAtFirst(text: string): readonly [string, string] {
  const at = text.indexOf("@");
  return at < 0 ? [text, ""] : [text.slice(0, at), text.slice(at + 1)];
}

function lazily<T>(make: () => T): () => T {
  let made: { readonly value: T } | undefined;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

/** Hash of the reading behind a row; readings are indexed once for each source asked about. */
function createRowHashes({ table, sources: accounts }: TargetInput, sources: readonly SourceTable[]) {
  const bySource = new Map<string, (line: number, column: string) => string>();
  const known = new Map<number, string>();
  const open = (name: string) => {
    const source = sources.find((candidate) => candidate.name === name);
    if (source === undefined) throw new RangeError(`no readings of the source ${name}`);
    const hash = readingHasher(source);
    const place = (line: number, column: string) => `${line} ${column}`;
    const readings = new Map<string, Reading>(
      source.readings.map((reading) => [place(reading.line, source.headings[reading.valueIndex] ?? ""), reading]),
    );
    return (line: number, column: string) => hash(readings.get(place(line, column)) as Reading);
  };
  return (row: number): string => {
    const before = known.get(row);
    if (before !== undefined) return before;
    const name = accounts[table.source[row] as number]?.name ?? "";
    const hash = bySource.get(name) ?? open(name);
    bySource.set(name, hash);
    const value = hash(table.line[row] as number, textOf(table, table.column[row] as number));
    known.set(row, value);
    return value;
  };
}

import type { Kind } from "./kind.ts";

/** Problems of what was asked for: arguments, and the place the output should go to. */
export const commandKinds = {
  "unknown-argument": {
    stops: "command",
    meaning: "The command does not know this argument or option.",
    expected: "the arguments told by --help",
    mend: "see saltern COMMAND --help",
  },
  "bad-argument": {
    stops: "command",
    meaning: "The value of an argument cannot be used.",
    expected: "a value as told by --help",
    mend: "correct the argument",
  },
  "unknown-source": {
    stops: "command",
    meaning: "The collection has no source of this name.",
    expected: "the name of one of its sources",
    mend: "correct the name; the sources are the files sources/NAME.source.json",
  },
  "missing-argument": {
    stops: "command",
    meaning: "The command needs something that was not given, and there is no terminal to ask at.",
    expected: "the arguments told by --help",
    mend: "give the option, or run the command at a terminal and answer its questions",
  },
  "unknown-target": {
    stops: "command",
    meaning: "The collection has no flag, measurement, block or source of this name.",
    expected:
      "a flag id or measurement id as in flags.csv and measurements.csv, SOURCE@SYSTEM, or the name of a source",
    mend: "copy the id from flags.csv or from the report",
  },
  "no-date": {
    stops: "command",
    meaning: "The edition has no date: none was given, and no source card and no ruling has one.",
    expected: "a date written YYYY-MM-DD",
    mend: "give --date",
  },
  "collection-changed": {
    stops: "command",
    meaning: "A file of the collection changed while it was read, so its checksum would not belong to what was read.",
    expected: "a collection that nobody writes to meanwhile",
    mend: "run the command again",
  },
  "edition-exists": {
    stops: "command",
    meaning: "An edition of this name has been published already; editions are never overwritten.",
    expected: "the name of a new edition",
    mend: "choose another name with --edition",
  },
  "not-an-edition": {
    stops: "command",
    meaning: "The folder holds no edition.",
    expected: "a folder written by saltern publish, with its edition.json",
    mend: "name the folder of the edition itself, such as editions/2026-1",
  },
  "damaged-edition": {
    stops: "command",
    meaning: "The files of an edition are not those that were published.",
    expected: "every file as its SHA-256 in edition.json says, none missing, none added",
    mend: "restore the edition from a copy, or publish it again from the same state of the collection",
  },
  "in-use": {
    stops: "command",
    meaning: "Another process is writing here now.",
    expected: "one writer at a time",
    mend: "wait until it has ended, then run the command again",
  },
  "output-not-ours": {
    stops: "command",
    meaning: "The output folder is in use by something else, and would have been replaced.",
    expected: "a new or empty folder, or one written by this program (with its summary.json)",
    mend: "choose another folder, or empty this one yourself",
  },
  "output-is-input": {
    stops: "command",
    meaning: "The output folder is the collection, a part of it or a folder that holds it.",
    expected: "a folder outside the collection",
    mend: "choose another folder",
  },
  "output-not-writable": {
    stops: "command",
    meaning: "The output could not be written.",
    expected: "a folder that you may write to",
    mend: "check the permissions, or choose another folder",
  },
  "no-space": {
    stops: "command",
    meaning: "There is not enough room left for the output.",
    expected: "free space on the disk, within your quota",
    mend: "make room or choose another disk; the earlier output is untouched",
  },
} as const satisfies Record<string, Kind>;

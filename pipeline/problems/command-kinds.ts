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

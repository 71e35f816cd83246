import type { Kind } from "./kind.ts";

/** Problems of rulings. None stops anything: a ruling that cannot be followed is not applied, and its flag stays open. */
export const rulingKinds = {
  "wrong-ruling": {
    stops: "nothing",
    meaning: "A line of rulings.csv says something that cannot be followed; it is not applied.",
    expected: "the cells described in schemas/rulings.schema.json",
    mend: "correct the cell, or rule again with saltern rule",
  },
  "stale-ruling": {
    stops: "nothing",
    meaning: "What a ruling judged has changed since or is gone, so the ruling is not applied.",
    expected: "the reported fields that the fingerprint was taken of",
    mend: "look at the line as it is now and rule again; the old line may stay or be removed",
  },
  "ruling-moved": {
    stops: "nothing",
    meaning: "The line that a ruling judged stands elsewhere in its source now; the ruling has followed it.",
    expected: "the line told by the target",
    mend: "nothing needs mending; to be rid of the message, rule again on the new line and remove the old ruling",
  },
  "ruling-without-flag": {
    stops: "nothing",
    meaning: "A ruling answers a flag that is not raised any more.",
    expected: "the id of a flag in flags.csv",
    mend: "nothing needs mending; check the spelling if the flag never existed",
  },
  "contradicting-rulings": {
    stops: "nothing",
    meaning: "Two rulings on the same measurements say different things; the later line holds.",
    expected: "one decision",
    mend: "remove the line that no longer holds, or rule again",
  },
  "same-ruling-id": {
    stops: "nothing",
    meaning: "Two rulings have the same name; both are applied.",
    expected: "a name that no other ruling has",
    mend: "give one of them another name",
  },
  "correction-impossible": {
    stops: "nothing",
    meaning: "A corrected value or unit cannot be read for the measurement; the ruling is not applied.",
    expected: "a value and unit that the measurement could have been reported in",
    mend: "correct corrected_value and corrected_unit, or rule again",
  },
} as const satisfies Record<string, Kind>;

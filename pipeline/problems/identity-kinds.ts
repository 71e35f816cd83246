import type { Kind } from "./kind.ts";

/** Problems of telling which substance and which solid form a row is about. */
export const identityKinds = {
  "missing-solute": {
    stops: "reading",
    meaning: "The row names no solute.",
    expected: "a name, registry number, structure or formula of the solute",
    mend: "fill the cell, or state the solute as a constant in the card",
  },
  "unknown-solute": {
    stops: "nothing",
    meaning:
      "The solute is in no table of substances but its name is close to one that is; it stays a substance of its own.",
    expected: "a name, synonym or identifier of a listed substance, or a substance that is really new",
    mend: "correct the name, or add the solute to substances.csv of the collection",
  },
  "possibly-the-same": {
    stops: "nothing",
    meaning: "Two keys may stand for one substance, or two names for one solid form; they stay apart.",
    expected: "one identifier or name for each",
    mend: "give all rows the same identifier, or list the substance with its synonyms and registry number in substances.csv",
  },
  "identifier-over-name": {
    stops: "nothing",
    meaning: "Name and identifier of one row stand for different substances; the identifier decided.",
    expected: "name and identifier of one substance",
    mend: "find out which of them is right and correct the other",
  },
  "identifier-not-checked": {
    stops: "nothing",
    meaning: "An identifier, structure or formula of the row could not be compared with what else the row says.",
    expected: "identifiers that can be compared with one another",
    mend: "check it by hand, or list the substance with its identifiers in substances.csv",
  },
  "stereochemistry-differs": {
    stops: "nothing",
    meaning:
      "Two identifiers share a skeleton but not the stereochemistry, isotopes or protons; they stay two substances unless the row says otherwise.",
    expected: "identifiers with the stereochemistry of what was measured; a racemate is not its enantiomer",
    mend: "give the InChIKey, SMILES or registry number of the very stereoisomer, or of the racemate",
  },
  "look-alike-letters": {
    stops: "nothing",
    meaning: "A name holds letters of another script that look like Latin ones; it was read as the Latin name.",
    expected: "a name in letters of one script",
    mend: "type the name again",
  },
  "configuration-or-rotation": {
    stops: "nothing",
    meaning:
      "A small d- or l- can mean the configuration (D-, L-) or the sign of rotation; the configuration was taken.",
    expected: "D- or L- for the configuration, (+)- or (-)- for the rotation",
    mend: "write the prefix that is meant, or add a registry number or InChIKey",
  },
  "unresolved-identity": {
    stops: "reading",
    meaning: "It cannot be told which substance is meant.",
    expected: "a name or identifier that stands for exactly one substance",
    mend: "add a registry number or InChIKey to the row, or a synonym to substances.csv",
  },
  "contradictory-identity": {
    stops: "reading",
    meaning: "What one row says of its solute stands for different substances, stereoisomers or solid forms.",
    expected: "name, registry number, InChIKey, structure and solid form of one substance",
    mend: "find out which of them is right and correct the others",
  },
  "contradictory-molar-mass": {
    stops: "reading",
    meaning: "The molar mass stated does not belong to the formula or substance.",
    expected: "the molar mass that follows from the formula",
    mend: "check whether the mass is that of a hydrate, a salt or the free base, and correct the row",
  },
  "solvent-is-solute": {
    stops: "reading",
    meaning: "Solute and solvent are the same substance.",
    expected: "two different substances",
    mend: "correct the row; in the card, check that the two columns were not exchanged",
  },
  "invalid-registry-number": {
    stops: "reading",
    meaning: "The CAS Registry Number has a wrong form or a wrong check digit.",
    expected: "a number such as 7732-18-5 whose last digit agrees with the others",
    mend: "copy the number again from its origin; a spreadsheet may have turned it into a date",
  },
  "invalid-inchikey": {
    stops: "reading",
    meaning: "The InChIKey is not well formed.",
    expected: "14, 10 and 1 capital letters joined by hyphens, such as RZVAJINKPMORJF-UHFFFAOYSA-N",
    mend: "copy the key again from its origin",
  },
  "invalid-formula": {
    stops: "reading",
    meaning: "The formula cannot be read.",
    expected: "element symbols with counts, such as CuSO4·5H2O or Ca(NO3)2",
    mend: "correct the formula",
  },
} as const satisfies Record<string, Kind>;

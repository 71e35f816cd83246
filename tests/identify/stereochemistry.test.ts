import { describe, expect, test } from "vitest";
import { stereoBeyondName, stereoWord } from "../../pipeline/identify/stereochemistry.ts";
import { programIndex as index, substance } from "../properties/read-tables.ts";

describe("The ways of stating stereochemistry have one word", () => {
  test.each([
    [
      "racemate",
      ["rac", "rac.", "racemic", "Racemate", "racemic mixture", "(±)", "±", "(+/-)", "RS", "(RS)-", "DL", "dl-"],
    ],
    ["(R)", ["R", "(R)", "(R)-", "r", "R-enantiomer"]],
    ["(S)", ["S", "(S)", "S enantiomer"]],
    ["D", ["D", "D-"]],
    ["L", ["L", "(L)"]],
    ["(+)", ["+", "(+)", "(+)-"]],
    ["(-)", ["-", "(−)", "(–)-"]],
    ["", ["", " ", "unknown", "Not stated", "n/a"]],
    ["conglomerate", ["Conglomerate"]],
    ["racemic compound", ["racemic  Compound"]],
    // Small d and l are signs of rotation by the old rule and configurations by habit: they stay as written.
    ["d", ["d"]],
    ["l", ["l"]],
  ])("%j", (word, cells) => {
    for (const cell of cells) expect(stereoWord(cell), cell).toBe(word);
  });
});

describe("What the column adds to the name of the solute", () => {
  const beyond = (name: string, cell: string) => stereoBeyondName(cell, name, substance(name), index);

  test.each([
    ["(S)-ibuprofen", "S"],
    ["(S)-ibuprofen", "(S)-"],
    ["(S)-ibuprofen", "+"],
    ["L-alanine", "L"],
    ["L-alanine", "S"],
    ["DL-tartaric acid", "racemate"],
    ["ibuprofen", "racemic"],
  ])("is nothing where it repeats the name: %s, %s", (name, cell) => {
    expect(beyond(name, cell)).toBe("");
  });

  test.each([
    ["ibuprofen", "S", "(S)"],
    ["paracetamol", "rac", "racemate"],
  ])("keeps systems apart where it says more: %s, %s", (name, cell, word) => {
    expect(beyond(name, cell)).toBe(word);
  });

  test.each([
    ["(S)-ibuprofen", "racemate"],
    ["(S)-ibuprofen", "R"],
    ["L-alanine", "D"],
    ["L-alanine", "DL"],
    ["DL-tartaric acid", "L"],
  ])("refuses the row where it contradicts the name: %s, %s", (name, cell) => {
    expect(beyond(name, cell)).toMatchObject({ field: "stereo", code: "contradictory-identity" });
  });

  test("holds for solutes that are in no table, by the prefix of their name", () => {
    expect(stereoBeyondName("S", "HX-7", undefined, index)).toBe("(S)");
    expect(stereoBeyondName("S", "(S)-HX-7", undefined, index)).toBe("");
    expect(stereoBeyondName("R", "(S)-HX-7", undefined, index)).toMatchObject({ code: "contradictory-identity" });
    expect(stereoBeyondName("S", "rac-HX-7", undefined, index)).toMatchObject({ code: "contradictory-identity" });
  });
});

import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { knownElements } from "../../pipeline/properties/atomic-weights.ts";
import { type Formula, parseFormula } from "../../pipeline/properties/formula.ts";
import type { FormulaFault } from "../../pipeline/properties/formula-text.ts";
import { hydrateParts } from "../../pipeline/properties/hydrate-parts.ts";
import { hillFormula, molarMass } from "../../pipeline/properties/molar-mass.ts";

function formulaOf(text: string): Formula {
  const parsed = parseFormula(text);
  if ("fault" in parsed) throw new Error(`${text}: ${parsed.message}`);
  return parsed;
}

function faultOf(text: string): FormulaFault {
  const parsed = parseFormula(text);
  if (!("fault" in parsed)) throw new Error(`${text} was read as ${hillFormula(parsed.elements)}`);
  return parsed;
}

const hill = (text: string) => hillFormula(formulaOf(text).elements);
const mass = (text: string) => molarMass(formulaOf(text)).value;

describe("Molar masses agree with published ones", () => {
  // CRC Handbook of Chemistry and Physics and suppliers' certificates, rounded to 0.01 g/mol.
  test.each([
    ["H2O", 18.015],
    ["NaCl", 58.44],
    ["KNO3", 101.1],
    ["(NH4)2SO4", 132.14],
    ["C6H12O6", 180.16],
    ["C12H22O11", 342.3],
    ["C8H10N4O2", 194.19],
    ["C8H9NO2", 151.16],
    ["CuSO4·5H2O", 249.68],
    ["Na2SO4·10H2O", 322.19],
    ["MgSO4·7H2O", 246.47],
    ["CaSO4·0.5H2O", 145.14],
    ["CaSO4·2H2O", 172.17],
    ["Na2CO3·10H2O", 286.14],
    ["(NH4)2Fe(SO4)2·6H2O", 392.13],
    ["K4Fe(CN)6", 368.34],
    ["Na2HPO4·12H2O", 358.14],
    ["Ce2(SO4)3", 568.42],
    ["Pb(NO3)2", 331.21],
    ["KMnO4", 158.03],
    ["C21H30O5", 362.46],
    ["D2O", 20.027],
  ])("%s is %f g/mol", (text, published) => {
    expect(Math.abs(mass(text) - published)).toBeLessThan(0.025);
  });

  test("KAl(SO4)2·12H2O lies between 474.37 and 474.39 g/mol", () => {
    // IUPAC 2021 atomic weights; the 182.17 g/mol of some identifier tables counts one water instead of twelve.
    expect(mass("KAl(SO4)2·12H2O")).toBeGreaterThan(474.37);
    expect(mass("KAl(SO4)2·12H2O")).toBeLessThan(474.39);
  });

  test("the uncertainty of water follows from the published intervals of hydrogen and oxygen", () => {
    // u^2 = (2 x 0.0002/sqrt 3)^2 + (0.001/sqrt 3)^2 with the uncertainties of Prohaska et al. 2022.
    expect(molarMass(formulaOf("H2O")).standardUncertainty).toBeCloseTo(Math.hypot(0.0004, 0.001) / Math.sqrt(3), 12);
  });

  test("the electrons of a charge are counted", () => {
    expect(mass("Na+")).toBeCloseTo(22.98976928 - 0.00054858, 8);
    expect(mass("Cl-")).toBeCloseTo(35.45 + 0.00054858, 8);
  });
});

describe("A hydrate is one formula however it is written", () => {
  test.each([
    "CuSO4·5H2O",
    "CuSO4.5H2O",
    "CuSO4*5H2O",
    "CuSO4•5H2O",
    "CuSO4 x 5 H2O",
    "CuSO4 · 5 H2O",
    "CuSO₄·5H₂O",
    "CuSO4·(H2O)5",
    "[CuSO4]·5[H2O]",
    "CuH10O9S",
  ])("%s", (text) => {
    expect(hill(text)).toBe("CuH10O9S");
  });

  test.each(["CaSO4·0.5H2O", "CaSO4.0.5H2O", "CaSO4..5H2O", "CaSO4·½H2O", "CaSO4·1/2H2O", "CaHO4.5S"])(
    "%s has half a water, not five",
    (text) => {
      expect(hill(text)).toBe("CaHO4.5S");
    },
  );

  test("a full stop joins before a whole guest and is a decimal point in a Hill formula", () => {
    expect(hill("BaCl2.2H2O")).toBe("BaCl2H4O2");
    expect(hill("K2CO3.1.5H2O")).toBe("CH3K2O4.5");
    expect(hill("Fe0.95O")).toBe("Fe0.95O");
    expect(hill("C17H19NO3.HCl.3H2O")).toBe("C17H26ClNO6");
  });
});

describe("The guest is taken from its host", () => {
  test.each([
    ["CuSO4·5H2O", "CuSO4", "H2O", 5],
    ["CaSO4.0.5H2O", "CaSO4", "H2O", 0.5],
    ["3CdSO4·8H2O", "CdSO4", "H2O", 8 / 3],
    ["KAl(SO4)2·12H2O", "KAl(SO4)2", "H2O", 12],
    ["Na2SO4·(H2O)10", "Na2SO4", "H2O", 10],
    ["C17H19NO3·HCl·3H2O", "C17H19NO3·HCl", "H2O", 3],
    ["C8H10N4O2·0.8H2O", "C8H10N4O2", "H2O", 0.8],
  ])("%s", (text, anhydrous, guest, guestPerUnit) => {
    const parts = hydrateParts(formulaOf(text));
    expect(parts).toMatchObject({ anhydrous, guest });
    expect(parts?.guestPerUnit).toBeCloseTo(guestPerUnit, 12);
  });

  test.each(["CuSO4", "CuH10O9S", "C9H8O4", "C24H29NO3·HCl", "H2O"])("%s shows no guest", (text) => {
    expect(hydrateParts(formulaOf(text))).toBeUndefined();
  });
});

describe("Charges are told from counts", () => {
  test.each([
    ["SO4^2-", "O4S", -2],
    ["SO₄²⁻", "O4S", -2],
    ["SO4(2-)", "O4S", -2],
    ["NH4+", "H4N", 1],
    ["NO3-", "NO3", -1],
    ["Ca2+", "Ca", 2],
    ["[Fe(CN)6]4-", "C6FeN6", -4],
    ["NaCl", "ClNa", 0],
  ])("%s", (text, elements, charge) => {
    expect(hill(text)).toBe(elements);
    expect(formulaOf(text).charge).toBe(charge);
  });
});

describe("What is no formula is refused with its character", () => {
  test.each([
    ["", "empty", 1],
    ["Xy2", "unknown element", 1],
    ["NaXy", "unknown element", 3],
    ["Tc2O7", "no atomic weight", 1],
    ["NaCl2)", "unbalanced bracket", 6],
    ["Ca(NO3]2", "unbalanced bracket", 7],
    ["(NaCl", "unbalanced bracket", 1],
    ["Na()Cl", "empty bracket", 3],
    ["salt", "unexpected character", 1],
    ["Na+Cl-", "unexpected character", 3],
    ["H0", "zero count", 2],
    ["Na2SO4·", "nothing to count", 8],
    ["CuSO4 5H2O", "blank between digits", 7],
    ["Al2(SO4)3·xH2O", "indefinite count", 11],
    ["SO42-", "ambiguous charge", 3],
    [`C${"H".repeat(500)}`, "too long", 401],
  ])("%s", (text, fault, at) => {
    expect(faultOf(text)).toMatchObject({ fault, at });
  });
});

describe("Properties of the reader", () => {
  const elementCounts = fc.uniqueArray(fc.tuple(fc.constantFrom(...knownElements), fc.integer({ min: 1, max: 40 })), {
    minLength: 1,
    maxLength: 8,
    selector: ([symbol]) => symbol,
  });
  const written = (counts: readonly (readonly [string, number])[]) => counts.map(([s, n]) => s + n).join("");

  test("the Hill formula of a reading reads as the same elements", () => {
    fc.assert(
      fc.property(elementCounts, (counts) => {
        const elements = formulaOf(written(counts)).elements;
        expect([...formulaOf(hillFormula(elements)).elements].sort()).toEqual([...elements].sort());
      }),
    );
  });

  test("the mass of n units in brackets is n times the mass of one", () => {
    fc.assert(
      fc.property(elementCounts, fc.integer({ min: 2, max: 12 }), (counts, n) => {
        const one = mass(written(counts));
        expect(mass(`(${written(counts)})${n}`) / (n * one)).toBeCloseTo(1, 12);
        expect(mass(`{[${written(counts)}]${n}}`) / (n * one)).toBeCloseTo(1, 12);
      }),
    );
  });

  test("any text is either read or refused, never thrown at", () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.string({ unit: fc.constantFrom(..."CHONSa123.·()[]+-^ x₂") })), (text) => {
        const parsed = parseFormula(text);
        if ("fault" in parsed) expect(parsed.at).toBeGreaterThan(0);
        else expect(molarMass(parsed).value).toBeGreaterThan(0);
      }),
      { numRuns: 1000 },
    );
  });
});

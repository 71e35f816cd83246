import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { systemId } from "../../pipeline/group/systems.ts";
import { type ResolvedIdentity, resolveIdentity } from "../../pipeline/identify/identity.ts";
import { substanceIndex } from "../../pipeline/properties/substance-index.ts";
import type { CellFault } from "../../pipeline/records/cells.ts";
import type { DecimalMark } from "../../pipeline/records/number-text.ts";
import { programIndex } from "../properties/read-tables.ts";
import { tables } from "./literal-tables.ts";

type Cells = Readonly<Record<string, string>>;

function outcome(cells: Cells, decimal: DecimalMark = ".", index = programIndex): ResolvedIdentity | CellFault {
  const all: Cells = { solute: "paracetamol", ...cells };
  const value = { text: all.solubility ?? "", unit: all.unit ?? "", soluteBasis: all.solute_basis ?? "" };
  return resolveIdentity(
    (field) => all[field] ?? "",
    index,
    () => undefined,
    decimal,
    value,
  );
}

/** Solvent and composition key of a row, as `ethanol + water 70:30 w/w`. @throws where it is refused */
function named(cells: Cells, decimal: DecimalMark = "."): string {
  const found = outcome(cells, decimal);
  if ("code" in found) throw new Error(`${JSON.stringify(cells)} refused: ${found.code}: ${found.found}`);
  return `${found.identity.solvent} ${found.identity.composition}`.trim();
}

function resolved(cells: Cells): ResolvedIdentity {
  const found = outcome(cells);
  if ("code" in found) throw new Error(`refused: ${found.code}: ${found.found}`);
  return found;
}

function refused(cells: Cells, index = programIndex): CellFault {
  const found = outcome(cells, ".", index);
  if (!("code" in found)) throw new Error(`accepted as ${found.identity.solvent} ${found.identity.composition}`);
  return found;
}

describe("A mixture of ethanol and water", () => {
  test.each([
    "ethanol/water 70:30 w/w",
    "EtOH-H2O (7:3, w/w)",
    "ethanol + water (70/30 w/w)",
    "water/ethanol 30:70 wt%",
    "70 wt% aqueous ethanol",
    "aq. ethanol 70 % (m/m)",
    "ethanol:water 7:3 by mass",
    "70:30 ethanol/water (mass fractions)",
    "ethanol–water 70–30 w/w",
    "70 % ethanol / 30 % water w/w",
    "ethanol (w1 = 0.7) + water",
    "water + ethanol, w(ethanol) = 0.7",
    "mixture of ethanol and water, 70:30 by weight",
    "64-17-5/7732-18-5 0.7:0.3 w/w",
    "ethanol in water, 70 mass %",
    "ethanol water 70:30 w/w",
    "ETHANOL∕WATER 70∶30 w/w",
    "(ethanol + water) 70:30 w/w",
    "ethanol (70 %) + water (30 %) w/w",
    "EtOH 70 / H2O 30 w/w",
    "ethanol:water = 70:30, w/w",
    "ethanol/water (w:w = 7:3)",
    "70 % (w/w) ethanol/water",
    "EtOH (aq), 70 wt.-%",
  ])("is the same 70:30 by mass written as %j", (solvent) => {
    expect(named({ solvent })).toBe("ethanol + water 70:30 w/w");
  });

  test.each([
    ["0.7", "mass fraction"],
    ["70", "% w/w"],
    ["70 %", "mass"],
    ["70:30", "weight"],
    ["70/30", "w/w"],
    ["0.3 water", "mass"],
    ["30 % water", "by mass"],
    ["0.7", "mass fraction, solute-free"],
    ["0.7 w/w", ""],
  ])("is the same with its composition %j and basis %j in cells of their own", (composition, composition_basis) => {
    expect(named({ solvent: "ethanol + water", composition, composition_basis })).toBe("ethanol + water 70:30 w/w");
  });

  test("of a source with decimal commas is read with them", () => {
    const cells = { solvent: "ethanol/water", composition: "0,705", composition_basis: "mass" };
    expect(named(cells, ",")).toBe("ethanol + water 70.5:29.5 w/w");
    expect(refused(cells).code).toBe("ambiguous-number");
  });

  // 70 mL and 30 mL before mixing: 0.7 x 789.24 and 0.3 x 998.21 kg/m3, 64.85 % mass. x = 0.3: 0.3 x 46.069 and
  // 0.7 x 18.015 g/mol, 52.29 % mass. 96 % vol is 93.84 % mass, 40 % vol 33.30 % mass (OIML R 22).
  test.each([
    ["ethanol/water 70:30 v/v", "65:35 w/w"],
    ["EtOH-H2O (7:3, v/v)", "65:35 w/w"],
    ["ethanol:water (70:30 % v/v)", "65:35 w/w"],
    ["ethanol/water x1 = 0.3", "52.5:47.5 w/w"],
    ["ethanol + water, 30 mol%", "52.5:47.5 w/w"],
    ["ethanol (96 % vol)", "94:6 w/w"],
    ["40% vol ethanol", "33.5:66.5 w/w"],
    ["ethanol in water 40 % abv", "33.5:66.5 w/w"],
  ])("on another basis, %j, is %s", (solvent, composition) => {
    expect(named({ solvent })).toBe(`ethanol + water ${composition}`);
  });

  test("of 95 % vol has 92.41 % mass of ethanol (OIML R 22)", () => {
    const { solvent } = resolved({ solvent: "ethanol", composition: "95", composition_basis: "% vol" });
    expect(solvent.parts[0]?.massFraction).toBeCloseTo(0.92408, 4);
    expect(solvent.madeUp).toBe("by volume");
  });

  test("in % v/v may be meant as strength: the difference is named and joins the uncertainty", () => {
    const { solvent, assumptions } = resolved({ solvent: "70 % v/v aqueous ethanol" });
    // 64.86 % mass before mixing, 62.39 % mass as 70 % vol.
    expect(solvent.openU).toBeCloseTo(0.6486 - 0.6239, 3);
    expect(assumptions.join()).toContain("alcoholometric");
    expect(resolved({ solvent: "ethanol/water 70:30 v/v" }).solvent.openU).toBe(0);
  });
});

describe("Names of components", () => {
  test.each([
    ["1,4-dioxane/water 50:50 w/w", "1,4-dioxane + water 50:50 w/w"],
    ["1,4-dioxane-2-propanol 1:1 w/w", "1,4-dioxane + 2-propanol 50:50 w/w"],
    ["N,N-dimethylformamide-water 20:80 m/m", "N,N-dimethylformamide + water 20:80 w/w"],
    ["n-butyl acetate/toluene (1/1, w/w)", "butyl acetate + toluene 50:50 w/w"],
    ["N-methyl-2-pyrrolidone, 1,2-dimethoxyethane 1:3 w/w", "1,2-dimethoxyethane + N-methyl-2-pyrrolidone 75:25 w/w"],
    ["methyl tert-butyl ether/methanol 9:1 w/w", "methanol + methyl tert-butyl ether 10:90 w/w"],
    ["EtOAc/EtOH 1:1 (w/w)", "ethanol + ethyl acetate 50:50 w/w"],
  ])("with digits, commas and hyphens are told from what divides them: %j", (solvent, expected) => {
    expect(named({ solvent })).toBe(expected);
  });

  test.each([
    ["ethanol/ethyl acetate/heptane 50:30:20 w/w", "ethanol + ethyl acetate + heptane 50:30:20 w/w"],
    ["ethanol-ethyl acetate-heptane (5:3:2, w:w:w)", "ethanol + ethyl acetate + heptane 50:30:20 w/w"],
    [
      "water + N,N-dimethylformamide + 1,4-dioxane 20:50:30 wt%",
      "1,4-dioxane + N,N-dimethylformamide + water 30:50:20 w/w",
    ],
  ])("of three components keep their fractions: %j", (solvent, expected) => {
    expect(named({ solvent })).toBe(expected);
  });

  test("come in one order whatever order they were written in, water last", () => {
    const solvents = ["acetone", "methanol", "water", "2-propanol", "1,4-dioxane"];
    fc.assert(
      fc.property(
        fc.shuffledSubarray(solvents, { minLength: 2, maxLength: 3 }),
        fc.array(fc.integer({ min: 1, max: 60 }), { minLength: 3, maxLength: 3 }),
        fc.constantFrom("w/w", "v/v", "mol/mol"),
        (components, shares, basis) => {
          const written = components.map((name, i) => ({ name, share: shares[i] as number }));
          const cell = (of: typeof written) =>
            `${of.map(({ name }) => name).join("/")} ${of.map(({ share }) => share).join(":")} ${basis}`;
          const [one, other] = [
            outcome({ solvent: cell(written) }),
            outcome({ solvent: cell([...written].reverse()) }),
          ];
          if ("code" in one || "code" in other) {
            expect(["fractions-do-not-add-up"]).toContain("code" in one ? one.code : "accepted");
            return;
          }
          expect(other.identity.composition).toBe(one.identity.composition);
          expect(one.identity.solvent.split(" + ").indexOf("water")).not.toBe(0);
          one.solvent.parts.forEach(({ massFraction }, i) => {
            expect(Math.abs(massFraction - (other.solvent.parts[i]?.massFraction as number))).toBeLessThan(1e-12);
          });
        },
      ),
      { numRuns: 60 },
    );
  });

  test("that can be divided in two ways are refused with both", () => {
    const solvent = (name: string) => ({ name, role: "solvent", formula: "C2H6O" });
    const own = tables([
      solvent("water"),
      solvent("alpha"),
      solvent("beta-gamma"),
      solvent("alpha-beta"),
      solvent("gamma"),
    ]);
    const index = substanceIndex([
      {
        origin: "test",
        substances: own.substances.map(({ values }) => values),
        solidForms: [],
        propertyValues: [],
      },
    ]);
    const fault = refused({ solvent: "alpha-beta-gamma 1:1 w/w" }, index);
    expect(fault.code).toBe("ambiguous-mixture");
    expect(fault.found).toContain("alpha + beta-gamma");
    expect(fault.found).toContain("alpha-beta + gamma");
  });
});

describe("A pure solvent", () => {
  test.each([
    [{ solvent: "ethanol/water 100:0 v/v" }, "ethanol"],
    [{ solvent: "ethanol + water", composition: "0", composition_basis: "mass" }, "water"],
    [{ solvent: "ethanol + water", composition: "1", composition_basis: "mole" }, "ethanol"],
    [{ solvent: "ethanol + water", composition: "100 %" }, "ethanol"],
    [{ solvent: "1,4-dioxane" }, "1,4-dioxane"],
  ])("at the end of a series is what is left: %j", (cells, expected) => {
    expect(named(cells)).toBe(expected);
    expect(resolved(cells).identity.solventComponents).toEqual([{ name: expected, massFraction: 1 }]);
  });

  test("with water stated is wet from 0.25 wt % on, and its exact water is counted below that too", () => {
    const wet = (percent: string) => resolved({ solvent: "acetone", solvent_water_wt_percent: percent });
    expect(wet("0.2").identity).toMatchObject({ solvent: "acetone", composition: "" });
    expect(wet("0.2").solvent.parts.map(({ massFraction }) => massFraction)).toEqual([0.998, 0.002]);
    expect(wet("0.2").assumptions.join()).toContain("0.2 wt % water");
    // 1/(0.998/58.080 + 0.002/18.015) g/mol.
    expect(wet("0.2").identity.solventMolarMass).toBeCloseTo(57.823, 2);
    expect(wet("0.25").identity).toMatchObject({ solvent: "acetone + water", composition: "99.5:0.5 w/w" });
    expect(wet("0").solvent.parts).toHaveLength(1);
  });

  test("water joins the water of a mixture unless it is the same statement", () => {
    const cells = { solvent: "ethanol/water 90:10 w/w" };
    expect(named({ ...cells, solvent_water_wt_percent: "2" })).toBe("ethanol + water 88:12 w/w");
    expect(named({ ...cells, solvent_water_wt_percent: "10" })).toBe("ethanol + water 90:10 w/w");
    expect(named({ solvent: "acetone/methanol 1:1 w/w", solvent_water_wt_percent: "1" })).toBe(
      "acetone + methanol + water 49.5:49.5:1 w/w",
    );
  });

  test("called ethanol without more is taken absolute, and the row says so", () => {
    expect(resolved({ solvent: "ethanol" }).assumptions.join()).toContain("taken absolute");
    for (const cells of [
      { solvent: "absolute ethanol" },
      { solvent: "ethanol", solvent_grade: "dried" },
      { solvent: "ethanol", solvent_water_wt_percent: "0.05" },
      { solvent: "methanol" },
    ]) {
      expect(resolved(cells).solvent.takenAbsolute).toBe(false);
    }
  });
});

describe("Bad input", () => {
  test.each<[string, Cells, string, ...string[]]>([
    ["fractions that do not add up", { solvent: "ethanol/water 70:40 v/v" }, "fractions-do-not-add-up", "110"],
    ["fractions of 1 that do not add up", { solvent: "ethanol/water 0.7:0.4 w/w" }, "fractions-do-not-add-up", "1.1"],
    ["percentages that do not add up", { solvent: "70 % ethanol / 20 % water w/w" }, "fractions-do-not-add-up", "90"],
    ["an unknown partner", { solvent: "ethanol/wter 70:30 v/v" }, "unknown-mixture-partner", '"wter"'],
    ["an unknown partner behind a hyphen", { solvent: "EtOH-squalane 1:1 w/w" }, "unknown-mixture-partner", "squalane"],
    ["a partner that is no solvent", { solvent: "caffeine/water 1:9 w/w" }, "unknown-mixture-partner", "solute only"],
    ["a missing basis", { solvent: "95 % ethanol" }, "open-composition", "95 % vol = 92.4 % mass", "95 % by mass"],
    ["a ratio without basis", { solvent: "ethanol/water 7:3" }, "open-composition", "62.4 % mass", "64.9 % mass"],
    ["a column without basis", { solvent: "acetone/water", composition: "0.4" }, "open-composition", "mol %"],
    [
      "a composition above 100 %",
      { solvent: "ethanol/water", composition: "120", composition_basis: "mass %" },
      "composition-out-of-range",
      "120 %",
    ],
    [
      "a fraction above 1",
      { solvent: "ethanol/water", composition: "1.2", composition_basis: "mass fraction" },
      "composition-out-of-range",
    ],
    [
      "a composition below 0",
      { solvent: "ethanol/water", composition: "-0.1", composition_basis: "mass" },
      "composition-out-of-range",
    ],
    ["water above 100 %", { solvent: "ethanol", solvent_water_wt_percent: "101" }, "composition-out-of-range"],
    ["a mixture of four", { solvent: "water/ethanol/acetone/methanol 1:1:1:1 w/w" }, "too-many-components", "4"],
    ["a mixture of four unknown ones", { solvent: "a/b/c/d 1:1:1:1" }, "too-many-components", "4"],
    ["a solute among the solvents", { solvent: "paracetamol/water 1:9 w/w" }, "solvent-is-solute", "paracetamol"],
    [
      "a solute that is a solvent too",
      { solute: "acetic acid", solvent: "water/acetic acid 9:1 w/w" },
      "solvent-is-solute",
    ],
    ["water and toluene", { solvent: "water/toluene 50:50 v/v" }, "miscibility-gap", "not verified"],
    ["water and hexane", { solvent: "hexane + water 1:1 w/w" }, "miscibility-gap"],
    [
      "water and 1-butanol inside the gap",
      { solvent: "water + 1-butanol 50:50 w/w" },
      "miscibility-gap",
      "92.6",
      "20.4",
    ],
    ["water and ethyl acetate inside the gap", { solvent: "EtOAc/H2O 1:1 v/v" }, "miscibility-gap"],
    ["acetonitrile and heptane", { solvent: "acetonitrile/heptane 1:1 v/v" }, "miscibility-gap"],
    ["two solvents without proportion", { solvent: "ethanol + water" }, "missing-composition", "ethanol + water"],
    [
      "a fraction without partner",
      { solvent: "ethanol", composition: "0.6", composition_basis: "mass" },
      "missing-composition",
    ],
    [
      "one fraction of three",
      { solvent: "ethanol/water/acetone", composition: "0.6", composition_basis: "mass" },
      "missing-composition",
    ],
    [
      "more fractions than solvents",
      { solvent: "ethanol/water 50:30:20 w/w" },
      "unsupported-composition",
      "3 fractions",
    ],
    [
      "two compositions",
      { solvent: "ethanol/water 70:30 w/w", composition: "0.6", composition_basis: "mass" },
      "contradictory-composition",
    ],
    ["two bases", { solvent: "ethanol/water 70:30 v/v", composition_basis: "mass" }, "contradictory-composition"],
    [
      "two water contents",
      { solvent: "ethanol/water 70:30 w/w", solvent_water_wt_percent: "12" },
      "contradictory-composition",
    ],
    [
      "a basis that is none",
      { solvent: "ethanol/water", composition: "0.6", composition_basis: "by eye" },
      "bad-choice",
    ],
    [
      "strength of another alcohol",
      { solvent: "methanol/water", composition: "40", composition_basis: "% vol" },
      "unsupported-composition",
    ],
    ["a fraction of an unknown solvent", { solvent: "ethanol/water x(squalane) = 0.1" }, "unknown-mixture-partner"],
    ["a fraction of a solvent not named", { solvent: "ethanol/water x(acetone) = 0.1" }, "missing-composition"],
    ["a fraction of a third of two", { solvent: "ethanol/water x3 = 0.1" }, "unsupported-composition"],
    ["more words than a mixture has", { solvent: "ethanol/water 70:30 w/w at 25 °C" }, "unknown-mixture-partner"],
    ["one solvent twice", { solvent: "ethanol/EtOH 1:1 w/w" }, "unsupported-composition"],
    [
      "a composition that is none",
      { solvent: "ethanol/water", composition: "some", composition_basis: "mass" },
      "unsupported-composition",
    ],
    [
      "fractions that count a solute that is not told",
      {
        solvent: "ethanol/water",
        composition: "0.6",
        composition_basis: "mass fraction including solute",
        solubility: "5",
        unit: "mg/mL solution",
      },
      "composition-counts-solute",
    ],
  ])("is a problem of its own: %s", (_, cells, code, ...told) => {
    const fault = refused(cells);
    expect(fault.code, fault.found).toBe(code);
    for (const words of told) expect(fault.found).toContain(words);
  });

  test("is a cell whose end would have to be left out to read it", () => {
    const long = `ethanol/water 70:30 w/w${" ".repeat(300)}and 5 % of something else`;
    expect(refused({ solvent: long }).code).toBe("unsupported-composition");
  });

  test("with a partner that is nearly spelt right comes with the suggestion", () => {
    expect(refused({ solvent: "ethanol/wter 70:30 v/v" }).mend).toContain("water");
  });

  test("is never a miscibility gap outside it: 5 % 1-butanol in water, 5 % water in ethyl acetate are one liquid", () => {
    expect(named({ solvent: "water + 1-butanol 95:5 w/w" })).toBe("1-butanol + water 5:95 w/w");
    expect(named({ solvent: "EtOAc/water 97:3 w/w" })).toBe("ethyl acetate + water 97:3 w/w");
    expect(named({ solvent: "acetonitrile/heptane 95:5 v/v" })).toBe("acetonitrile + heptane 95.5:4.5 w/w");
  });

  test("never throws, whatever stands in the cells, and long cells cost no time", () => {
    const word = fc.constantFrom(
      "ethanol",
      "water",
      "70",
      "30 %",
      ":",
      "/",
      "v/v",
      "-",
      "(",
      ")",
      "x1",
      "=",
      "aq.",
      ",",
      "\ue000",
      "% vol",
    );
    const text = fc.oneof(
      fc.string({ maxLength: 60 }),
      fc.array(word, { maxLength: 14 }).map((words) => words.join(" ")),
    );
    fc.assert(
      fc.property(text, text, text, (solvent, composition, composition_basis) => {
        const found = outcome({ solvent: solvent.trim(), composition: composition.trim(), composition_basis });
        if ("code" in found) expect(found.found).not.toMatch(/undefined|NaN(?! )/);
        else expect(found.solvent.parts.reduce((sum, { massFraction }) => sum + massFraction, 0)).toBeCloseTo(1, 9);
      }),
      { numRuns: 200 },
    );
    for (const solvent of ["ethanol-".repeat(20_000), "70:".repeat(50_000), "(".repeat(100_000), "a/".repeat(90_000)]) {
      expect(outcome({ solvent })).toHaveProperty("code");
      const beside = { solvent: "ethanol/water", composition: "0.5", composition_basis: "mass" };
      expect(outcome({ ...beside, composition: solvent })).toHaveProperty("code");
      expect(outcome({ ...beside, composition_basis: solvent })).toHaveProperty("code", "bad-choice");
    }
  });
});

test("Compositions of one mixture have ids of their own, readable and never shared", () => {
  const ids = new Set<string>();
  for (let tenth = 0; tenth <= 1000; tenth += 5) {
    const { identity } = resolved({
      solvent: "ethanol + water",
      composition: String(tenth / 1000),
      composition_basis: "mass",
    });
    ids.add(systemId(identity));
  }
  expect(ids.size).toBe(201);
  expect([...ids].every((id) => /^[a-z0-9-]+$/.test(id))).toBe(true);
  expect([...ids][140]).toMatch(/^paracetamol-in-ethanol-water-70-30-w-w-[0-9a-f]{8}$/);
});

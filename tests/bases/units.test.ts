import { expect, test } from "vitest";
import { type Basis, isOpenAt, quantityFromValue, valueFromQuantity } from "../../pipeline/bases/unit.ts";
import { parseUnit, unitSpellings } from "../../pipeline/bases/units.ts";
import { unitOf } from "./support.ts";

/** Spelling, canonical spelling, basis, and the basis quantity [SI] of the value 2 by the definition of the unit. */
const stated: readonly (readonly [string, string, Basis, number])[] = [
  ["g/100 g solvent", "g/100 g solvent", "mass ratio", 0.02],
  ["g/100 g solution", "g/100 g solution", "mass fraction", 0.02],
  ["% w/w", "% w/w", "mass fraction", 0.02],
  ["% w/v", "% w/v", "mass per volume of solution", 20],
  ["g/100 mL solvent", "g/100 mL solvent", "mass per volume of solvent", 20],
  ["g/100 mL solution", "g/100 mL solution", "mass per volume of solution", 20],
  ["g/L solution", "g/L solution", "mass per volume of solution", 2],
  ["g/L solvent", "g/L solvent", "mass per volume of solvent", 2],
  ["g/g solvent", "g/g solvent", "mass ratio", 2],
  ["g/kg solvent", "g/kg solvent", "mass ratio", 0.002],
  ["g/kg solution", "g/kg solution", "mass fraction", 0.002],
  ["g/mL solution", "g/mL solution", "mass per volume of solution", 2000],
  ["mg/mL solution", "mg/mL solution", "mass per volume of solution", 2],
  ["mg/mL solvent", "mg/mL solvent", "mass per volume of solvent", 2],
  ["mg/L solution", "mg/L solution", "mass per volume of solution", 0.002],
  ["ug/mL solution", "ug/mL solution", "mass per volume of solution", 0.002],
  ["mg/kg solution", "mg/kg solution", "mass fraction", 2e-6],
  ["mole fraction", "mole fraction", "mole fraction", 2],
  ["mol %", "mol %", "mole fraction", 0.02],
  ["mole ratio", "mole ratio", "mole ratio", 2],
  ["mass fraction", "mass fraction", "mass fraction", 2],
  ["mol/L solution", "mol/L solution", "amount per volume of solution", 2000],
  ["mol/L", "mol/L solution", "amount per volume of solution", 2000],
  ["M", "mol/L solution", "amount per volume of solution", 2000],
  ["mol/L solvent", "mol/L solvent", "amount per volume of solvent", 2000],
  ["mmol/L solution", "mmol/L solution", "amount per volume of solution", 2],
  ["mol/kg solvent", "mol/kg solvent", "amount per mass of solvent", 2],
  ["log10(mol/L)", "log10(mol/L)", "amount per volume of solution", 1e5],
  ["ln x", "ln x", "mole fraction", Math.exp(2)],
  ["-ln x", "-ln x", "mole fraction", Math.exp(-2)],
  ["10^3 x", "10^3 x", "mole fraction", 0.002],
  ["10^5 x", "10^5 x", "mole fraction", 2e-5],
  ["1000 x", "10^3 x", "mole fraction", 0.002],
  ["100 w", "100 w", "mass fraction", 0.02],
  ["mL solvent/g", "mL solvent/g", "mass per volume of solvent", 500],
  ["mg/mL", "mg/mL", "mass per volume of solution", 2],
  ["g/L", "g/L", "mass per volume of solution", 2],
  ["pharmacopoeia term", "pharmacopoeia term", "mass per volume of solvent", 500],
];

test.each(stated)("%s is read as %s on the basis %s", (text, canonical, basis, quantity) => {
  const unit = unitOf(text);
  expect(unit.canonical).toBe(canonical);
  expect(unit.basis).toBe(basis);
  expect(quantityFromValue(unit.scale, 2)).toBeCloseTo(quantity, 12);
  expect(valueFromQuantity(unit.scale, quantityFromValue(unit.scale, 2))).toBeCloseTo(2, 12);
});

const variants: readonly (readonly [string, string])[] = [
  ["G / 100 G   Solvent", "g/100 g solvent"],
  ["g/100gsolvent", "g/100 g solvent"],
  ["g per 100 g of solvent", "g/100 g solvent"],
  ["grams per 100 grams of solvent", "g/100 g solvent"],
  ["g solute/100 g solvent", "g/100 g solvent"],
  ["g/(100 g solvent)", "g/100 g solvent"],
  ["g·(100 g)⁻¹ solvent", "g/100 g solvent"],
  ["g kg-1 solvent", "g/kg solvent"],
  ["g·kg⁻¹ solution", "g/kg solution"],
  ["g/100 g soln", "g/100 g solution"],
  ["g/100 g saturated solution", "g/100 g solution"],
  ["µg/mL solution", "ug/mL solution"],
  ["μg/mL solution", "ug/mL solution"],
  ["mcg/ml solution", "ug/mL solution"],
  ["MG/ML SOLUTION", "mg/mL solution"],
  ["kg/m³ solution", "kg/m3 solution"],
  ["kg m-3 solution", "kg/m3 solution"],
  ["g/dm3 solution", "g/L solution"],
  ["g/cm³ solution", "g/mL solution"],
  ["wt%", "% w/w"],
  ["wt.-%", "% w/w"],
  ["mass %", "% w/w"],
  ["percent by mass", "% w/w"],
  ["% (w/w)", "% w/w"],
  ["%w/v", "% w/v"],
  ["% m/v", "% w/v"],
  ["mol%", "mol %"],
  ["mole percent", "mol %"],
  ["x", "mole fraction"],
  ["w", "mass fraction"],
  ["mol/mol solvent", "mole ratio"],
  ["mol·L⁻¹", "mol/L solution"],
  ["mol dm-3", "mol/L solution"],
  ["mol l^-1", "mol/L solution"],
  ["mM", "mmol/L solution"],
  ["mol/kg", "mol/kg solvent"],
  ["mol kg⁻¹", "mol/kg solvent"],
  ["molality", "mol/kg solvent"],
  ["LOG10 (mol/L)", "log10(mol/L)"],
  ["lg(mol/L)", "log10(mol/L)"],
  ["−ln x", "-ln x"],
  ["Ln X", "ln x"],
  ["ln(mole fraction)", "ln x"],
  ["log10 x", "log10 x"],
  ["10³ x", "10^3 x"],
  ["10^3·x", "10^3 x"],
  ["10^3 * x", "10^3 x"],
  ["x × 10³", "10^3 x"],
  ["x/10^-3", "10^3 x"],
  ["1e3 x", "10^3 x"],
  ["1000x", "10^3 x"],
  ["10^2 w", "100 w"],
  ["10^-3 x", "10^-3 x"],
  ["mL solvent per g solute", "mL solvent/g"],
  ["ml of solvent / g", "mL solvent/g"],
];

test.each(variants)("%s is another spelling of %s", (text, canonical) => {
  expect(unitOf(text).canonical).toBe(canonical);
});

// UCUM specification v2.2, Regenstrief Institute: codes that say enough, with the reference as an annotation.
test.each([
  ["g/hg{solvent}", 0.02],
  ["g/(100.g){solvent}", 0.02],
  ["g/kg{solution}", 0.002],
  ["mg/mL{solution}", 2],
  ["g/dL{solution}", 20],
  ["%{w/w}", 0.02],
  ["mol/L", 2000],
  ["umol/L", 0.002],
  ["mol/m3", 2],
  ["mmol/kg", 0.002],
])("the UCUM code %s is read", (text, quantity) => {
  expect(quantityFromValue(unitOf(text).scale, 2)).toBeCloseTo(quantity, 12);
});

test("UCUM codes that mean something else than they seem are not taken for a unit", () => {
  expect(parseUnit("g/100.g").kind).toBe("unknown"); // (g/100).g, a mass squared
  expect(parseUnit("%{v/v}").kind).toBe("unknown");
  expect(parseUnit("g%").kind).toBe("open"); // g/dL in UCUM, a mass percentage to most
  expect(parseUnit("%{w/v}").kind).toBe("open"); // a plain % to UCUM
  expect(parseUnit("[ppm]").kind).toBe("open");
});

const open = [
  ...["g/100 g", "g/(100.g)", "g/hg", "g/100 mL", "g/dL", "mg/g", "ppm", "ppb", "[ppth]", "%", "percent", "g/kg"],
  ...[
    "mg/kg",
    "g/g",
    "kg/kg",
    "mol/mol",
    "m",
    "logS",
    "log x",
    "log mol/L",
    "mL/g",
    "103 x",
    "x × 10⁻³",
    "g/100 g sol.",
  ],
  ...["ln(g/100 g)", "‰", "mg/100 g", "log(mol/L)"],
];

test.each(open)("%s is open, and each of its readings is a unit", (text) => {
  const parsed = parseUnit(text);
  expect(parsed.kind).toBe("open");
  const readings = parsed.kind === "open" ? parsed.readings : [];
  expect(readings.length).toBeGreaterThan(0);
  for (const reading of readings) expect(parseUnit(reading), reading).toMatchObject({ kind: "unit" });
});

test("g/100 g can be per solution or per solvent", () => {
  expect(parseUnit("g/100 g")).toEqual({ kind: "open", readings: ["g/100 g solution", "g/100 g solvent"] });
});

test.each(["", " ", "furlong", "g", "g/", "/g", "g/kg bread", "g/100 g anhydrous", "mol/kg solution", "x1", "% v/v"])(
  "%s is unknown",
  (text) => expect(parseUnit(text)).toEqual({ kind: "unknown" }),
);

test("hostile text is unknown and costs nothing", () => {
  for (const text of [
    "g/".repeat(5000),
    "(".repeat(79),
    "log10(".repeat(13),
    "1".repeat(80),
    "\u0000",
    "g\u200b/L",
    "g/25 mL",
  ]) {
    expect(parseUnit(text).kind).toBe("unknown");
  }
});

test("bare mg/mL and g/L are taken per solution below 20 g/L and are open from there up", () => {
  for (const [text, limit] of [
    ["mg/mL", 20],
    ["g/L", 20],
    ["ug/mL", 20000],
    ["kg/m3", 20],
    ["g/mL", 0.02],
  ] as const) {
    const unit = unitOf(text);
    expect(unit.bareVolume).toBe(true);
    expect(isOpenAt(unit, limit * 0.999)).toBe(false);
    expect(isOpenAt(unit, limit)).toBe(true);
    expect(unit.readings.map((reading) => unitOf(reading).basis)).toEqual([
      "mass per volume of solution",
      "mass per volume of solvent",
    ]);
  }
  expect(isOpenAt(unitOf("mg/mL solution"), 500)).toBe(false);
});

test("a unit that names water says so, for the caller to compare with the solvent", () => {
  expect(unitOf("g/100 g water")).toMatchObject({ basis: "mass ratio", namedSolvent: "water" });
  expect(unitOf("g/100 g H2O").namedSolvent).toBe("water");
  expect(unitOf("g/100 g solvent").namedSolvent).toBeUndefined();
});

test("mol/kg is read as molality and the assumption is named", () => {
  expect(unitOf("mol/kg").assumption).toMatch(/per kilogram of solvent/);
  expect(unitOf("mol/kg solvent").assumption).toBeUndefined();
});

test("every spelling offered to a user is a unit, and every canonical spelling means the same unit", () => {
  for (const text of [...unitSpellings, ...variants.map(([variant]) => variant)]) {
    const { canonical, basis, scale } = unitOf(text);
    expect(unitOf(canonical)).toMatchObject({ canonical, basis, scale });
  }
});

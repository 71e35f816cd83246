import { type Basis, decimalScale, type ParsedUnit, type Unit } from "./unit.ts";

/** A unit that states its basis, as a parse result. */
export function statedUnit(
  canonical: string,
  basis: Basis,
  exponent: number,
  extra: Partial<Unit> = {},
): { kind: "unit"; unit: Unit } {
  const unit: Unit = { canonical, basis, scale: decimalScale(exponent), bareVolume: false, readings: [], ...extra };
  return { kind: "unit", unit };
}

/** A spelling that leaves its basis open, with every spelling it could stand for. */
export function openUnit(...readings: readonly string[]): ParsedUnit {
  return { kind: "open", readings };
}

/** IUPAC gives mol/kg to molality; per kilogram of solution is rare enough to take as an assumption, not a question. */
export const molalityAssumption = "mol/kg read as molality, per kilogram of solvent";

const moleFraction = statedUnit("mole fraction", "mole fraction", 0);
const massFraction = statedUnit("mass fraction", "mass fraction", 0);
const moleRatio = statedUnit("mole ratio", "mole ratio", 0);
const molality = statedUnit("mol/kg solvent", "amount per mass of solvent", 0);
const molar = statedUnit("mol/L solution", "amount per volume of solution", 3);
const millimolar = statedUnit("mmol/L solution", "amount per volume of solution", 0);
const micromolar = statedUnit("umol/L solution", "amount per volume of solution", -3);
const terms = statedUnit("pharmacopoeia term", "mass per volume of solvent", 3, {
  scale: decimalScale(3, "reciprocal"),
});
const partsPerMillion = openUnit("mg/kg solution", "mg/kg solvent", "mg/L solution", "10^6 x");
const partsPerThousand = openUnit("g/kg solution", "g/kg solvent", "g/L solution", "10^3 x");
const partsPerBillion = openUnit("ug/kg solution", "ug/kg solvent", "ug/L solution", "10^9 x");
const partsPerTrillion = openUnit("ng/kg solution", "ng/kg solvent", "ng/L solution", "10^12 x");
const logarithmOfSolubility = openUnit("log10(mol/L)", "ln(mol/L)", "log10(g/100 g solvent)", "log10(g/L solution)");

const byName: ReadonlyMap<string, ParsedUnit> = new Map(
  (
    [
      [moleFraction, "x molefraction molarfraction molfraction amountfraction"],
      [massFraction, "w massfraction weightfraction wtfraction wt.fraction"],
      [moleRatio, "moleratio molarratio molratio amountratio"],
      [statedUnit("g/g solvent", "mass ratio", 0), "massratio weightratio"],
      [molality, "molality molal"],
      [molar, "molarity molar"],
      [millimolar, "millimolar"],
      [micromolar, "micromolar"],
      [terms, "pharmacopoeiaterm pharmacopoeiaterms pharmacopeiaterm pharmacopeiaterms"],
      [terms, "pharmacopoeialterm pharmacopoeialterms pharmacopeialterm pharmacopeialterms"],
      [partsPerMillion, "ppm partspermillion"],
      [statedUnit("mg/kg solution", "mass fraction", -6), "ppmw/w ppm(w/w) ppmw ppmbymass ppmm/m ppm(m/m)"],
      [partsPerThousand, "ppth ppt ‰ permille permil partsperthousand"],
      [partsPerBillion, "ppb partsperbillion"],
      [partsPerTrillion, "pptr partspertrillion"],
      [logarithmOfSolubility, "logs log10s lgs lns"],
      // In a heading "m" is molality to one reader and a slip for M to another.
      [openUnit("mol/kg solvent", "mol/L solution"), "m"],
    ] as const
  ).flatMap(([parsed, names]) => names.split(" ").map((name) => [name, parsed] as const)),
);

// The one place where case decides: M is molar, m is not.
const byExactName: ReadonlyMap<string, ParsedUnit> = new Map([
  ["M", molar],
  ["mM", millimolar],
  ["uM", micromolar],
  ["nM", statedUnit("nmol/L solution", "amount per volume of solution", -6)],
]);

const percentNames: ReadonlyMap<string, ParsedUnit> = new Map(
  (
    [
      [
        statedUnit("% w/w", "mass fraction", -2),
        "w/w m/m wt/wt wt wt. weight mass bymass byweight bywt mass/mass weight/weight",
      ],
      [
        statedUnit("% w/v", "mass per volume of solution", 1),
        "w/v m/v wt/v wt/vol weight/volume mass/volume weight/vol mass/vol",
      ],
      [statedUnit("mol %", "mole fraction", -2), "mol mol. mole moles molar amount bymole bymoles byamount"],
      // UCUM reads g% as g/dL, most people as a mass percentage.
      [openUnit("g/100 mL solution", "g/100 mL solvent", "g/100 g solution", "g/100 g solvent"), "g gram"],
      [openUnit("mg/100 mL solution", "mg/100 mL solvent", "mg/100 g solution", "mg/100 g solvent"), "mg"],
    ] as const
  ).flatMap(([parsed, names]) => names.split(" ").map((name) => [name, parsed] as const)),
);

const barePercent = openUnit("% w/w", "% w/v", "mol %", "g/100 g solvent");

/** A unit that is one name: `mole fraction`, `w`, `M`, `molality`, `ppm`. `plain` keeps its case, spaces removed. */
export function namedUnit(plain: string): ParsedUnit | undefined {
  return byExactName.get(plain) ?? byName.get(plain.toLowerCase());
}

/** A percentage: `% w/w`, `wt%`, `mass-%`, `% (w/v)`, `mol %`; a bare `%` is open. `plain` in lower case, no spaces. */
export function percentage(plain: string): ParsedUnit | undefined {
  // UCUM ignores what stands in braces, so %{w/v} is a plain % to a program and w/v to a reader.
  if (plain === "%{w/v}" || plain === "%{m/v}") return barePercent;
  const marked = plain.replace(/percent|pct/, "%");
  if (!/^[^%]*%[^%]*$/.test(marked)) return undefined;
  const ofWhat = marked.replace("%", "").replace(/^[-({]+|[-)}]+$/g, "");
  return ofWhat === "" ? barePercent : percentNames.get(ofWhat);
}

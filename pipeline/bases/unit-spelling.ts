const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

function superscriptRun(run: string): string {
  let plain = "^";
  for (const sign of run) {
    if (sign === "⁻") plain += "-";
    else if (sign !== "⁺") plain += superscripts.indexOf(sign);
  }
  return plain;
}

/**
 * A unit's text with its typography made plain: superscripts as `^-1`, every dash as `-`, middle dots as `·`, crosses as
 * `*`, division slashes as `/`, micro and mu as `u`, runs of white space as one space. Letter case is kept.
 * Undefined for an empty text or one longer than 80 characters, which is no unit.
 */
export function plainSpelling(text: string): string | undefined {
  if (text.length > 80) return undefined;
  const plain = text
    // Before normalisation, which would turn 10³ into 103.
    .replace(/[⁺⁻⁰¹²³⁴-⁹]+/g, superscriptRun)
    // The two look-alikes of the degree sign, before normalisation takes them apart.
    .replace(/[º˚]/g, "°")
    .normalize("NFKC")
    .replace(/[‐-―−﹣]/g, "-")
    .replace(/[·⋅∙•‧]/g, "·")
    .replace(/[×✕✖∗]/g, "*")
    .replace(/[∕⁄÷]/g, "/")
    .replace(/μ/g, "u")
    .replace(/\s+/g, " ")
    .trim();
  return plain === "" ? undefined : plain;
}

/** A decimal unit: its printed symbol and the power of ten that takes it to kg, m3 or mol. */
export interface DecimalUnit {
  readonly symbol: string;
  readonly kind: "mass" | "volume" | "amount";
  readonly exponent: number;
}

const decimalUnits: ReadonlyMap<string, DecimalUnit> = new Map(
  (
    [
      ["mass", "kg", 0, "kilogram kilogramme kilo"],
      ["mass", "hg", -1, ""],
      ["mass", "g", -3, "gm gram gramme"],
      ["mass", "mg", -6, "milligram milligramme"],
      ["mass", "ug", -9, "mcg microgram"],
      ["mass", "ng", -12, "nanogram"],
      ["volume", "m3", 0, "m^3"],
      ["volume", "L", -3, "l liter litre dm3 dm^3"],
      ["volume", "dL", -4, "dl deciliter decilitre"],
      ["volume", "cL", -5, "cl"],
      ["volume", "mL", -6, "ml milliliter millilitre cm3 cm^3 cc"],
      ["volume", "uL", -9, "ul mm3 mm^3 microliter microlitre"],
      ["amount", "kmol", 3, ""],
      ["amount", "mol", 0, "mole"],
      ["amount", "mmol", -3, "millimole"],
      ["amount", "umol", -6, "micromole"],
      ["amount", "nmol", -9, "nanomole"],
    ] as const
  ).flatMap(([kind, symbol, exponent, others]) => {
    const unit: DecimalUnit = { symbol, kind, exponent };
    const words = others === "" ? [] : others.split(" ");
    const plurals = words.filter((word) => /^[a-z]{4,}$/.test(word)).map((word) => `${word}s`);
    return [symbol.toLowerCase(), ...words, ...plurals].map((spelling) => [spelling, unit] as const);
  }),
);

/** The decimal unit a lower-case spelling names (`g`, `litres`, `dm^3`, `mcg`), or undefined. */
export function decimalUnit(spelling: string): DecimalUnit | undefined {
  return decimalUnits.get(spelling);
}

/** Regular-expression source that matches every spelling `decimalUnit` knows, longest first. */
export const decimalUnitPattern: string = Array.from(decimalUnits.keys())
  .sort((a, b) => b.length - a.length)
  .map((spelling) => spelling.replace("^", "\\^"))
  .join("|");

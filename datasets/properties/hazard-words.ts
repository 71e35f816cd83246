/** Hazard classes in words, by the codes of the solvent list; from memory, for screening, not a safety data sheet. */
const WORDS: ReadonlyMap<string, string> = new Map([
  ["EF", "extremely flammable"],
  ["HF", "highly flammable"],
  ["FL", "flammable"],
  ["CL", "combustible"],
  ["PF", "peroxide-forming"],
  ["TOX", "toxic"],
  ["CARC", "carcinogen"],
  ["CARC?", "suspected carcinogen"],
  ["MUT", "mutagen"],
  ["REPR", "toxic to reproduction"],
  ["COR", "corrosive"],
  ["EYE", "eye irritant"],
  ["ASP", "aspiration hazard"],
  ["NEURO", "neurotoxic"],
  ["OZ", "ozone-depleting"],
  ["ENV", "harmful to aquatic life"],
  ["VOL", "very volatile"],
  ["EXPL", "explosive"],
]);

/** A `;` list of hazard codes as a `;` list of words. @throws Error for an unknown code. */
export function hazardWords(codes: string): string {
  if (codes === "" || codes === "none") return "";
  return codes
    .split(";")
    .map((code) => {
      const word = WORDS.get(code);
      if (word === undefined) throw new Error(`hazard code "${code}" is not known`);
      return word;
    })
    .join(";");
}

const OXIDISING = /ClO\d?|BrO3|IO[34]|MnO4|Cr2O7|CrO[34]|NO[23]|S2O8|Na2O2/;
const ENERGETIC = /^NH4(?:NO3|ClO4|NO2)|N3\b/;
const TOXIC_ELEMENTS = /Pb|Cd|Hg|As|Tl|Be(?![a-z])|Ni|Cr|Ba|Sb|UO2|Se|F(?![a-z])|\(CN\)|C2O4/;

/** Hazard classes of an inorganic salt by its written formula: oxidising and poisonous ions (common knowledge). */
export function saltHazards(formula: string): string {
  const harmless = /BaSO4|Fe\(CN\)6/.test(formula);
  return [
    OXIDISING.test(formula) ? "oxidiser" : "",
    ENERGETIC.test(formula) ? "energetic" : "",
    !harmless && TOXIC_ELEMENTS.test(formula.replace(/Fe|Fr|Fm/g, "")) ? "toxic" : "",
    /^(?:Na|K|Rb|Cs|Li)OH$/.test(formula) ? "corrosive" : "",
  ]
    .filter((word) => word !== "")
    .join(";");
}

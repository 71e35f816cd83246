import type { ElementCounts } from "./formula.ts";

/** Elements whose compounds dissolve in water as ions, as a rule. */
const METALS: ReadonlySet<string> = new Set(
  (
    "Li Na K Rb Cs Be Mg Ca Sr Ba Al Ga In Tl Sn Pb Bi Sb Sc Y La Ce Pr Nd Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Ti Zr Hf V Nb " +
    "Ta Cr Mo W Mn Re Fe Ru Os Co Rh Ir Ni Pd Pt Cu Ag Au Zn Cd Hg Th U"
  ).split(" "),
);

const SALT_NAME =
  /\b(?:(?:mono|di|tri|hemi)?(?:hydrochloride|hydrobromide|hydroiodide|hydrofluoride|mesylate|mesilate|tosylate|besylate)|(?:mono|di|tri)?(?:sodium|potassium|lithium|ammonium))\b/i;

/** What dissolves as ions: a salt with a carbon-hydrogen part or one without. */
export type SaltKind = "inorganic" | "organic";

/** What tells a salt. */
export interface SaltMarks {
  readonly name: string;
  /** Formula as written: `NH4NO3` shows its ammonium, a Hill formula does not. */
  readonly formula: string | undefined;
  readonly smiles: string | undefined;
  /** Elements without crystal water. */
  readonly elements: ElementCounts | undefined;
}

/**
 * Whether a substance is a salt, by these marks: a metal beside another element, ammonium in the written formula,
 * separate ions in the SMILES, or a counter-ion in the name. Undefined for everything else (acids, bases,
 * zwitterions). Organic if it holds carbon and hydrogen other than a hydrogen carbonate. Common practice.
 */
export function saltKind({ name, formula, smiles, elements }: SaltMarks): SaltKind | undefined {
  const symbols = elements === undefined ? [] : [...elements.keys()];
  const metallic = symbols.length > 1 && symbols.some((symbol) => METALS.has(symbol));
  const ionic = smiles?.includes(".") === true && /[+-]\d*\]/.test(smiles);
  if (!(metallic || ionic || (formula !== undefined && /NH4/.test(formula)) || SALT_NAME.test(name))) return undefined;
  return elements !== undefined && isInorganic(elements, formula ?? "") ? "inorganic" : "organic";
}

/** No carbon, or carbon whose only hydrogens are those of ammonium or of a hydrogen carbonate. */
function isInorganic(elements: ElementCounts, formula: string): boolean {
  const carbon = elements.get("C") ?? 0;
  const ammonium = formula.includes("NH4") ? 4 * (elements.get("N") ?? 0) : 0;
  const hydrogen = Math.max(0, (elements.get("H") ?? 0) - ammonium);
  return carbon === 0 || hydrogen === 0 || (carbon === 1 && hydrogen === 1 && elements.get("O") === 3);
}

import type { CompositionBasis } from "../../bases/compositions.ts";
import type { SubstanceIndex } from "../../properties/substances.ts";
import type { CellFault } from "../../records/cells.ts";
import { type DecimalMark, parseNumber } from "../../records/number-text.ts";
import type { StatedNumber } from "./mixture-cell.ts";
import { listedSubstance } from "./mixture-names.ts";
import { bareName, readMixtureText } from "./mixture-text.ts";

/** What a composition cell states. */
export interface CompositionCell {
  readonly numbers: readonly StatedNumber[];
  readonly basis: CompositionBasis | undefined;
  readonly scale: "percent" | "fraction" | undefined;
  readonly solute: "counted" | "free" | undefined;
}

const field = "composition";

/**
 * Reads a composition cell: `0.7`, `70 %`, `70:30`, `50/30/20`, `0.3 water`. A bare number is the fraction of the first
 * component of the solvent cell.
 */
export function readCompositionCell(
  text: string,
  decimal: DecimalMark,
  index: SubstanceIndex,
): CompositionCell | CellFault {
  const plain = parseNumber(text, decimal);
  if (plain.ok) {
    if (plain.value < 0) return { field, code: "composition-out-of-range", found: `${text} of a solvent` };
    return { numbers: [{ value: plain.value, percent: false }], basis: undefined, scale: undefined, solute: undefined };
  }
  if (plain.code === "ambiguous-number") return { field, code: plain.code, found: plain.found };
  if (/^\s*[-−]\s?\d/.test(text)) return { field, code: "composition-out-of-range", found: `${text} of a solvent` };
  const read = readMixtureText(text, decimal);
  if ("fault" in read) {
    const code = read.fault === "two bases" ? "contradictory-composition" : "unsupported-composition";
    return { field, code, found: read.found };
  }
  const { basis, scale, solute } = read;
  const name = bareName(read.names);
  if (read.ratio.length > 0 && name === "" && read.numbers.length === 0) {
    return { numbers: read.ratio, basis, scale, solute };
  }
  const [only, ...more] = read.numbers;
  const said = name === "" ? only?.of : name;
  const of = said === undefined ? (read.aqueous ? index.byName("water") : undefined) : listedSubstance(said, index);
  if (only === undefined || more.length > 0 || read.ratio.length > 0) {
    return { field, code: "unsupported-composition", found: `"${text}" is no composition` };
  }
  if (said !== undefined && of === undefined) {
    return { field, code: "unknown-mixture-partner", found: `"${said}" of "${text}" is no solvent of the tables` };
  }
  return { numbers: [{ value: only.value, percent: only.percent, place: only.place, of }], basis, scale, solute };
}

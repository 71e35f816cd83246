import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import { type DecimalMark, parseNumber } from "../records/number-text.ts";

/** Marks of a mixture in a solvent's name. */
const MIXTURE = /[/+:%]|\bv\/v\b|\band\b|\bwith\b|\d\s*(?:wt|vol|mol)\b/i;

/** Water in a solvent, percent by mass, from which it is a mixture and no longer the plain solvent. */
const WET_WT_PERCENT = 0.5;

/**
 * The solvent a cell names, or why it cannot be used. Only a listed solvent is taken; spellings that are near are
 * suggested, never assumed.
 */
export function resolveSolvent(
  text: string,
  composition: string,
  waterWtPercent: string,
  decimal: DecimalMark,
  index: SubstanceIndex,
): Substance | CellFault {
  if (text === "") return { field: "solvent", code: "missing-solvent", found: "the cell is empty" };
  const substance = index.byName(text) ?? index.byCas(text) ?? index.byInchikey(text);
  if (substance === undefined) {
    if (MIXTURE.test(text) || composition !== "") {
      return { field: "solvent", code: "unsupported-composition", found: `"${text}" is not a single listed solvent` };
    }
    const near = index.nearNames(text);
    const mend = near.length > 0 ? `did you mean ${near.join(" or ")}? Otherwise add it to substances.csv` : undefined;
    const found = `"${text}" is no solvent of the tables`;
    return { field: "solvent", code: "unknown-solvent", found, ...(mend === undefined ? {} : { mend }) };
  }
  if (!substance.roles.includes("solvent")) {
    const found = `"${text}" is listed as a solute only`;
    return {
      field: "solvent",
      code: "unknown-solvent",
      found,
      mend: "correct the row, or list it with the role solvent",
    };
  }
  if (composition !== "") {
    return {
      field: "composition",
      code: "unsupported-composition",
      found: `composition "${composition}" of ${substance.name}`,
    };
  }
  const water = waterWtPercent === "" || substance.name === "water" ? undefined : parseNumber(waterWtPercent, decimal);
  if (water !== undefined && (!water.ok || water.value < 0)) {
    const found = `"${waterWtPercent}" is not a water content in percent by mass`;
    return { field: "solvent_water_wt_percent", code: water.ok ? "value-not-positive" : water.code, found };
  }
  if (water?.ok && water.value > WET_WT_PERCENT) {
    const found = `${substance.name} with ${waterWtPercent} wt % water is a mixture`;
    return { field: "solvent_water_wt_percent", code: "unsupported-composition", found };
  }
  return substance;
}

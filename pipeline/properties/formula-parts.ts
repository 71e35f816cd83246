import { atomicWeight } from "./atomic-weights.ts";
import type { LegibleFormula } from "./formula-text.ts";

/** Molecules met as solvent of crystallisation or as counter-acid after a full stop. */
const GUEST =
  /^(?:\d+\/\d+|\d+(?:\.\d+)?|\.\d+)?(?:H2O2|H2O|D2O|HCl|HBr|HI|HF|HNO3|H2SO4|H3PO4|NH3|CH3OH|CH4O|C2H5OH|C2H6O|C3H8O|CH3CN|C2H3N|C2H6OS|C3H7NO)(?=$|[.·])/;

/**
 * Cuts a formula into its parts at `·` and at those full stops that join parts. The other full stops are decimal points.
 *
 * A full stop between digits is read in this order: inside a leading number it is a decimal point (`0.5H2O`); before a
 * whole guest molecule it joins (`CuSO4.5H2O`, `CaSO4.0.5H2O`); in a text that is one formula in Hill order it is a
 * decimal point (`CaHO4.5S`); else it joins.
 */
export function formulaParts({ text, places }: LegibleFormula): LegibleFormula[] {
  const parts: LegibleFormula[] = [];
  let start = 0;
  for (let index = 0; index <= text.length; index++) {
    const ends = index === text.length || text[index] === "·" || (text[index] === "." && joins(text, start, index));
    if (!ends) continue;
    parts.push({ text: text.slice(start, index), places: places.slice(start, index + 1) });
    start = index + 1;
  }
  return parts;
}

function joins(text: string, start: number, index: number): boolean {
  const before = text.slice(start, index);
  const nextDot = text.indexOf("·", index);
  const after = text.slice(index + 1, nextDot < 0 ? text.length : nextDot);
  if (!/^\d/.test(after)) return !(before === "" && after.startsWith("."));
  if (/^\d*$/.test(before)) return false;
  if (!/\d$/.test(before)) return true;
  if (GUEST.test(after)) return true;
  return !(/^\d+$/.test(after) || inHillOrder(`${before}.${after}`));
}

/** True for one formula without brackets in Hill order: carbon, hydrogen, the rest by letter, each element once. */
function inHillOrder(text: string): boolean {
  if (!/^(?:[A-Z][a-z]?(?:\d+(?:\.\d+)?)?)+$/.test(text)) return false;
  const elements: readonly string[] = text.match(/[A-Z][a-z]?/g) ?? [];
  const withCarbon = elements[0] === "C";
  const rank = (symbol: string) => (withCarbon && symbol === "C" ? 0 : withCarbon && symbol === "H" ? 1 : 2);
  return elements.every((symbol, index) => {
    const next = elements[index + 1];
    if (atomicWeight(symbol) === undefined) return false;
    if (next === undefined) return true;
    return rank(symbol) < rank(next) || (rank(symbol) === 2 && rank(next) === 2 && symbol < next);
  });
}

import type { CompositionBasis } from "../../bases/compositions.ts";
import type { Substance, SubstanceIndex } from "../../properties/substances.ts";
import type { CellFault } from "../../records/cells.ts";
import type { DecimalMark } from "../../records/number-text.ts";
import { listedSubstance, type NameSplit, nameSplits, unknownParts } from "./mixture-names.ts";
import { bareName, type CompositionNumber, marksIn, readMixtureText, type Share } from "./mixture-text.ts";

/** A number of a composition with the component it belongs to, where that is said. */
export interface StatedNumber extends Share {
  /** Its component by a symbol: 1 for x1. */
  readonly place?: number | undefined;
  readonly of?: Substance | undefined;
}

/** A solvent cell whose components are known. */
export interface NamedMixture {
  /** Listed substances in the order written, each once. */
  readonly components: readonly Substance[];
  readonly numbers: readonly StatedNumber[];
  readonly basis: CompositionBasis | undefined;
  readonly scale: "percent" | "fraction" | undefined;
  readonly solute: "counted" | "free" | undefined;
  readonly water: Substance;
}

const MOST = 3;

const fault = (code: CellFault["code"], found: string, mend?: string): CellFault => ({
  field: "solvent",
  code,
  found,
  ...(mend === undefined ? {} : { mend }),
});

/** Question after a spelling that is near to listed names; never assumed. */
function question(text: string, index: SubstanceIndex): string | undefined {
  const near = index.nearNames(text);
  return near.length === 0 ? undefined : `did you mean ${near.join(" or ")}? Otherwise add it to substances.csv`;
}

/** A solvent that no table lists, alone. */
export function unknownSolvent(text: string, index: SubstanceIndex): CellFault {
  return fault("unknown-solvent", `"${text}" is no solvent of the tables`, question(text, index));
}

/** Reads a solvent cell that is no single name: components, proportion and basis, in any of the usual notations. */
export function readMixtureCell(
  text: string,
  { decimal, solute: dissolved }: { readonly decimal: DecimalMark; readonly solute: string },
  water: Substance,
  index: SubstanceIndex,
): NamedMixture | CellFault {
  const read = readMixtureText(text, decimal);
  if ("fault" in read) {
    return fault(read.fault === "two bases" ? "contradictory-composition" : "unsupported-composition", read.found);
  }
  const splits = nameSplits(read.names, index, bareName);
  if (splits.length > 1) {
    const shown = splits.slice(0, 3).map((split) => split.map(({ substance }) => substance.name).join(" + "));
    return fault("ambiguous-mixture", `"${text}" can be ${shown.join(", or ")}`);
  }
  const [split] = splits;
  if (split === undefined) return unresolved(text, read.names, read.ratio.length + read.numbers.length > 0, index);
  const named = split.map(({ substance }) => substance);
  const components = read.aqueous && !named.includes(water) ? [...named, water] : named;
  if (new Set(components).size < components.length) {
    return fault("unsupported-composition", `"${text}" names one solvent twice`);
  }
  if (components.length > MOST) {
    return fault("too-many-components", `"${text}" has ${components.length} components`);
  }
  if (components.some(({ name }) => name === dissolved)) {
    return fault("solvent-is-solute", `${dissolved} is the solute and a component of "${text}"`);
  }
  const notSolvent = components.find(({ roles }) => !roles.includes("solvent"));
  if (notSolvent !== undefined) {
    const mend = "correct the row, or list it with the role solvent";
    return fault("unknown-mixture-partner", `${notSolvent.name} is listed as a solute only`, mend);
  }
  const stranger = read.numbers.find(({ of }) => of !== undefined && listedSubstance(of, index) === undefined);
  if (stranger !== undefined) {
    return fault("unknown-mixture-partner", `"${stranger.of}" of "${text}" is no solvent of the tables`);
  }
  const { basis, scale, solute } = read;
  const numbers = read.ratio.length > 0 ? read.ratio : placed(read.numbers, split, components, index);
  if (read.ratio.length > 0 && read.numbers.length > 0) {
    return fault("unsupported-composition", `"${text}" states a ratio and another number`);
  }
  return { components, numbers, basis, scale, solute, water };
}

/** Single numbers with their components: by symbol, else by the name they stand before or, inside a list, behind. */
function placed(
  numbers: readonly CompositionNumber[],
  split: NameSplit,
  components: readonly Substance[],
  index: SubstanceIndex,
): StatedNumber[] {
  const owners = new Map<number, Substance>();
  split.forEach(({ substance, text }, i) => {
    const last = i === split.length - 1 && components.length > 1;
    for (const { number, leads } of marksIn(text)) if (leads || !last) owners.set(number, substance);
  });
  return numbers.map(({ value, percent, place, of }, i) => {
    const stated = of === undefined ? undefined : listedSubstance(of, index);
    const byPlace = place === undefined ? undefined : components[place - 1];
    // One number for each component stands in their order, wherever it is written.
    const inOrder = numbers.length === components.length ? components[i] : owners.get(i);
    return { value, percent, place, of: stated ?? byPlace ?? inOrder };
  });
}

/** Why the names of a cell cannot be told: too many of them, or one that is in no table. */
function unresolved(text: string, names: string, hasNumbers: boolean, index: SubstanceIndex): CellFault {
  const { unknown, count } = unknownParts(names, index, bareName);
  if (count > MOST) return fault("too-many-components", `"${text}" has ${count} components`);
  if (count > 1 && unknown.length > 0) {
    const shown = unknown.map((part) => `"${part}"`).join(" and ");
    const mend = unknown.map((part) => question(part, index)).find((one) => one !== undefined);
    return fault("unknown-mixture-partner", `${shown} of "${text}" is no solvent of the tables`, mend);
  }
  const [only] = unknown;
  if (only === undefined) return fault("unsupported-composition", `"${text}" names no solvent that can be told`);
  return hasNumbers
    ? fault("unknown-solvent", `"${only}" of "${text}" is no solvent of the tables`, question(only, index))
    : unknownSolvent(text, index);
}

import { compositionKey, meanMolarMass } from "../bases/compositions.ts";
import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { MadeUp, ReadingSolvent, SolventPart } from "../records/identified.ts";
import { parseNumber } from "../records/number-text.ts";
import type { Identity } from "../records/systems.ts";
import { type CompositionCells, resolveMixture } from "./mixtures/mixture.ts";
import { type NamedMixture, readMixtureCell, unknownSolvent } from "./mixtures/mixture-cell.ts";
import { listedSubstance } from "./mixtures/mixture-names.ts";

/** Everything a row says of its solvent. */
export interface SolventCells extends CompositionCells {
  readonly solvent: string;
  readonly waterWtPercent: string;
  readonly grade: string;
  /** Key of the row's solute, which cannot be a component as well. */
  readonly solute: string;
}

/** The solvent of a row with its key and what was assumed on the way. */
export interface ResolvedSolvent {
  readonly solvent: ReadingSolvent;
  readonly key: Pick<Identity, "solvent" | "composition" | "solventComponents" | "solventMolarMass">;
  readonly assumptions: readonly string[];
}

const WATER = "water";
/** Names that say themselves that the ethanol is dry. */
const SAID_DRY = /absolute|anhydrous|dry/i;
const TAKEN_ABSOLUTE = "ethanol without grade or water content taken absolute";
const MOST = 3;
/** A water content and the water of a composition that agree this well are one and the same statement. */
const SAME_WATER = 0.01;
/** More water than this is not what a solvent called by its plain name brings along. */
const WETTEST = 0.05;

/** Code-unit order of names, water last. */
const inOrder = (a: SolventPart, b: SolventPart): number => {
  const [x, y] = [a.substance.name, b.substance.name];
  if (x === WATER || y === WATER) return x === y ? 0 : x === WATER ? 1 : -1;
  return x < y ? -1 : x > y ? 1 : 0;
};

/** A pure solvent, told by its name, synonym or identifier; a fault where it is in no table or listed as a solute only. */
function pureSolvent(text: string, index: SubstanceIndex): Substance | CellFault | undefined {
  const substance = listedSubstance(text, index);
  if (substance === undefined || substance.roles.includes("solvent")) return substance;
  const found = `"${text}" is listed as a solute only`;
  return {
    field: "solvent",
    code: "unknown-solvent",
    found,
    mend: "correct the row, or list it with the role solvent",
  };
}

/**
 * The solvent a row names: one listed solvent, or a mixture of up to three with its exact composition by mass, the water
 * stated for it counted. Spellings that are near are suggested, never assumed.
 */
export function resolveSolvent(cells: SolventCells, index: SubstanceIndex): ResolvedSolvent | CellFault {
  const { solvent: text, composition } = cells;
  if (text === "") return { field: "solvent", code: "missing-solvent", found: "the cell is empty" };
  const pure = pureSolvent(text, index);
  if (pure !== undefined && "code" in pure) return pure;
  if (pure !== undefined && composition === "") {
    if (cells.waterWtPercent === "") return plain(pure, cells);
    return withWater([{ substance: pure, massFraction: 1 }], "pure", 0, [], cells, index);
  }
  const water = index.byName(WATER);
  if (water === undefined) return unknownSolvent(text, index);
  const named: NamedMixture | CellFault =
    pure === undefined
      ? readMixtureCell(text, cells, water, index)
      : { components: [pure], numbers: [], basis: undefined, scale: undefined, solute: undefined, water };
  if ("code" in named) return named;
  const mixture = resolveMixture(named, cells, index);
  if ("code" in mixture) return mixture;
  return withWater(mixture.parts, mixture.madeUp, mixture.openU, mixture.assumptions, cells, index);
}

/** Plain solvents resolved before, dry and taken absolute: nearly every row has one, and they are all alike. */
const plainSolvents = new WeakMap<Substance, Map<boolean, ResolvedSolvent>>();

/** A solvent by its plain name. */
function plain(substance: Substance, { grade, solvent }: SolventCells): ResolvedSolvent {
  const takenAbsolute = substance.name === "ethanol" && grade === "" && !SAID_DRY.test(solvent);
  const known = plainSolvents.get(substance) ?? new Map<boolean, ResolvedSolvent>();
  plainSolvents.set(substance, known);
  const resolved = known.get(takenAbsolute) ?? keyed([{ substance, massFraction: 1 }], "pure", 0, [], takenAbsolute);
  known.set(takenAbsolute, resolved);
  return resolved;
}

/** Counts the water content stated for a solvent among its parts. */
function withWater(
  parts: readonly SolventPart[],
  madeUp: MadeUp,
  openU: number,
  assumptions: readonly string[],
  cells: SolventCells,
  index: SubstanceIndex,
): ResolvedSolvent | CellFault {
  const { waterWtPercent: text, decimal } = cells;
  const own = parts.find(({ substance }) => substance.name === WATER)?.massFraction ?? 0;
  const [first] = parts;
  if (text === "" && parts.length === 1 && first !== undefined && assumptions.length === 0) {
    return plain(first.substance, cells);
  }
  if (text === "" || own === 1) return keyed(parts, madeUp, openU, assumptions, false);
  const field = "solvent_water_wt_percent";
  const number = parseNumber(text, decimal);
  if (!number.ok || number.value < 0) {
    const found = `"${text}" is not a water content in percent by mass`;
    return { field, code: number.ok ? "value-not-positive" : number.code, found };
  }
  const w = number.value / 100;
  if (w > 1) return { field, code: "composition-out-of-range", found: `${text} wt % water` };
  if (own > 0 && Math.abs(w - own) <= SAME_WATER) return keyed(parts, madeUp, openU, assumptions, false);
  if (own > 0 && w > WETTEST) {
    const found = `${text} wt % water beside a composition with ${Number((100 * own).toPrecision(3))} wt %`;
    return { field, code: "contradictory-composition", found };
  }
  const water = index.byName(WATER);
  if (w === 0 || water === undefined) return keyed(parts, madeUp, openU, assumptions, false);
  // The solvents as they were used held this water; what the mixture has of its own stays beside it.
  const others = parts.filter(({ substance }) => substance.name !== WATER);
  const wet = others.map(({ substance, massFraction }) => ({ substance, massFraction: massFraction * (1 - w) }));
  const all = [...wet, { substance: water, massFraction: own + (1 - own) * w }];
  if (all.length > MOST) {
    return { field, code: "too-many-components", found: `${text} wt % water in a mixture of ${parts.length} solvents` };
  }
  return keyed(all, madeUp === "pure" ? "water content" : madeUp, openU, assumptions, false);
}

/** Sorts the parts, gives them their composition key, and says what is too little for it. */
function keyed(
  parts: readonly SolventPart[],
  madeUp: MadeUp,
  openU: number,
  assumptions: readonly string[],
  takenAbsolute: boolean,
): ResolvedSolvent {
  const solvent = solventOf(parts, parts, madeUp, openU, takenAbsolute);
  const key = keyOf(solvent);
  const traces = solvent.parts.slice(key.solventComponents.length);
  const shown = traces.map(
    ({ substance, massFraction }) => `${Number((100 * massFraction).toPrecision(2))} wt % ${substance.name}`,
  );
  const trace = `${shown.join(" and ")} counted in the mole fraction, too little for a system of its own`;
  const all = [...assumptions, traces.length === 0 ? "" : trace, takenAbsolute ? TAKEN_ABSOLUTE : ""];
  return { solvent, key, assumptions: all.filter((text) => text !== "") };
}

/** A reading's solvent with its parts in order: those with a key first, by name with water last, then traces. */
export function solventOf(
  parts: readonly SolventPart[],
  added: readonly SolventPart[],
  madeUp: MadeUp,
  openU: number,
  takenAbsolute: boolean,
): ReadingSolvent {
  const steps = compositionKey(parts.map(({ massFraction }) => massFraction));
  const kept = parts.filter((_, i) => (steps[i] ?? 0) > 0).sort(inOrder);
  const traces = parts.filter((_, i) => !((steps[i] ?? 0) > 0)).sort(inOrder);
  const name = kept.map(({ substance }) => substance.name).join(" + ");
  return { name, parts: [...kept, ...traces], added, madeUp, openU, takenAbsolute };
}

/** The key of a solvent: names, `70.5:29.5 w/w`, and the molar mass by the exact composition. */
export function keyOf({ name, parts }: ReadingSolvent): ResolvedSolvent["key"] {
  const fractions = parts.map(({ massFraction }) => massFraction);
  const steps = compositionKey(fractions);
  const components = parts
    .map(({ substance }, i) => ({ name: substance.name, massFraction: (steps[i] ?? 0) / 100 }))
    .filter(({ massFraction }) => massFraction > 0);
  const percent = components.map(({ massFraction }) => Number((100 * massFraction).toFixed(1)));
  return {
    solvent: name,
    composition: components.length === 1 ? "" : `${percent.join(":")} w/w`,
    solventComponents: components,
    solventMolarMass: molarMassOf(parts),
  };
}

/** Mean molar mass of exact parts, g/mol; NaN where one is unknown. */
function molarMassOf(parts: readonly SolventPart[]): number {
  const masses = parts.map(({ substance }) => substance.molarMass ?? Number.NaN);
  const fractions = parts.map(({ massFraction }) => massFraction);
  // A pure solvent keeps its molar mass to the last digit.
  return masses.length === 1 ? (masses[0] ?? Number.NaN) : meanMolarMass(fractions, masses);
}

import type { Unit } from "../bases/unit.ts";
import type { CellFault } from "../records/cells.ts";
import type { Identified } from "../records/identified.ts";
import type { Reading } from "../records/readings.ts";
import type { Identity } from "../records/systems.ts";
import type { LiquorModel } from "./liquor.ts";
import type { SourceCells } from "./source-cells.ts";
import { bindUnit, foreignGuest, readSoluteBasis, readUnit, type UnitContext } from "./unit-context.ts";

/** A unit bound to a liquor, with all that it depends on besides the liquor. */
interface KnownContext {
  readonly unitText: string;
  readonly basisText: string;
  readonly density: string | undefined;
  readonly atVolume: boolean;
  readonly context: UnitContext;
}

/** A liquor has few contexts and they are looked through in turn; more than these are made anew at each row. */
const KEPT = 16;

/** Finds the unit of a row bound to its liquor under the conditions set, or says why it cannot be read with it. */
export type ContextFinder = (
  who: Identified,
  unitText: string,
  reading: Reading,
  valueText: string,
) => UnitContext | CellFault;

/** Makes the finder of one source: every unit is parsed once, and bound once to each liquor and kind of density. */
export function contextFinder(
  cells: SourceCells,
  identities: readonly Identity[],
  liquorOf: (who: Identified) => LiquorModel,
): ContextFinder {
  const units = new Map<string, Unit | CellFault>();
  const contexts = new Map<Identified, KnownContext[]>();

  const unitOf = (text: string): Unit | CellFault => {
    let unit = units.get(text);
    if (unit === undefined) {
      unit = readUnit(text);
      units.set(text, unit);
    }
    return unit;
  };

  const make = (who: Identified, unitText: string, basisText: string, valueText: string): UnitContext | CellFault => {
    const unit = unitOf(unitText);
    if ("code" in unit) return unit;
    const solvent = identities[who.index]?.solvent;
    if (unit.namedSolvent !== undefined && solvent !== unit.namedSolvent) {
      return { field: "solubility", code: "open-unit", found: `"${unitText}" in ${solvent}` };
    }
    const basis = readSoluteBasis(basisText, who, unit, valueText);
    if (typeof basis !== "string") return basis;
    const context = bindUnit(unit, basis, liquorOf(who), foreignGuest(who));
    if (!("code" in context) || context.code !== "no-density") return context;
    return { ...context, found: liquorOf(who).missingDensity() ?? context.found };
  };

  return (who, unitText, reading, valueText) => {
    const basisText = cells.text.solute_basis(reading);
    // What a conversion assumes follows from which densities it has, so those decide too.
    const { solutionDensity: model, solventDensityAtVolumeTemperature } = liquorOf(who).needs;
    const density = model?.kind === "density function" ? model.name : model?.kind;
    const atVolume = solventDensityAtVolumeTemperature === undefined;
    let known = contexts.get(who);
    if (known === undefined) {
      known = [];
      contexts.set(who, known);
    }
    for (const one of known) {
      const same = one.unitText === unitText && one.basisText === basisText;
      if (same && one.density === density && one.atVolume === atVolume) return one.context;
    }
    const context = make(who, unitText, basisText, valueText);
    const keep = !("code" in context) && known.length < KEPT;
    if (keep) known.push({ unitText, basisText, density, atVolume, context });
    return context;
  };
}

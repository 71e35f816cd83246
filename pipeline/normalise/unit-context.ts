import { assumptionsOf } from "../bases/assumptions.ts";
import { type HubConverter, hubConverter } from "../bases/hub-converter.ts";
import type { SoluteBasis } from "../bases/hydrate.ts";
import { hydrateReadingsOf, linkOf } from "../bases/link.ts";
import type { Unit } from "../bases/unit.ts";
import { statedUnit } from "../bases/unit-names.ts";
import { parseUnit } from "../bases/units.ts";
import type { CellFault } from "../records/cells.ts";
import type { Identified } from "../records/identified.ts";
import type { LiquorModel } from "./liquor.ts";

const SOLUTE_BASES: readonly string[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];
const hub = statedUnit("g/g solvent", "mass ratio", 0).unit;

/** A unit bound to one solute, form and solvent: everything about a row that does not change with its numbers. */
export interface UnitContext {
  readonly unit: Unit;
  readonly soluteBasis: SoluteBasis;
  readonly liquor: LiquorModel;
  /** Undefined until the densities at a row's temperature are known to be there. */
  readonly converter: HubConverter;
  /** Assumptions of the conversion, in words. */
  readonly assumptions: readonly string[];
}

/** The unit a text names, or why the row cannot be read with it. */
export function readUnit(text: string): Unit | CellFault {
  const parsed = parseUnit(text);
  if (parsed.kind === "unit") return parsed.unit;
  if (parsed.kind === "unknown") {
    const found = text === "" ? "no unit of solubility is stated" : `"${text}" is not a unit of solubility`;
    return { field: "solubility", code: "unknown-unit", found };
  }
  const found = `"${text}" can be ${parsed.readings.join(", or ")}`;
  return { field: "solubility", code: "open-unit", found, expected: `one of ${parsed.readings.join(", ")}` };
}

/** What the solute was weighed as: as stated, anhydrous for an unsolvated solid, and a fault where it is open. */
export function readSoluteBasis(text: string, who: Identified, unit: Unit, valueText: string): SoluteBasis | CellFault {
  if (text !== "") {
    if (SOLUTE_BASES.includes(text)) return text as SoluteBasis;
    const found = `solute_basis "${text}"`;
    return { field: "solute_basis", code: "bad-choice", found, expected: `one of ${SOLUTE_BASES.join(", ")}` };
  }
  const readings = hydrateReadingsOf(unit.basis);
  if (!who.solvated || readings === "none") return "anhydrous";
  const found = `${valueText} ${unit.canonical} of a hydrate or solvate${openReadings(valueText, who, unit)}`;
  return { field: "solute_basis", code: "open-hydrate-basis", found };
}

/** The three readings of a number on a per-solvent basis as g anhydrous per 100 g total solvent, where R is known. */
function openReadings(valueText: string, { crystalMassFactor: R }: Identified, unit: Unit): string {
  const value = Number(valueText);
  if (unit.basis !== "mass ratio" || Number.isNaN(R) || !(value > 0)) return "";
  const q = (value * unit.scale.numerator) / unit.scale.denominator;
  const shown = [q, q / (R + q * (R - 1)), q / R].map((r) => Number((100 * r).toPrecision(3)));
  return `: anhydrous ${shown[0]}, hydrate per added solvent ${shown[1]}, hydrate equivalent per total solvent ${shown[2]} g anhydrous/100 g total solvent`;
}

/** Binds a unit to the properties of a liquor; a fault names the property that is missing. */
export function bindUnit(unit: Unit, soluteBasis: SoluteBasis, liquor: LiquorModel): UnitContext | CellFault {
  const result = hubConverter(unit, liquor.needs, soluteBasis);
  if (result.kind === "missing") {
    const found = `${unit.canonical} needs the ${result.missing.join(" and the ")}, which ${result.missing.length > 1 ? "are" : "is"} not known`;
    const density = result.missing.some((need) => need.startsWith("density"));
    return { field: "solubility", code: density ? "no-density" : "no-molar-mass", found };
  }
  const { needs } = liquor;
  const links = [linkOf(unit.basis, soluteBasis), linkOf("mass ratio")] as const;
  const assumptions = assumptionsOf(unit, needs, links[0], hub, needs, links[1]);
  return { unit, soluteBasis, liquor, converter: result.converter, assumptions };
}

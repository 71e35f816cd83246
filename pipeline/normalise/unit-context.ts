import { assumptionsOf } from "../bases/assumptions.ts";
import { type HubConverter, hubConverter } from "../bases/hub-converter.ts";
import type { SoluteBasis } from "../bases/hydrate.ts";
import { hydrateReadingsOf, linkOf } from "../bases/link.ts";
import type { NeedName } from "../bases/needs.ts";
import type { Unit } from "../bases/unit.ts";
import { statedUnit } from "../bases/unit-names.ts";
import { parseUnit } from "../bases/units.ts";
import type { CellFault } from "../records/cells.ts";
import type { Identified } from "../records/identified.ts";
import { isSaltForm, type LiquorModel } from "./liquor.ts";

const SOLUTE_BASES: readonly SoluteBasis[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];
const SALT_BASES: readonly SoluteBasis[] = ["anhydrous", "hydrate equivalent per total solvent"];
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

/**
 * What the solute was weighed as: as stated, anhydrous for an unsolvated solid, and a fault where it is open. A salt or
 * co-crystal whose solute is the free acid or base is open in the same way, but nothing of it joins the solvent.
 */
export function readSoluteBasis(text: string, who: Identified, unit: Unit, valueText: string): SoluteBasis | CellFault {
  const salt = isSaltForm(who);
  if (text !== "") {
    const words = salt ? SALT_BASES : SOLUTE_BASES;
    if (words.some((word) => word === text)) return text as SoluteBasis;
    const found = `solute_basis "${text}"${salt && SOLUTE_BASES.some((word) => word === text) ? " of a salt or co-crystal, whose counter-ion or co-former does not join the solvent" : ""}`;
    return { field: "solute_basis", code: "bad-choice", found, expected: `one of ${words.join(", ")}` };
  }
  const readings = hydrateReadingsOf(unit.basis);
  if (salt && !countsAmount(unit)) {
    const found = `${valueText} ${unit.canonical} of the ${who.form?.form}`;
    return { field: "solute_basis", code: "open-salt-basis", found };
  }
  if (!who.solvated || readings === "none") return "anhydrous";
  const found = `${valueText} ${unit.canonical} of a hydrate or solvate${openReadings(valueText, who, unit)}`;
  return { field: "solute_basis", code: "open-hydrate-basis", found };
}

/** Readings of a value whose solute basis is open, each with the basis that has it; none where nothing is open. */
export function openSoluteBases(who: Identified, unit: Unit): readonly SoluteBasis[] {
  const readings = hydrateReadingsOf(unit.basis);
  if (isSaltForm(who)) return countsAmount(unit) ? [] : SALT_BASES;
  if (!who.solvated || readings === "none") return [];
  if (readings === "hydrate or anhydrous mass") return SALT_BASES;
  return readings === "three readings" ? SOLUTE_BASES : ["hydrate per added solvent", "anhydrous"];
}

/** True for a basis that counts formula units of solute, one for each of its salt. */
function countsAmount({ basis }: Unit): boolean {
  return basis.startsWith("amount") || basis.startsWith("mole");
}

/** The three readings of a number on a per-solvent basis as g anhydrous per 100 g total solvent, where R is known. */
function openReadings(valueText: string, { crystalMassFactor: R }: Identified, unit: Unit): string {
  const value = Number(valueText);
  if (unit.basis !== "mass ratio" || Number.isNaN(R) || !(value > 0)) return "";
  const q = (value * unit.scale.numerator) / unit.scale.denominator;
  const shown = [q, q / (R + q * (R - 1)), q / R].map((r) => Number((100 * r).toPrecision(3)));
  return `: anhydrous ${shown[0]}, hydrate per added solvent ${shown[1]}, hydrate equivalent per total solvent ${shown[2]} g anhydrous/100 g total solvent`;
}

/** The problem that names what a conversion lacks: a density, the crystal solvent of a known solute, or a molar mass. */
export function codeOfMissing(missing: readonly NeedName[]): "no-density" | "unknown-guest-count" | "no-molar-mass" {
  if (missing.some((need) => need.startsWith("density"))) return "no-density";
  const crystalOnly = missing.length === 1 && missing[0] === "molar mass of the crystal";
  return crystalOnly ? "unknown-guest-count" : "no-molar-mass";
}

/**
 * What is to be said of a crystal whose solvent is no part of the solvent: it joins all the same, and the liquor is a
 * mixture; undefined where the guest is a component of the solvent, or nothing is solvated.
 */
export function foreignGuest({ solvated, form, solvent }: Identified): string | undefined {
  const guest = form?.guest ?? "water";
  if (!solvated || solvent.parts.some(({ substance }) => substance.name === guest)) return undefined;
  return `the crystal's ${guest} is no part of ${solvent.name}: the liquor is a mixture, its ${guest} counted as solvent by mass`;
}

/** Binds a unit to the properties of a liquor; a fault names the property that is missing. `remark` joins the assumptions. */
export function bindUnit(
  unit: Unit,
  soluteBasis: SoluteBasis,
  liquor: LiquorModel,
  remark?: string,
): UnitContext | CellFault {
  const result = hubConverter(unit, liquor.needs, soluteBasis);
  if (result.kind === "missing") {
    const found = `${unit.canonical} needs the ${result.missing.join(" and the ")}, which ${result.missing.length > 1 ? "are" : "is"} not known`;
    return { field: "solubility", code: codeOfMissing(result.missing), found };
  }
  const { needs } = liquor;
  const links = [linkOf(unit.basis, soluteBasis), linkOf("mass ratio")] as const;
  const assumptions = assumptionsOf(unit, needs, links[0], hub, needs, links[1]);
  const mixed = unit.basis.includes("volume") ? liquor.volumeRemark : "";
  const all = [...assumptions, mixed, remark ?? ""].filter((text) => text !== "");
  return { unit, soluteBasis, liquor, converter: result.converter, assumptions: all };
}

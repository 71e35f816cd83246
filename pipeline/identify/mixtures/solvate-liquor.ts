import type { SoluteBasis } from "../../bases/hydrate.ts";
import { hydrateReadingsOf } from "../../bases/link.ts";
import { parseUnit } from "../../bases/units.ts";
import type { SubstanceIndex } from "../../properties/substances.ts";
import type { CellFault } from "../../records/cells.ts";
import type { ReadingSolvent } from "../../records/identified.ts";
import type { DecimalMark } from "../../records/number-text.ts";
import type { ResolvedForm } from "../solid-form.ts";
import { keyOf, type ResolvedSolvent, solventOf } from "../solvent.ts";
import { partsWithGuest, type RowValue } from "./row-value.ts";

const MOST = 3;
const ADDED: SoluteBasis = "hydrate per added solvent";

/** True where a dissolved solvate changes what the liquor is made of: its guest is foreign, or one of several components. */
export function changesLiquor({ solvated, form }: ResolvedForm, { parts }: ReadingSolvent): boolean {
  const guest = form?.guest ?? "water";
  return solvated && !(parts.length === 1 && parts[0]?.substance.name === guest);
}

/** True where the value of a row is per solution or per solvent added: the stated composition is that of the solvent added. */
function statedBeforeDissolving({ unit, soluteBasis }: RowValue): boolean {
  const parsed = parseUnit(unit);
  const readings = parsed.kind === "unit" ? hydrateReadingsOf(parsed.unit.basis) : undefined;
  return soluteBasis === ADDED || readings === "hydrate or anhydrous mass" || readings === "none";
}

/**
 * The solvent of a row whose dissolved solvate brings solvent of its own. A guest that is a component joins it; a foreign
 * guest makes the liquor a mixture, a system apart. A composition stated per total solvent already counts the guest.
 * Where the row does not tell how much was dissolved the solvent stays as stated, and the row says so.
 */
export function solventWithGuest(
  resolved: ResolvedSolvent,
  form: ResolvedForm,
  value: RowValue | undefined,
  decimal: DecimalMark,
  index: SubstanceIndex,
): ResolvedSolvent | CellFault {
  const { solvent, assumptions } = resolved;
  if (!changesLiquor(form, solvent)) return resolved;
  const guestName = form.form?.guest ?? "water";
  const foreign = !solvent.parts.some(({ substance }) => substance.name === guestName);
  if (!foreign && value !== undefined && !statedBeforeDissolving(value)) {
    const remark = `composition taken as that of the total solvent, the crystal's ${guestName} counted`;
    return { ...resolved, assumptions: [...assumptions, remark] };
  }
  const guest = index.byName(guestName);
  const solvate = guest && {
    guest,
    crystalMassFactor: form.crystalMassFactor,
    soluteMolarMass: form.unsolvatedMolarMass,
    solute: form.substance,
  };
  const parts = solvate && value && partsWithGuest(solvent.added, solvate, value, decimal);
  if (parts === undefined) {
    const remark = `the crystal's ${guestName} is not counted in the composition of the liquor: the row does not tell how much was dissolved`;
    return foreign ? resolved : { ...resolved, assumptions: [...assumptions, remark] };
  }
  if (parts.length > MOST) {
    const found = `${guestName} of the crystal in a mixture of ${solvent.parts.length} solvents`;
    return { field: "solvent", code: "too-many-components", found };
  }
  const liquor = solventOf(parts, solvent.added, solvent.madeUp, solvent.openU, solvent.takenAbsolute);
  const remark = foreign
    ? `the crystal's ${guestName} is no part of ${solvent.name}: the liquor is a mixture, its ${guestName} counted as solvent by mass`
    : `the crystal's ${guestName} joins the solvent and is counted in the composition of the liquor`;
  return { solvent: liquor, key: keyOf(liquor), assumptions: [...assumptions, remark] };
}

import { parseFormula } from "../../pipeline/properties/formula.ts";
import { hydrateParts } from "../../pipeline/properties/hydrate-parts.ts";
import { MEMORY } from "./citations.ts";
import { type ListedForm, listedForms } from "./listed-forms.ts";
import type { Row } from "./table-text.ts";

/**
 * Rows of solid_forms.csv. Molar masses follow from those of solute and guest; melting point and density of a hydrate
 * that has a row of its own in substances.csv are taken from there.
 */
export function formRows(substances: readonly Row[]): Row[] {
  const byName = new Map(substances.map((row) => [String(row.name), row]));
  return listedForms.map((form) => formRow(form, byName));
}

function formRow(form: ListedForm, byName: ReadonlyMap<string, Row>): Row {
  const solute = byName.get(form.solute);
  if (solute === undefined) throw new Error(`${form.solute} is not in substances.csv`);
  const own = byName.get(`${form.solute} ${form.form}`);
  const guest = form.guest === undefined ? undefined : byName.get(form.guest);
  const guestMass =
    guest === undefined || form.guestPerSolute === undefined
      ? undefined
      : Number(guest.molar_mass) * form.guestPerSolute;
  const molarMass =
    form.guest === undefined
      ? Number(solute.molar_mass)
      : guestMass === undefined
        ? undefined
        : Math.round((Number(solute.molar_mass) + guestMass) * 1e4) / 1e4;
  checkStoichiometry(form, own);
  const stated = form.transitionK !== undefined || form.meltingPointK !== undefined;
  return {
    solute: form.solute,
    form: form.form,
    kind: form.kind,
    guest: form.guest,
    guest_per_solute: form.guestPerSolute,
    molar_mass: molarMass,
    melting_point_K: form.meltingPointK ?? own?.melting_point_K,
    density_kg_per_m3: own?.density_kg_per_m3,
    transition_K: form.transitionK,
    to_form: form.toForm,
    reference: [
      molarMass === undefined ? "" : "molar mass: IUPAC 2021 atomic weights",
      stated ? `temperatures: ${MEMORY}` : "",
      own === undefined ? `form: ${MEMORY}` : "form: see substances.csv",
      form.remark ?? "",
    ]
      .filter((part) => part !== "")
      .join("; "),
  };
}

/** The formula of a hydrate in substances.csv must hold the crystal water of its form. */
function checkStoichiometry({ solute, form, guestPerSolute }: ListedForm, own: Row | undefined): void {
  const text = own?.formula;
  const formula = typeof text === "string" ? parseFormula(text) : undefined;
  const parts = formula === undefined || "fault" in formula ? undefined : hydrateParts(formula);
  if (parts !== undefined && Math.abs(parts.guestPerUnit - (guestPerSolute ?? 0)) > 1e-9) {
    throw new Error(`${solute} ${form}: ${guestPerSolute} guests, but the formula is ${text}`);
  }
}

import type { SolidForm, SolidFormKind } from "./substances.ts";
import { faultAt, type PlacedRow, positiveCell, type Report, textCell } from "./table-cells.ts";

const KINDS: readonly SolidFormKind[] = ["polymorph", "hydrate", "solvate", "salt", "co-crystal", "amorphous"];

/** Relative difference above which a stated molar mass contradicts the one that follows from a formula. */
export const MOLAR_MASS_TOLERANCE = 1e-3;

/**
 * A row of solid_forms as a {@link SolidForm}. The molar mass of a polymorph is that of the solute, of a hydrate or
 * solvate that of the solute plus its guests; a stated one that differs by more than 0.1 % is reported and left out.
 *
 * - soluteMolarMass [g/mol]        - guestMolarMass [g/mol] by the name of the guest
 *
 * Undefined, with a report, if the kind is not one of those known.
 */
export function solidFormFromRow(
  row: PlacedRow,
  soluteMolarMass: number | undefined,
  guestMolarMass: (name: string) => number | undefined,
  report: Report,
): SolidForm | undefined {
  const kindText = textCell(row, "kind");
  const kind = KINDS.find((known) => known === kindText);
  if (kind === undefined) {
    report(faultAt(row, "kind", "not allowed", `"${kindText ?? ""}" is none of ${KINDS.join(", ")}`));
    return undefined;
  }
  const guest = textCell(row, "guest");
  const guestPerSolute = positiveCell(row, "guest_per_solute", report);
  const fusionEnthalpy = positiveCell(row, "fusion_enthalpy_kJ_per_mol", report);
  const computed = computedMolarMass(kind, soluteMolarMass, guest, guestPerSolute, guestMolarMass);
  return {
    solute: textCell(row, "solute") ?? "",
    form: textCell(row, "form") ?? "",
    kind,
    guest,
    guestPerSolute,
    molarMass: agreedMolarMass(row, computed, report),
    meltingPointK: positiveCell(row, "melting_point_K", report),
    fusionEnthalpy: fusionEnthalpy === undefined ? undefined : fusionEnthalpy * 1000,
    solidDensity: positiveCell(row, "density_kg_per_m3", report),
    transitionK: positiveCell(row, "transition_K", report),
    toForm: textCell(row, "to_form"),
    reference: textCell(row, "reference") ?? "",
  };
}

function computedMolarMass(
  kind: SolidFormKind,
  solute: number | undefined,
  guest: string | undefined,
  guestPerSolute: number | undefined,
  guestMolarMass: (name: string) => number | undefined,
): number | undefined {
  if (solute === undefined) return undefined;
  if (kind === "polymorph" || kind === "amorphous") return solute;
  const guestMass = guest === undefined ? undefined : guestMolarMass(guest);
  return guestMass === undefined || guestPerSolute === undefined ? undefined : solute + guestPerSolute * guestMass;
}

function agreedMolarMass(row: PlacedRow, computed: number | undefined, report: Report): number | undefined {
  const stated = positiveCell(row, "molar_mass", report);
  if (stated === undefined || computed === undefined) return stated ?? computed;
  if (Math.abs(stated / computed - 1) <= MOLAR_MASS_TOLERANCE) return computed;
  const message = `molar mass ${stated} g/mol, but solute and guests give ${computed.toFixed(4)} g/mol`;
  report(faultAt(row, "molar_mass", "molar mass contradicts formula", message));
  return undefined;
}

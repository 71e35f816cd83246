import type { Substance } from "../properties/substances.ts";
import type { UsedSubstance } from "../records/edition.ts";
import type { System } from "../records/systems.ts";
import type { IdentityRegister } from "./source.ts";

/** Every substance that a system refers to, sorted by key: what the keys of all tables point to. */
export function usedSubstances(systems: readonly System[], register: IdentityRegister): UsedSubstance[] {
  const roles = new Map<string, Set<"solute" | "solvent">>();
  const add = (key: string, role: "solute" | "solvent") => roles.set(key, (roles.get(key) ?? new Set()).add(role));
  for (const { identity } of systems) {
    add(identity.solute, "solute");
    add(identity.solvent, "solvent");
  }
  const keys = [...roles.keys()].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
  const molarMass = new Map(systems.map(({ identity }) => [identity.solute, identity.soluteMolarMass]));
  return keys.map((key) => {
    const solute = register.solutes.get(key);
    const substance: Substance | undefined = register.solvents.get(key) ?? solute?.substance;
    const role = [...(roles.get(key) as Set<string>)].sort().join(";") as UsedSubstance["role"];
    return {
      key,
      name: substance?.name ?? "",
      role,
      cas: substance?.cas ?? solute?.cells.cas ?? "",
      inchikey: substance?.inchikey ?? solute?.cells.inchikey ?? "",
      smiles: substance?.smiles ?? solute?.cells.smiles ?? "",
      formula: substance?.formula ?? solute?.cells.formula ?? "",
      molarMass: substance?.molarMass ?? molarMass.get(key) ?? Number.NaN,
      meltingPointK: substance?.meltingPointK ?? Number.NaN,
      hazards: substance?.hazards.join(";") ?? "",
      reference: substance?.references.join("; ") ?? "",
    };
  });
}

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
    for (const { name } of identity.solventComponents) add(name, "solvent");
  }
  const keys = [...roles.keys()].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
  const molarMass = new Map(systems.map(({ identity }) => [identity.solute, identity.soluteMolarMass]));
  return keys.map((key) => {
    const solute = register.solutes.get(key);
    const substance: Substance | undefined = register.solvents.get(key) ?? solute?.substance;
    // What any row says of a solute that is in no table; in order of use, so that it does not depend on later ones.
    const said = (field: "cas" | "inchikey" | "smiles" | "formula"): string =>
      [...(solute?.spellings.values() ?? [])].map((cells) => cells[field]).find((text) => text !== "") ?? "";
    const role = [...(roles.get(key) as Set<string>)].sort().join(";") as UsedSubstance["role"];
    return {
      key,
      name: substance?.name ?? "",
      role,
      cas: substance?.cas ?? said("cas"),
      inchikey: substance?.inchikey ?? said("inchikey"),
      smiles: substance?.smiles ?? said("smiles"),
      formula: substance?.formula ?? said("formula"),
      molarMass: substance?.molarMass ?? molarMass.get(key) ?? Number.NaN,
      meltingPointK: substance?.meltingPointK ?? Number.NaN,
      hazards: substance?.hazards.join(";") ?? "",
      reference: substance?.references.join("; ") ?? "",
    };
  });
}

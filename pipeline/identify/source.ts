import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import { type CellFault, cellGetter, readingProblem } from "../records/cells.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import type { Reading, SourceTable } from "../records/readings.ts";
import type { Identity } from "../records/systems.ts";
import { IDENTITY_FIELDS, type ResolvedIdentity, resolveIdentity } from "./identity.ts";
import type { KnownSolute, SmilesMass } from "./solute.ts";

/** Identities met so far over all sources of an edition, each once, in order of first use. */
export interface IdentityRegister {
  readonly identities: Identity[];
  readonly solutes: Map<string, KnownSolute>;
  readonly solvents: Map<string, Substance>;
  readonly positions: Map<string, number>;
  /** Names and identifiers that stand for different substances, with the place of first use. */
  readonly contradictions: { readonly source: string; readonly line: number; readonly text: string }[];
}

/** An empty register. */
export function createIdentityRegister(): IdentityRegister {
  return { identities: [], solutes: new Map(), solvents: new Map(), positions: new Map(), contradictions: [] };
}

/** Position of an identity in the register, added on first use. */
function positionOf(register: IdentityRegister, identity: Identity): number {
  const { solute, solidForm, solvent, composition, medium } = identity;
  const key = JSON.stringify([solute, solidForm, solvent, composition, medium]);
  const known = register.positions.get(key);
  if (known !== undefined) {
    // A molar mass stated by a later source serves the rows of the earlier ones too.
    const before = register.identities[known] as Identity;
    if (Number.isNaN(before.soluteMolarMass)) register.identities[known] = identity;
    return known;
  }
  register.positions.set(key, register.identities.length);
  return register.identities.push(identity) - 1;
}

/** Registers what was resolved, and gives the record that normalising works with. */
export function register(all: IdentityRegister, { solute, form, solvent, identity }: ResolvedIdentity): Identified {
  if (!all.solutes.has(identity.solute)) all.solutes.set(identity.solute, { ...solute, key: identity.solute });
  all.solvents.set(solvent.name, solvent);
  return {
    index: positionOf(all, identity),
    solute: form.substance,
    solvent,
    form: form.form,
    crystalMassFactor: form.crystalMassFactor,
    solvated: form.solvated,
    assumptions: form.assumptions,
  };
}

/**
 * Identifies every reading of a source: solute, solid form, solvent, medium. Rows that spell the same are resolved once.
 * A reading that cannot be identified is refused with its place; nothing is guessed from a near spelling.
 */
export function identifySource(
  source: SourceTable,
  index: SubstanceIndex,
  smilesMass: SmilesMass,
  all: IdentityRegister,
): IdentifiedSource {
  const get = Object.fromEntries(IDENTITY_FIELDS.map((field) => [field, cellGetter(source.places, field)]));
  const text = (field: string, reading: Reading): string => (get[field] as (reading: Reading) => string)(reading);
  const varying = IDENTITY_FIELDS.filter(
    (field) => source.places[field]?.kind === "column" || source.readings.some((reading) => reading.own?.[field]),
  ).map((field) => get[field] as (reading: Reading) => string);
  const resolve = (reading: Reading): Identified | CellFault => {
    const found = resolveIdentity((field) => text(field, reading), index, smilesMass, source.decimal);
    if ("code" in found) return found;
    const { contradiction } = found.solute;
    if (contradiction !== undefined) {
      all.contradictions.push({ source: source.name, line: reading.line, text: contradiction });
    }
    return register(all, found);
  };

  const resolved = new Map<string, Identified | CellFault>();
  const [readings, who, refused]: [Reading[], Identified[], IdentifiedSource["refused"][number][]] = [[], [], []];
  for (const reading of source.readings) {
    let key = "";
    for (const cell of varying) key += `${cell(reading)}\u0000`;
    let found = resolved.get(key);
    if (found === undefined) {
      found = resolve(reading);
      resolved.set(key, found);
    }
    if ("code" in found) refused.push(readingProblem(source, reading, found));
    else {
      readings.push(reading);
      who.push(found);
    }
  }
  return { source, readings, who, refused };
}

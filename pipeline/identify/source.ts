import type { Substance, SubstanceIndex } from "../properties/substances.ts";
import { type CellFault, cellGetter, readingProblem, unitGetter } from "../records/cells.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import type { Reading, SourceTable } from "../records/readings.ts";
import type { Identity } from "../records/systems.ts";
import { countsSolute, IDENTITY_FIELDS, type ResolvedIdentity, resolveIdentity } from "./identity.ts";
import type { RowValue } from "./mixtures/row-value.ts";
import { type RegisteredSolute, rememberSolute } from "./registered-solutes.ts";
import { lookAlikeRemarks, type Remark } from "./solute.ts";
import type { ReadStructure } from "./solute-cells.ts";

/** Identities met so far over all sources of an edition, each once, in order of first use. */
export interface IdentityRegister {
  readonly identities: Identity[];
  readonly solutes: Map<string, RegisteredSolute>;
  readonly solvents: Map<string, Substance>;
  readonly positions: Map<string, number>;
  /** What is worth telling about the identity of a row and refuses nothing, with its place. */
  readonly remarks: (Remark & { readonly source: string; readonly line: number })[];
  /** Exact compositions of the mixtures met, by position of the identity: mass fractions by name. */
  readonly compositions: Map<number, Map<string, ReadonlyMap<string, number>>>;
  /** What rows were resolved to that do not depend on their value, by their cells: sources spell alike. */
  readonly resolved: Map<string, ResolvedIdentity | CellFault>;
}

/** An empty register. */
export function createIdentityRegister(): IdentityRegister {
  return {
    ...{ identities: [], solutes: new Map(), solvents: new Map(), positions: new Map() },
    ...{ remarks: [], compositions: new Map(), resolved: new Map() },
  };
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
export function register(
  all: IdentityRegister,
  { solute, form, solvent, identity, assumptions }: ResolvedIdentity,
): Identified {
  rememberSolute(all.solutes, solute);
  for (const { substance } of solvent.parts) all.solvents.set(substance.name, substance);
  const index = positionOf(all, identity);
  if (solvent.parts.length > 1) {
    const exact = new Map(solvent.parts.map(({ substance, massFraction }) => [substance.name, massFraction]));
    const known = all.compositions.get(index) ?? new Map();
    all.compositions.set(index, known.set(JSON.stringify([...exact]), exact));
  }
  return {
    index,
    solute: form.substance,
    solvent,
    form: form.form,
    crystalMassFactor: form.crystalMassFactor,
    solvated: form.solvated,
    assumptions,
  };
}

/**
 * Identifies every reading of a source: solute, solid form, solvent, medium. Rows that spell the same are resolved once.
 * A reading that cannot be identified is refused with its place; nothing is guessed from a near spelling.
 */
export function identifySource(
  source: SourceTable,
  index: SubstanceIndex,
  structure: ReadStructure,
  all: IdentityRegister,
): IdentifiedSource {
  const get = Object.fromEntries(IDENTITY_FIELDS.map((field) => [field, cellGetter(source.places, field)]));
  const text = (field: string, reading: Reading): string => (get[field] as (reading: Reading) => string)(reading);
  const varies = IDENTITY_FIELDS.filter(
    (field) => source.places[field]?.kind === "column" || source.readings.some((reading) => reading.own?.[field]),
  );
  const varying = varies.map((field) => get[field] as (reading: Reading) => string);
  const [any] = source.readings;
  /** What the cells of all rows have in common: with a row's own key it tells its cells among all sources. */
  const fixed = JSON.stringify([
    source.decimal,
    ...IDENTITY_FIELDS.map((field) => (any === undefined || varies.includes(field) ? 0 : text(field, any))),
  ]);
  const unit = unitGetter(source.places, "solubility");
  const soluteBasis = cellGetter(source.places, "solute_basis");
  const rowValue = (reading: Reading): RowValue => ({
    text: reading.cells[reading.valueIndex] ?? "",
    unit: unit(reading),
    soluteBasis: soluteBasis(reading),
  });
  /** Keys of rows whose solvent follows from their own value: it becomes a part of the key. */
  const ofValue = new Set<string>();
  const dependsOnValue = (found: ResolvedIdentity | CellFault, reading: Reading) =>
    "code" in found ? countsSolute(text("composition_basis", reading)) : found.ofValue;
  const resolveCells = (reading: Reading, key: string): ResolvedIdentity | CellFault => {
    const cells = fixed + key;
    const known = all.resolved.get(cells);
    if (known !== undefined) return known;
    const found = resolveIdentity((field) => text(field, reading), index, structure, source.decimal, rowValue(reading));
    if (!dependsOnValue(found, reading)) all.resolved.set(cells, found);
    return found;
  };
  const resolve = (reading: Reading, key: string): Identified | CellFault => {
    const found = resolveCells(reading, key);
    if (dependsOnValue(found, reading)) ofValue.add(key);
    if ("code" in found) return found;
    const others = ["solvent", "solid_form"].flatMap((field) => lookAlikeRemarks(text(field, reading)));
    for (const remark of [...found.solute.remarks, ...others]) {
      all.remarks.push({ ...remark, source: source.name, line: reading.line });
    }
    return register(all, found);
  };

  const resolved = new Map<string, Identified | CellFault>();
  const [readings, who, refused]: [Reading[], Identified[], IdentifiedSource["refused"][number][]] = [[], [], []];
  for (const reading of source.readings) {
    let key = "";
    for (const cell of varying) key += `${cell(reading)}\u0000`;
    const whole = ofValue.has(key) ? key + JSON.stringify(rowValue(reading)) : key;
    let found = resolved.get(whole);
    if (found === undefined) {
      found = resolve(reading, key);
      resolved.set(ofValue.has(key) ? key + JSON.stringify(rowValue(reading)) : key, found);
    }
    if ("code" in found) refused.push(readingProblem(source, reading, found));
    else {
      readings.push(reading);
      who.push(found);
    }
  }
  return { source, readings, who, refused };
}

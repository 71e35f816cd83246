import { unlistedName } from "../properties/name-key.ts";
import type { ResolvedName, SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import { type Agreement, agreement, sameButStereo } from "./identifier-agreement.ts";
import type { Remark } from "./solute.ts";
import type { Identifier, ReadStructure } from "./solute-cells.ts";

/** Which substance a row is about. */
export interface Decision {
  readonly key: string;
  /** The substance of the tables and its form; undefined for a solute that is in none. */
  readonly base: ResolvedName | undefined;
  readonly remarks: readonly Remark[];
}

const fault = (field: string, found: string): CellFault => ({ field, code: "contradictory-identity", found });

/** A substance with its form, in words. */
const spoken = ({ substance, form }: ResolvedName): string =>
  form === undefined ? substance.name : `${substance.name} ${form.form}`;

const stands = ({ kind, text }: Identifier, { substance }: ResolvedName): string =>
  `the ${kind} ${text} stands for ${substance.name}`;

/** Decides between the identifiers and the name of a row, strongest first; see `resolveSolute` for the rules. */
export function decideSolute(
  identifiers: readonly Identifier[],
  name: string,
  index: SubstanceIndex,
  read: ReadStructure,
): Decision | CellFault {
  const named = name === "" ? undefined : index.resolve(name);
  const listed = identifiers.filter((identifier) => identifier.listed !== undefined);
  const [first] = listed;
  if (first?.listed !== undefined) return withListed(first, first.listed, listed, identifiers, name, named, read);
  const [strongest] = identifiers;
  if (strongest === undefined) return { key: named?.substance.name ?? unlistedName(name), base: named, remarks: [] };
  if (named === undefined) return { key: strongest.key, base: undefined, remarks: [] };
  return nameAgainst(strongest, identifiers, name, named, read);
}

/** A name of the tables beside identifiers that are in none: the name holds unless the tables know better. */
function nameAgainst(
  strongest: Identifier,
  identifiers: readonly Identifier[],
  name: string,
  named: ResolvedName,
  read: ReadStructure,
): Decision {
  const { substance } = named;
  const compared = identifiers.map((identifier) => ({ identifier, how: agreement(identifier, substance, read) }));
  const against = compared.find(({ how }) => how !== "unknown" && how !== "tautomer");
  if (against === undefined) {
    // Why a SMILES cannot be read is told where it is read.
    const readable = compared.filter(
      ({ identifier: { kind, structure } }) => kind !== "SMILES" || structure !== undefined,
    );
    const remarks = readable.map(({ identifier: { kind, text }, how }) =>
      unchecked(
        how === "unknown"
          ? `the tables list no ${kind} of ${substance.name}: ${text}`
          : `the name "${name}" stands for ${substance.name}, the ${kind} ${text} ${DIFFERENCE[how]}`,
      ),
    );
    return { key: substance.name, base: named, remarks };
  }
  const { identifier, how } = against;
  const code = how === "stereo" || how === "less" ? "stereochemistry-differs" : "identifier-over-name";
  const found = `the name "${name}" stands for ${substance.name}, the ${identifier.kind} ${identifier.text} ${DIFFERENCE[how]}`;
  return { key: strongest.key, base: undefined, remarks: [{ code, found }] };
}

const DIFFERENCE: Record<Agreement, string> = {
  other: "for another substance, which is in no table",
  stereo: "for the same skeleton with other stereochemistry, isotopes or protons",
  less: "for the same skeleton and states no stereochemistry",
  tautomer: "for a tautomer of it",
  isomer: "for another structure of the same composition",
  "another number": "is not its number and is in no table",
  unknown: "cannot be compared",
};

const unchecked = (found: string): Remark => ({ code: "identifier-not-checked", found });

/** An identifier of the tables decides; the other identifiers and the name are held against it. */
function withListed(
  first: Identifier,
  base: ResolvedName,
  listed: readonly Identifier[],
  identifiers: readonly Identifier[],
  name: string,
  named: ResolvedName | undefined,
  read: ReadStructure,
): Decision | CellFault {
  const { substance } = base;
  const remarks: Remark[] = [];
  for (const other of listed) {
    const also = other.listed as ResolvedName;
    if (spoken(also) === spoken(base)) continue;
    const found = `the ${first.kind} ${first.text} stands for ${spoken(base)}, the ${other.kind} ${other.text} for ${spoken(also)}`;
    return fault(other.field, found);
  }
  for (const other of identifiers.filter((identifier) => identifier.listed === undefined)) {
    const how = agreement(other, substance, read);
    const found = `${stands(first, base)}, the ${other.kind} ${other.text} ${DIFFERENCE[how]}`;
    if (how === "other" || how === "stereo") return fault(other.field, found);
    if (how === "less") remarks.push({ code: "stereochemistry-differs", found });
    else if (how !== "unknown" || other.kind === "InChIKey") remarks.push(unchecked(found));
  }
  if (named === undefined) return { key: substance.name, base, remarks };
  if (named.substance.name !== substance.name) {
    const found = `the name "${name}" stands for ${spoken(named)}, the ${first.kind} ${first.text} for ${spoken(base)}`;
    if (sameButStereo(named.substance, substance, read)) return fault(first.field, found);
    return { key: substance.name, base, remarks: [...remarks, { code: "identifier-over-name", found }] };
  }
  return withForms(first, base, name, named, remarks);
}

/** Name and identifier stand for one substance: the one that names a form says more; two forms are a fault. */
function withForms(
  first: Identifier,
  base: ResolvedName,
  name: string,
  named: ResolvedName,
  remarks: readonly Remark[],
): Decision | CellFault {
  const { substance, form } = base;
  const found = `the name "${name}" stands for ${spoken(named)}, the ${first.kind} ${first.text} for ${spoken(base)}`;
  if (form !== undefined && named.form !== undefined && form.form !== named.form.form) return fault(first.field, found);
  const solvated = named.form?.kind === "hydrate" || named.form?.kind === "solvate";
  const added: Remark[] =
    form === undefined && solvated
      ? [{ code: "identifier-over-name", found: `${found}: taken as the ${named.form?.form}` }]
      : [];
  return {
    key: substance.name,
    base: { substance, form: form ?? named.form },
    remarks: [...remarks, ...added],
  };
}

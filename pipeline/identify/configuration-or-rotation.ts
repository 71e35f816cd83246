import { nameKey } from "../properties/name-key.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { CellFault } from "../records/cells.ts";
import type { Remark } from "./solute.ts";

/** A small d- or l- before a name: the sign of rotation by the rules, the configuration by habit. */
const SMALL = /(?:^|[\s(,-])([dl])-(?=[A-Za-z(])/;

/**
 * What a small `d-` or `l-` in a name may mean: by habit the configuration (`D-`), by the old rule the sign of rotation
 * (`(+)-`). A fault where the tables list a substance for each; a remark where they list the configuration only.
 *
 * @example d-tartaric acid: by rotation L-(+)-tartaric acid, by configuration D-tartaric acid
 */
export function configurationOrRotation(
  name: string,
  index: SubstanceIndex,
): { readonly remark: Remark } | CellFault | undefined {
  const letter = SMALL.exec(name)?.[1];
  if (letter === undefined) return undefined;
  const listed = index.resolve(name)?.substance;
  if (listed !== undefined && [listed.name, ...listed.synonyms].includes(name)) return undefined;
  const rest = nameKey(name.replace(SMALL, ""));
  const sign = letter === "d" ? "(+)" : "(-)";
  const rotating = index.substances.filter((substance) =>
    [substance.name, ...substance.synonyms].some((known) => nameKey(known).endsWith(`${sign}-${rest}`)),
  );
  const other = rotating.find(({ name: found }) => found !== listed?.name);
  if (other !== undefined) {
    const found = `"${name}" can be ${sign}-, that is ${other.name}, or ${letter.toUpperCase()}-${listed === undefined ? "" : `, that is ${listed.name}`}`;
    return { field: "solute", code: "unresolved-identity", found };
  }
  if (listed === undefined || rotating.length > 0) return undefined;
  const found = `"${name}" was taken as ${listed.name}: the small ${letter}- as the configuration ${letter.toUpperCase()}-`;
  return { remark: { code: "configuration-or-rotation", found } };
}

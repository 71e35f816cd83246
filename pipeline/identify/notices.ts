import { type Problem, problem } from "../problems/catalogue.ts";
import { unlistedName } from "../properties/name-key.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { SourceTable } from "../records/readings.ts";
import { stereoPrefix } from "./identifier-agreement.ts";
import { duplicateForms, duplicateSolutes, duplicateStereoisomers } from "./possible-duplicates.ts";
import type { IdentityRegister } from "./source.ts";

/**
 * Spellings close to a name that no table knows, as a question; "" where there are none. Never assumed. A name with
 * another stereo prefix is another stereoisomer, no misspelling.
 */
export function nearNameQuestion(name: string, index: SubstanceIndex): string {
  if (index.resolve(name) !== undefined) return "";
  const prefix = stereoPrefix(name);
  const near = index.nearNames(name).filter((listed) => {
    const other = stereoPrefix(listed);
    return prefix === "" || other === "" || other === prefix;
  });
  return near.length === 0 ? "" : `did you mean ${near.join(" or ")}?`;
}

/**
 * What is worth telling about identities and refuses nothing: near misses, remarks on single rows (each wording once a
 * source), and keys or forms that may stand for one thing.
 */
export function identityNotices(
  register: IdentityRegister,
  index: SubstanceIndex,
  sources: readonly SourceTable[],
): Problem[] {
  const fileOf = new Map(sources.map(({ name, file }) => [name, file]));
  const told = new Set<string>();
  const remarks = register.remarks
    .filter(({ source, code, found }) => {
      const text = JSON.stringify([source, code, found]);
      return !told.has(text) && told.add(text);
    })
    .map(({ code, source, line, found, mend }) =>
      problem(
        code,
        { source, file: fileOf.get(source) ?? source, line },
        { found, ...(mend === undefined ? {} : { mend }) },
      ),
    );
  const misses = [...register.solutes.values()]
    .filter(({ substance, key, cells }) => substance === undefined && key === unlistedName(cells.solute))
    .flatMap(({ key, cells }) => {
      const mend = nearNameQuestion(key, index);
      const found = `"${cells.solute}" is in no table`;
      return mend === "" ? [] : [problem("unknown-solute", { file: "sources" }, { found, mend })];
    });
  const solutes = duplicateSolutes(register.solutes, index).map(({ found, stereo }) =>
    problem(stereo ? "stereochemistry-differs" : "possibly-the-same", { file: "sources" }, { found }),
  );
  const forms = [...duplicateForms(register.identities), ...duplicateStereoisomers(register.identities, index)].map(
    (found) => problem("possibly-the-same", { file: "sources" }, { found }),
  );
  return [...misses, ...remarks, ...solutes, ...forms];
}

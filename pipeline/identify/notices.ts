import { type Problem, problem } from "../problems/catalogue.ts";
import type { SubstanceIndex } from "../properties/substances.ts";
import type { SourceTable } from "../records/readings.ts";
import type { IdentityRegister } from "./source.ts";

/** Spellings close to a name that no table knows, as a question; "" where there are none. Never assumed. */
export function nearNameQuestion(name: string, index: SubstanceIndex): string {
  const near = index.resolve(name) === undefined ? index.nearNames(name) : [];
  return near.length === 0 ? "" : `did you mean ${near.join(" or ")}?`;
}

/** What is worth telling about identities and refuses nothing: near misses, and names that contradict identifiers. */
export function identityNotices(
  register: IdentityRegister,
  index: SubstanceIndex,
  sources: readonly SourceTable[],
): Problem[] {
  const fileOf = new Map(sources.map(({ name, file }) => [name, file]));
  const contradictions = register.contradictions.map(({ source, line, text }) =>
    problem("identifier-over-name", { source, file: fileOf.get(source) ?? source, line }, { found: text }),
  );
  const unknown = [...register.solutes.values()].filter(
    ({ substance, key, cells }) => !substance && key === cells.solute,
  );
  const misses = unknown.flatMap(({ key }) => {
    const mend = nearNameQuestion(key, index);
    return mend === ""
      ? []
      : [problem("unknown-solute", { file: "sources" }, { found: `"${key}" is in no table`, mend })];
  });
  return [...misses, ...contradictions];
}

import { nameKey } from "./name-key.ts";
import type { ResolvedName, SubstanceIndex } from "./substances.ts";

/** Ways in which a name holds a solid form besides `NAME FORM`; the groups are `name` and `form`. */
const SHAPES: readonly RegExp[] = [
  /^(?<name>.+?)\s*[,;]\s+(?<form>[^,;]+)$/,
  /^(?<name>.+?)\s*\((?<form>[^()]+)\)$/,
  /^(?<form>anhydrous|amorphous)\s+(?<name>.+)$/i,
];
const GREEK_BEFORE = /^(?<form>alpha|beta|gamma|delta|epsilon)-(?<name>.+)$/;

/**
 * Substance and form of a name such as `theophylline (monohydrate)`, `sulfamerazine, form II`, `anhydrous theophylline` or
 * `γ-glycine`. Only a listed form of a listed substance is found: `beta-alanine` is no form of alanine.
 */
export function formInName(
  text: string,
  byName: SubstanceIndex["byName"],
  formOf: SubstanceIndex["formOf"],
): ResolvedName | undefined {
  const readings = [...SHAPES.map((shape) => shape.exec(text.trim())), GREEK_BEFORE.exec(nameKey(text))];
  for (const { groups } of readings.filter((reading) => reading !== null)) {
    const substance = byName(groups?.name ?? "");
    const form = substance === undefined ? undefined : formOf(substance, groups?.form ?? "");
    if (substance !== undefined && form !== undefined) return { substance, form };
  }
  return undefined;
}

import type { Identified } from "../records/identified.ts";
import type { Reading } from "../records/readings.ts";
import type { Identity } from "../records/systems.ts";
import type { SourceCells } from "./source-cells.ts";

/** Techniques that tell which solid is there; the words of a source card. */
const TECHNIQUES: ReadonlySet<string> = new Set(["xrpd", "raman", "dsc", "tga", "karl fischer"]);

const plain = (text: string) => text.trim().toLowerCase();

/**
 * A function that tells (1 or 0) if the solid in equilibrium was looked at and found to be the one stated: a technique is
 * named under `solid_check`, and `solid_after`, where it says anything, names the row's solid form as reported or as the
 * substance tables name it.
 */
export function createSolidCheck(
  { text }: Pick<SourceCells, "text">,
  identities: readonly Identity[],
): (reading: Reading, who: Identified) => 0 | 1 {
  return (reading, who) => {
    if (!TECHNIQUES.has(plain(text.solid_check(reading)))) return 0;
    const found = plain(text.solid_after(reading));
    const names = [text.solid_form(reading), identities[who.index]?.solidForm ?? ""];
    return found === "" || names.some((name) => plain(name) === found) ? 1 : 0;
  };
}

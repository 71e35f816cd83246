import type { Flag } from "../records/fits.ts";

/** stand-in until the stage lands */
export function screenEdition(_input: unknown): Flag[] {
  return [];
}

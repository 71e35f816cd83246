import type { KnownSolute } from "./solute.ts";
import type { SoluteCells } from "./solute-cells.ts";

/** A solute with every way in which rows named it. */
export interface RegisteredSolute extends KnownSolute {
  /** Cells that named it, each set once, in order of first use; those of `cells` first. */
  readonly spellings: Map<string, SoluteCells>;
}

/** Most ways of naming one solute that are kept: enough to find what it shares with others. */
const MOST = 1000;

/** Registers a solute on first use, and later ways of naming it. */
export function rememberSolute(solutes: Map<string, RegisteredSolute>, solute: KnownSolute): void {
  const { solute: name, cas, inchikey, smiles } = solute.cells;
  const spelling = JSON.stringify([name, cas, inchikey, smiles]);
  const known = solutes.get(solute.key);
  if (known === undefined) {
    solutes.set(solute.key, { ...solute, spellings: new Map([[spelling, solute.cells]]) });
  } else if (known.spellings.size < MOST) known.spellings.set(spelling, solute.cells);
}

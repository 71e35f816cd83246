import { groupIntoSystems } from "../../pipeline/group/systems.ts";
import { createIdentityRegister, identifySource } from "../../pipeline/identify/source.ts";
import { indexSubstances } from "../../pipeline/identify/substance-tables.ts";
import { normaliseEdition } from "../../pipeline/normalise/edition.ts";
import { createRereader } from "../../pipeline/normalise/reread.ts";
import { createRowBudget } from "../../pipeline/normalise/row-budget.ts";
import { readProgramTables } from "../../pipeline/read/own-tables.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { textOf } from "../../pipeline/records/measurements.ts";
import type { TableRow } from "../../pipeline/records/readings.ts";
import { settingsInForce } from "../../pipeline/records/settings.ts";
import { readAccepted } from "../read/temporary-collection.ts";

const program = readProgramTables();

/** A table with a card normalised as a whole, with solid forms of the group's own: the column store, its budgets and
 * its rows read again. */
export async function normaliseTable(csv: string, card: Partial<SourceCard>, solidForms: readonly TableRow[] = []) {
  const source = await readAccepted(csv, card);
  const register = createIdentityRegister();
  const { index } = indexSubstances(await program, { substances: [], solidForms, propertyValues: [] });
  const identified = identifySource(source, index, () => undefined, register);
  const normalised = normaliseEdition([identified], [0], register.identities, settingsInForce(undefined));
  const { table } = normalised;
  return {
    table,
    refused: [...identified.refused, ...normalised.refused],
    assumptions: (row: number) => textOf(table, table.assumptions[row] as number),
    budgetOf: createRowBudget(table, normalised),
    ...createRereader(table, register.identities, groupIntoSystems(table, register.identities), normalised),
  };
}

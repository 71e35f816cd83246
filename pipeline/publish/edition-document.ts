import { createHash } from "node:crypto";
import { type Edition, measurementId } from "../records/edition.ts";
import type {
  AppliedRuling,
  EditionBefore,
  EditionDocument,
  InputFile,
  OutputFile,
} from "../records/generated/edition.ts";
import { isDecision, RECOMMENDED, type Ruling } from "../records/rulings.ts";
import { countsOf } from "./tables/summary.ts";

/** What an edition is published as. */
export interface EditionName {
  readonly edition: string;
  readonly date: string;
  /** The edition that CHANGES.md compares with. */
  readonly since?: EditionBefore;
}

/** A ruling as the documents write it, with the measurements it decides: those that another one decides are left out. */
export function appliedRuling(edition: Pick<Edition, "sources" | "table" | "rulings">, ruling: Ruling): AppliedRuling {
  const { correctedValue, correctedUnit, evidence } = ruling;
  const decides = isDecision(ruling) && ruling.flagCode !== RECOMMENDED;
  const rows = decides ? ruling.rows.filter((row) => edition.rulings.decided.get(row) === ruling) : ruling.rows;
  return {
    ruling_id: ruling.id,
    target: ruling.target,
    action: ruling.action,
    ...(correctedValue === undefined ? {} : { corrected_value: correctedValue }),
    ...(correctedUnit === undefined ? {} : { corrected_unit: correctedUnit }),
    reason: ruling.reason,
    ...(evidence === "" ? {} : { evidence }),
    by: ruling.by,
    date: ruling.date,
    measurement_ids: rows.map((row) => measurementId(edition, row)),
  };
}

/** edition.json: no clock, no machine. The checksum is that of the document itself, with this value left empty. */
export function editionDocument(
  edition: Edition,
  { edition: name, date, since }: EditionName,
  inputs: readonly InputFile[],
  outputs: readonly OutputFile[],
): EditionDocument {
  const document: EditionDocument = {
    format: 1,
    edition: name,
    date,
    program_version: edition.programVersion,
    collection: edition.collection,
    counts: countsOf(edition),
    settings: edition.settings,
    ...(since === undefined ? {} : { since }),
    rulings: edition.rulings.applied.map((ruling) => appliedRuling(edition, ruling)),
    inputs: [...inputs],
    outputs: [...outputs],
    sha256: "",
  };
  return { ...document, sha256: createHash("sha256").update(documentText(document), "utf8").digest("hex") };
}

/** The document as it stands in its file. */
export function documentText(document: EditionDocument): string {
  return `${JSON.stringify(document, null, 2)}\n`;
}

/** The newest date among source cards and rulings; undefined where none has one. A month alone goes before its days. */
export function newestDate({ sources, rulings }: Pick<Edition, "sources" | "rulings">): string | undefined {
  const dates = [...sources.map(({ card }) => card?.date ?? ""), ...rulings.applied.map(({ date }) => date)];
  return dates
    .filter((date) => /^\d{4}(-\d{2}(-\d{2})?)?$/.test(date))
    .sort()
    .at(-1);
}

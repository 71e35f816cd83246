/**
 * Writes `rulings.csv` of the demo collection and publishes the sample edition `reports/demo`. Run with
 * `npx tsx datasets/demo/sample-edition.ts` after a change that alters what is published; the decisions below and the
 * people behind them are invented.
 */
import { rmSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { publish } from "../../pipeline/commands/publish.ts";
import { Exit, type Terminal } from "../../pipeline/commands/terminal.ts";
import { curate } from "../../pipeline/curate.ts";
import { appendRuling, type NewRuling } from "../../pipeline/publish/append-ruling.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { RECOMMENDED } from "../../pipeline/records/rulings.ts";
import { createTargets } from "../../pipeline/rule/targets.ts";

const DEMO = fileURLToPath(new URL(".", import.meta.url));
const REPORTS = fileURLToPath(new URL("../../reports/", import.meta.url));
export const SAMPLE = { edition: "demo", report: false };

type Decision = Omit<NewRuling, "fingerprint"> & { readonly target: string };

const steward = (date: string) => ({ by: "data steward", date });
const BENZOIC = "benzoic-acid-in-toluene-96e30200";
const shifted = (line: number, value: string): Decision => ({
  ...{
    target: `report-2019-mole-fractions:${line}`,
    action: "correct",
    corrected_value: value,
    corrected_unit: "10^3 x",
  },
  ...{
    reason: "values typed one row down from 31 °C on",
    evidence: "table 3 of the printed report",
    ...steward("2026-04-09"),
  },
});

/** What the group decided on the flags of its collection. */
const DECISIONS: readonly Decision[] = [
  {
    ...{ target: "harbour-2026-gravimetry:21", action: "correct", corrected_value: "22.89" },
    ...{ reason: "decimal mark one place right", evidence: "weighing slip of run 20", ...steward("2026-04-08") },
  },
  ...[38, 39].map(
    (line): Decision => ({
      ...{ target: `harbour-2026-gravimetry:${line}`, action: "set aside" },
      ...{ reason: "filtered through a cold filter, to be measured again", ...steward("2026-04-08") },
    }),
  ),
  {
    target: "harbour-2026-gravimetry@ibuprofen-in-ethyl-acetate-3419ff09",
    ...{
      action: "correct",
      corrected_unit: "g/100 g solution",
      reason: "this series was written per 100 g of solution",
    },
    ...{ evidence: "reply of bench chemist 2, 7 April", ...steward("2026-04-08") },
  },
  {
    ...{ target: "harbour-2026-gravimetry:53", action: "correct", corrected_value: "4.369" },
    ...{ reason: "value of the run in ethyl acetate typed here", evidence: "weighing slip of run 51" },
    ...steward("2026-04-08"),
  },
  {
    ...{ target: "harbour-2026-hplc:25", action: "correct", corrected_value: "38.34" },
    ...{ reason: "two digits swapped in typing", evidence: "printout of the chromatogram", ...steward("2026-04-09") },
  },
  {
    ...{ target: "harbour-2026-hplc:45", action: "ask" },
    ...{ reason: "analyst 1 is asked how often the sample was diluted", ...steward("2026-04-09") },
  },
  {
    ...{ target: "crystal-lab-2025-clear-points:10", action: "set aside" },
    ...{ reason: "clear and cloud temperature of this run are swapped", by: "crystallisation technologist" },
    date: "2026-04-09",
  },
  ...[
    [14, "79.53"],
    [15, "100.6"],
    [16, "127"],
    [17, "160.1"],
    [18, "196.6"],
  ].map(([line, value]) => shifted(line as number, value as string)),
  {
    ...{ target: `report-2019-mole-fractions@${BENZOIC}`, action: "keep" },
    ...{ reason: "no other form: lines 14 to 18 were shifted and are corrected one by one", ...steward("2026-04-09") },
  },
  {
    ...{ target: "report-2019-mole-fractions:25", action: "set aside" },
    ...{ reason: "40 typed into the column of kelvins, to be mended in the source", ...steward("2026-04-09") },
  },
  {
    target: "pilot-plant-2024-titration@benzoic-acid-in-water-c32f1fdf",
    ...{
      action: "set aside",
      reason: "read in °C, written under °F: to be mended in the card",
      ...steward("2026-04-10"),
    },
  },
  ...[34, 35].map(
    (line): Decision => ({
      ...{ target: `werk-nord-2025-trockenrueckstand:${line}`, action: "set aside" },
      ...{ reason: "no solid was left in the vessel", by: "laboratory technician, north works", date: "2026-04-10" },
    }),
  ),
  {
    ...{ target: "sources-disagree@nicotinamide-in-ethanol-176d2773", action: "keep" },
    ...{ reason: "they part at the two temperatures set aside, and agree below", ...steward("2026-04-10") },
  },
  {
    target: "archive-2019-notebook@copper-ii-sulfate-pentahydrate-in-water-5696e841",
    ...{ action: "set aside", reason: "g pentahydrate, called anhydrous: to be mended in the card" },
    ...steward("2026-04-10"),
  },
  {
    target: "solvent-screen-2025-refractometry@paracetamol-form-i-in-ethanol-water-25-75-w-w-0de46f5c",
    ...{ action: "set aside", reason: "25 % was the water: to be mended in the source" },
    ...{ by: "solvent-screening chemist", date: "2026-04-10" },
  },
  {
    target: "recommended@copper-ii-sulfate-pentahydrate-in-water-5696e841",
    ...{ action: "keep", reason: "two laboratories agree, and the crystal water was checked" },
    ...{ by: "head of analytics", date: "2026-04-13" },
  },
];

/** Writes rulings.csv anew: the decisions in their order, each with the fingerprint of what it judges now. */
async function writeRulings(version: string): Promise<void> {
  rmSync(join(DEMO, "rulings.csv"), { force: true });
  const collection = await readCollection(DEMO);
  const { edition } = await curate(collection, version);
  const targets = createTargets(edition, collection.sources);
  for (const decision of DECISIONS) {
    const target = targets.find(decision.target);
    if (target === undefined) throw new RangeError(`the demo has no ${decision.target}`);
    const { flagCode } = target;
    // A decision on a flag alone is left out where screening does not raise it.
    const raised =
      flagCode === undefined || flagCode === RECOMMENDED || targets.flagNamed(decision.target) !== undefined;
    if (!raised) continue;
    appendRuling(DEMO, { ...decision, fingerprint: targets.fingerprint(target.rows) });
  }
}

async function build(version: string): Promise<void> {
  await writeRulings(version);
  rmSync(join(REPORTS, SAMPLE.edition), { recursive: true, force: true });
  const terminal: Terminal = {
    print: (text) => console.log(text),
    tell: (text) => console.error(text),
    progress: () => {},
    onInterrupt: () => {},
  };
  const code = await publish(DEMO, { ...SAMPLE, out: REPORTS, version }, terminal);
  // The demo keeps readings that are refused on purpose, so that 1 is what a success looks like.
  process.exitCode = code === Exit.needsYou ? Exit.done : code;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const { default: project } = await import("../../package.json", { with: { type: "json" } });
  await build(project.version);
}

import { type FitContext, fitAgain, fitEdition } from "./fit/edition-fits.ts";
import { idealComparison } from "./fit/ideal-comparison.ts";
import { fitMixtures } from "./fit/mixtures/mixture-fit.ts";
import { rowResults } from "./fit/row-results.ts";
import { gradeEdition } from "./grade/edition-grades.ts";
import { groupIntoSystems } from "./group/systems.ts";
import { compositionNotices } from "./identify/mixtures/composition-notices.ts";
import { compositionLiquid } from "./identify/mixtures/mixture-fractions.ts";
import { identityNotices } from "./identify/notices.ts";
import { createIdentityRegister, type IdentityRegister, identifySource } from "./identify/source.ts";
import { indexSubstances, structureReader } from "./identify/substance-tables.ts";
import { usedSubstances } from "./identify/used-substances.ts";
import { createCorrector, withRulings } from "./normalise/corrections.ts";
import { type Normalised, normaliseEdition } from "./normalise/edition.ts";
import { createRereader } from "./normalise/reread.ts";
import { createRowBudget } from "./normalise/row-budget.ts";
import type { Problem } from "./problems/catalogue.ts";
import type { SubstanceIndex } from "./properties/substances.ts";
import { openAccounts } from "./read/accounts.ts";
import type { Collection } from "./read/collection.ts";
import type { Edition, Liquor, SourceAccount } from "./records/edition.ts";
import type { SystemFit } from "./records/fits.ts";
import { settingsInForce } from "./records/settings.ts";
import { applyRulings } from "./rule/apply-rulings.ts";
import { createTargets } from "./rule/targets.ts";
import { touchedSystems } from "./rule/touched-systems.ts";
import { materialThreshold } from "./screen/material-threshold.ts";
import { risingKinkFlags } from "./screen/rising-kink.ts";
import { screen } from "./screen/screen.ts";
import { thresholdKind } from "./screen/threshold-kind.ts";

/** An edition with what `check` needs to judge new rows against it. */
export interface Curated {
  readonly edition: Edition;
  readonly index: SubstanceIndex;
  readonly register: IdentityRegister;
  readonly normalised: Normalised;
}

/** Told before each stage starts, with its name; for progress and for timing. */
export type OnStage = (stage: string) => void;

/**
 * The map: everything that happens to a collection between reading and writing, in order. Each stage takes records and
 * gives records; none of them touches a file, a clock or a terminal.
 */
export async function curate(
  collection: Collection,
  programVersion: string,
  onStage: OnStage = () => {},
): Promise<Curated> {
  const settings = settingsInForce(collection.card.settings);

  onStage("identify");
  const { index, notices } = indexSubstances(collection.program, collection.own);
  const structures = await structureReader(collection.sources);
  const register = createIdentityRegister();
  const identified = collection.sources.map((source) => identifySource(source, index, structures, register));

  onStage("normalise");
  const accounts = openAccounts(collection);
  const positions = collection.sources.map(({ name }) => accounts.findIndex((account) => account.name === name));
  const normalised = normaliseEdition(identified, positions, register.identities, settings);
  const { table } = normalised;

  onStage("group");
  const systems = groupIntoSystems(table, register.identities);
  const liquors = systems.map(normalised.liquorOf);
  const kinds = systems.map((system) => thresholdKind(table, system));

  onStage("fit");
  const context: FitContext = {
    sourceCount: accounts.length,
    laboratories: accounts.map(({ card }) => card?.laboratory ?? ""),
    meltingPointK: ({ index: i }) => liquors[i]?.formMeltingPointK ?? Number.NaN,
    liquidRangeK: ({ index: i }) => [
      liquors[i]?.solventFreezingPointK ?? Number.NaN,
      liquors[i]?.solventHighestBoilingPointK ?? Number.NaN,
    ],
    transitionsK: ({ index: i }) => liquors[i]?.transitionsK ?? [],
    threshold: ({ index: i }, level, lnU) => materialThreshold(level, lnU, kinds[i] ?? "general", settings),
    settings,
  };
  const first = fitEdition(table, systems, context);
  const { scales } = first;
  const liquidOf = (name: string) => {
    const solvent = register.solvents.get(name);
    return solvent && compositionLiquid(solvent);
  };
  const mixtures = fitMixtures(table, systems, robustOf(first.fits), scales, liquidOf);

  onStage("screen");
  const flags = [
    ...screen({
      ...{ table, systems, scales, settings },
      fits: robustOf(first.fits),
      mixtures: mixtures.models,
      curves: first.fits.map(({ curves }) => curves),
      about: systems.map(({ index: i }) => ({
        kind: kinds[i] ?? "general",
        boilingPointK: liquors[i]?.solventHighestBoilingPointK ?? Number.NaN,
        freezingPointK: liquors[i]?.solventFreezingPointK ?? Number.NaN,
        ...(liquors[i] === undefined ? {} : { liquor: liquors[i] }),
      })),
      sourceNames: accounts.map(({ name }) => name),
      ...createRereader(table, register.identities, systems, normalised),
    }),
    ...risingKinkFlags(first.fits),
  ];

  onStage("rule");
  const named = { sources: accounts, table, systems, flags };
  const correct = createCorrector(table, identified, positions, {
    ...{ identities: register.identities, liquorOf: normalised.modelOf, settings },
  });
  const rulings = applyRulings(collection.rulings, named, createTargets(named, collection.sources), correct);
  const decided = withRulings(table, rulings);
  const touched = touchedSystems(systems, rulings);
  const omitted = new Set(rulings.setAside.keys());
  const fits = fitAgain(decided, systems, first, touched, omitted, context);

  onStage("grade");
  const refused = [
    ...collection.refusedSources.map(({ name, problem }) => ({
      ...problem,
      place: { ...problem.place, source: name },
    })),
    ...collection.sources.flatMap((source) => source.refused),
    ...identified.flatMap((source) => source.refused),
    ...normalised.refused,
  ].sort(byPlace);
  const refusedOf = new Map<string, number>();
  for (const { place } of refused) refusedOf.set(place.source ?? "", (refusedOf.get(place.source ?? "") ?? 0) + 1);
  const sources = accounts.map((account): SourceAccount => {
    const lost = refusedOf.get(account.name) ?? 0;
    return { ...account, accepted: account.readings - lost, refused: lost };
  });
  const edition: Edition = {
    programVersion,
    collection: {
      name: collection.card.name,
      title: collection.card.title ?? collection.card.name,
      steward: collection.card.steward ?? "",
    },
    settings,
    sources,
    substances: usedSubstances(systems, register),
    table: decided,
    systems,
    fits,
    scales,
    mixtures: touched.length === 0 ? mixtures : fitMixtures(decided, systems, robustOf(fits), scales, liquidOf),
    flags,
    rulings,
    refused,
    notices: [
      ...collection.notices,
      ...notices,
      ...identityNotices(register, index, collection.sources),
      ...compositionNotices(register),
      ...collection.sources.flatMap((source) => source.notices),
      ...rulings.problems,
    ],
    grades: gradeEdition({ table: decided, systems, fits, flags, sources, rulings }),
    rowResults: rowResults(fits, table.count, omitted.size === 0 ? undefined : { fits: first.fits, touched, omitted }),
    ideals: systems.map(({ index: i }) => idealComparison(fits[i]?.curves ?? [], liquors[i] as Liquor)),
    liquors,
    budgetOf: createRowBudget(table, normalised),
  };
  return { edition, index, register, normalised };
}

const robustOf = (fits: readonly SystemFit[]) => fits.map(({ robust }) => robust);

/** Order of refused readings: by source, then line, then column, in code units. */
function byPlace({ place: a }: Problem, { place: b }: Problem): number {
  const text = (x = "", y = "") => (x < y ? -1 : x > y ? 1 : 0);
  return text(a.source, b.source) || (a.line ?? 0) - (b.line ?? 0) || text(a.column, b.column);
}

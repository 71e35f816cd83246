import { formInName } from "./form-in-name.ts";
import { formName } from "./form-name.ts";
import { parseFormula } from "./formula.ts";
import { hydrateParts } from "./hydrate-parts.ts";
import { type Draft, layerTables } from "./layered-tables.ts";
import { hillFormula } from "./molar-mass.ts";
import { nameKey, racemateKeys } from "./name-key.ts";
import { type NameTable, nameTable } from "./name-table.ts";
import { type ComparedName, comparedNames, nearest } from "./near-names.ts";
import { readRegistryNumber } from "./registry-number.ts";
import { solidFormFromRow } from "./solid-form-rows.ts";
import { type BareSubstance, substanceFromDraft } from "./substance-from-draft.ts";
import type { FormName, ResolvedName, SolidForm, Substance, SubstanceIndex } from "./substances.ts";
import { faultAt, type PropertyTables, type Report, type TableFault } from "./table-cells.ts";

/**
 * Index of substances from tables already read, a later table laid over an earlier one: the program's own first, then
 * the group's. Contradictions are collected in `faults`, never thrown; the values concerned are left out.
 */
export function substanceIndex(layers: readonly PropertyTables[]): SubstanceIndex {
  const faults: TableFault[] = [];
  const report: Report = (fault) => faults.push(fault);
  const drafts = layerTables(layers, report);
  const bare = drafts.map((draft) => substanceFromDraft(draft, report));
  const names = nameTable(bare, drafts);
  reportDuplicates(names, bare, drafts, report);
  const substances = withForms(bare, drafts, names, report);
  return { substances, faults, ...lookups(substances, names) };
}

function withForms(
  bare: readonly BareSubstance[],
  drafts: readonly Draft[],
  names: NameTable,
  report: Report,
): Substance[] {
  const molarMassByName = (name: string) => {
    const at = names.only(name);
    return at === undefined ? undefined : bare[at]?.molarMass;
  };
  const forms = bare.map((substance, at) =>
    [...(drafts[at]?.forms.values() ?? [])]
      .map((row) => solidFormFromRow(row, substance.molarMass, molarMassByName, report))
      .filter((form) => form !== undefined),
  );
  const formNames = new Map<number, FormName>();
  for (const [at, list] of forms.entries()) {
    const substance = bare[at]?.name ?? "";
    for (const { form } of list) {
      const own = names.only(`${substance} ${form}`);
      if (own !== undefined && own !== at) formNames.set(own, { substance, form });
    }
  }
  return bare.map((substance, at) => ({
    ...substance,
    solidForms: forms[at] ?? [],
    formOf: formNames.get(at),
  }));
}

function reportDuplicates(
  names: NameTable,
  bare: readonly BareSubstance[],
  drafts: readonly Draft[],
  report: Report,
): void {
  for (const { text, places } of names.ambiguous) {
    const row = drafts[places.at(-1) ?? 0]?.row;
    const meant = places.map((at) => bare[at]?.name).join(" and ");
    if (row !== undefined) report(faultAt(row, "synonyms", "duplicate name", `"${text}" stands for ${meant}`));
  }
  const seen = new Map<string, string>();
  for (const [at, { name, inchikey }] of bare.entries()) {
    if (inchikey === undefined) continue;
    const other = seen.get(inchikey);
    const row = drafts[at]?.row;
    if (other !== undefined && row !== undefined) {
      report(faultAt(row, "inchikey", "duplicate identifier", `${inchikey} stands for ${other} and ${name}`));
    }
    seen.set(inchikey, name);
  }
}

function lookups(substances: readonly Substance[], names: NameTable): Omit<SubstanceIndex, "substances" | "faults"> {
  const byCas = uniqueMap(substances, ({ cas }) => cas);
  const byInchikey = uniqueMap(substances, ({ inchikey }) => inchikey);
  const bySmiles = uniqueMap(substances, ({ smiles }) => smiles);
  const byName = (text: string) => {
    const at = names.only(text);
    return at === undefined ? undefined : substances[at];
  };
  let spellings: readonly ComparedName[] | undefined;
  let formNames: ReadonlyMap<string, ResolvedName> | undefined;
  const resolve = (text: string): ResolvedName | undefined => {
    const named = byName(text);
    if (named !== undefined) return unsolvated(named, byName);
    // Few texts name a form: the table of form names is made when the first one does.
    formNames ??= formNameTable(substances);
    const found = formNames.get(nameKey(text)) ?? resolveHydrateFormula(text, byName);
    return found ?? racemateOf(text, byName) ?? formInName(text, byName, formOf);
  };
  return {
    byName,
    namesakes: (text) => names.all(text).map((at) => substances[at] as Substance),
    byCas: (cas) => {
      const read = readRegistryNumber(cas);
      return read.ok ? byCas.get(read.cas) : undefined;
    },
    byInchikey: (inchikey) => byInchikey.get(inchikey.trim()),
    bySmiles: (smiles) => bySmiles.get(smiles.trim()),
    resolve,
    unsolvated: (substance) => unsolvated(substance, byName),
    formOf,
    nearNames: (text) => {
      spellings ??= comparedNames(names.spellings());
      return nearest(text, spellings);
    },
  };
}

/** Entries that belong to one substance only: an identifier of two finds none. */
function uniqueMap(
  substances: readonly Substance[],
  key: (substance: Substance) => string | undefined,
): ReadonlyMap<string, Substance> {
  const map = new Map<string, Substance>();
  const twice = new Set<string>();
  for (const substance of substances) {
    const text = key(substance);
    if (text === undefined) continue;
    if (map.has(text)) twice.add(text);
    map.set(text, substance);
  }
  for (const text of twice) map.delete(text);
  return map;
}

function unsolvated(named: Substance, byName: SubstanceIndex["byName"]): ResolvedName {
  const parent = named.formOf === undefined ? undefined : byName(named.formOf.substance);
  if (parent === undefined || named.formOf === undefined) return { substance: named, form: undefined };
  return { substance: parent, form: formOf(parent, named.formOf.form) };
}

/** "SUBSTANCE FORM" for every name of a substance and every form of it. */
function formNameTable(substances: readonly Substance[]): ReadonlyMap<string, ResolvedName> {
  const table = new Map<string, ResolvedName>();
  for (const substance of substances) {
    for (const form of substance.solidForms) {
      for (const name of [substance.name, ...substance.synonyms]) {
        const key = nameKey(`${name} ${form.form}`);
        if (!table.has(key)) table.set(key, { substance, form });
      }
    }
  }
  return table;
}

/** A formula with crystal solvent whose unsolvated part and stoichiometry are listed. */
function resolveHydrateFormula(text: string, byName: SubstanceIndex["byName"]): ResolvedName | undefined {
  if (!/[·•∙⋅*.×]/.test(text)) return undefined;
  const formula = parseFormula(text);
  const parts = "fault" in formula ? undefined : hydrateParts(formula);
  const substance = parts === undefined ? undefined : byName(parts.anhydrous);
  if (parts === undefined || substance === undefined) return undefined;
  const form = substance.solidForms.find(({ guest, guestPerSolute }) => {
    const guestFormula = guest === undefined ? undefined : byName(guest)?.formula;
    const same = guestFormula !== undefined && hillOf(guestFormula) === hillOf(parts.guest);
    return same && guestPerSolute !== undefined && Math.abs(guestPerSolute - parts.guestPerUnit) < 1e-3;
  });
  return form === undefined ? undefined : { substance, form };
}

/** The substance listed as a racemate under another of the usual prefixes; undefined where these lead to several. */
function racemateOf(text: string, byName: SubstanceIndex["byName"]): ResolvedName | undefined {
  const found = new Set(racemateKeys(text).flatMap((key) => byName(key) ?? []));
  const [only] = found;
  return only === undefined || found.size > 1 ? undefined : unsolvated(only, byName);
}

function hillOf(text: string): string | undefined {
  const formula = parseFormula(text);
  return "fault" in formula ? undefined : hillFormula(formula.elements);
}

/** A form by its name, however it is written; "IV" finds "phase IV" too, where it is the only form with that label. */
function formOf({ solidForms }: Substance, form: string): SolidForm | undefined {
  const wanted = formName(form);
  const bare = (text: string) => formName(text).replace(/^(?:form|phase|type) (?=.)/, "");
  const only = (found: readonly SolidForm[]) => (found.length === 1 ? found[0] : undefined);
  return (
    solidForms.find((listed) => nameKey(listed.form) === nameKey(form)) ??
    only(solidForms.filter((listed) => formName(listed.form) === wanted)) ??
    only(solidForms.filter((listed) => bare(listed.form) === bare(form) && bare(form) !== ""))
  );
}

import { readableId } from "../../records/readable-ids.ts";
import type { System } from "../../records/systems.ts";

/** The systems of one solute in one solid form and medium over one binary solvent, its two pure ends included. */
export interface MixtureGroup {
  /** Readable id, unique in the edition. */
  readonly id: string;
  readonly solute: string;
  readonly solidForm: string;
  readonly medium: string;
  readonly solvents: readonly [string, string];
  /** Ascending by the mass fraction of the first solvent. */
  readonly members: readonly { readonly system: System; readonly fraction: number }[];
}

/** Groups the systems with two solvents; pure ends join every binary they belong to. Sorted by id in code-unit order. */
export function mixtureGroups(systems: readonly System[]): MixtureGroup[] {
  const groups = new Map<string, System[]>();
  const pure = new Map<string, System>();
  for (const system of systems) {
    const names = system.identity.solventComponents.map(({ name }) => name);
    const key = keyOf(system, names);
    if (names.length === 1) pure.set(key, system);
    if (names.length !== 2) continue;
    const known = groups.get(key);
    if (known === undefined) groups.set(key, [system]);
    else known.push(system);
  }
  const made = [...groups].map(([key, mixed]) => {
    const first = mixed[0] as System;
    const [one, two] = first.identity.solventComponents.map(({ name }) => name) as [string, string];
    return groupOf(key, first, [one, two], mixed, [pure.get(keyOf(first, [one])), pure.get(keyOf(first, [two]))]);
  });
  return made.sort((a, b) => (a.id < b.id ? -1 : 1));
}

function keyOf({ identity: { solute, solidForm, medium } }: System, solvents: readonly string[]): string {
  return JSON.stringify([solute, solidForm, medium, ...solvents]);
}

function groupOf(
  key: string,
  { identity: { solute, solidForm, medium } }: System,
  solvents: readonly [string, string],
  mixed: readonly System[],
  [pureFirst, pureSecond]: readonly [System | undefined, System | undefined],
): MixtureGroup {
  const members = [
    ...(pureSecond === undefined ? [] : [{ system: pureSecond, fraction: 0 }]),
    ...mixed
      .map((system) => ({ system, fraction: system.identity.solventComponents[0]?.massFraction ?? Number.NaN }))
      .sort((a, b) => a.fraction - b.fraction || a.system.index - b.system.index),
    ...(pureFirst === undefined ? [] : [{ system: pureFirst, fraction: 1 }]),
  ];
  const form = solidForm === "unspecified" ? "" : solidForm;
  const id = readableId([solute, form, "in", `${solvents[0]} + ${solvents[1]}`, medium], `mixture ${key}`);
  return { id, solute, solidForm, medium, solvents, members };
}

import type { Edition } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import { GRID_COLUMNS, type GridRow } from "../../records/generated/grid.ts";
import type { System } from "../../records/systems.ts";
import { gridRows } from "../tables/grid.ts";
import { coolingRows } from "../tables/planning-cooling.ts";
import { cautionsPage } from "./cautions-page.ts";
import { flagsPage } from "./flags-page.ts";
import { methodsPage } from "./methods-page.ts";
import { mixturePages } from "./mixture-page.ts";
import { overviewPage, systemFile } from "./overview-page.ts";
import { refusedPage } from "./refused-page.ts";
import { settingsPage } from "./settings-page.ts";
import { sourcesPage } from "./sources-page.ts";
import { systemPage } from "./system-page.ts";
import { systemView } from "./system-view.ts";

/** Values by key, each list in the order of the input. */
function grouped<Key, Value>(values: Iterable<Value>, keyOf: (value: Value) => Key | undefined): Map<Key, Value[]> {
  const groups = new Map<Key, Value[]>();
  for (const value of values) {
    const key = keyOf(value);
    if (key === undefined) continue;
    const group = groups.get(key);
    if (group) group.push(value);
    else groups.set(key, [value]);
  }
  return groups;
}

/** Rows of `grid.csv` by the names of its columns. */
function* namedGridRows(edition: Edition): Generator<GridRow> {
  for (const cells of gridRows(edition)) {
    yield Object.fromEntries(GRID_COLUMNS.map((column, i) => [column, cells[i]])) as unknown as GridRow;
  }
}

/**
 * Reads a table system by system without holding it whole: gives the next rows as long as they belong to `system`.
 * The table must have its rows in the order in which systems are asked for.
 */
function systemBySystem<Row extends { readonly system: string }>(rows: Iterator<Row>): (system: System) => Row[] {
  let next = rows.next();
  return ({ id }) => {
    const own: Row[] = [];
    for (; next.done !== true && next.value.system === id; next = rows.next()) own.push(next.value);
    return own;
  };
}

/** Every page of the report, one at a time: name below `report/`, and text. */
export function* reportPages(edition: Edition): Generator<readonly [name: string, text: string]> {
  const flagsOf = grouped(edition.flags, ({ system }: Flag) => system);
  const families = grouped(edition.systems, ({ family }) => family);
  const bySolute = [...edition.systems].sort((a, b) => (a.key < b.key ? -1 : 1));
  const place = new Int32Array(edition.systems.length);
  bySolute.forEach(({ index }, i) => {
    place[index] = i;
  });
  yield ["index.html", overviewPage(edition, bySolute, flagsOf)];
  yield ["flags.html", flagsPage(edition)];
  yield ["refused.html", refusedPage(edition)];
  yield ["sources.html", sourcesPage(edition)];
  yield ["methods.html", methodsPage(edition)];
  yield ["settings.html", settingsPage(edition)];
  yield ["cautions.html", cautionsPage(edition)];
  yield* mixturePages(edition, edition.mixtures.models);
  const gridOf = systemBySystem(namedGridRows(edition));
  const coolingOf = systemBySystem(coolingRows(edition));
  for (const system of edition.systems) {
    const at = place[system.index] as number;
    const neighbours = {
      previous: bySolute[at - 1],
      next: bySolute[at + 1],
      family: families.get(system.family) ?? [],
    };
    const tables = { grid: gridOf(system), cooling: coolingOf(system) };
    yield [
      systemFile(system),
      systemPage(systemView(edition, system, flagsOf.get(system.index) ?? []), neighbours, tables),
    ];
  }
}

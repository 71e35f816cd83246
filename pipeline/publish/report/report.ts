import type { Edition } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import { refusedPage, sourcesPage } from "./account-pages.ts";
import { overviewPage, systemFile } from "./overview-page.ts";
import { systemPage } from "./system-page.ts";

/** Every page of the report, one at a time: name below `report/`, and text. */
export function* reportPages(edition: Edition): Generator<readonly [name: string, text: string]> {
  const flagsOfSystem = new Map<number, Flag[]>();
  for (const flag of edition.flags) {
    if (flag.system === undefined) continue;
    const before = flagsOfSystem.get(flag.system);
    if (before) before.push(flag);
    else flagsOfSystem.set(flag.system, [flag]);
  }
  yield ["index.html", overviewPage(edition, flagsOfSystem)];
  yield ["refused.html", refusedPage(edition)];
  yield ["sources.html", sourcesPage(edition)];
  for (const system of edition.systems) {
    yield [systemFile(system), systemPage(edition, system, flagsOfSystem.get(system.index) ?? [])];
  }
}

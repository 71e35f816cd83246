import { existsSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { pathToFileURL } from "node:url";
import { type Browser, type BrowserContextOptions, chromium, type Page } from "playwright-core";

/** Debian's Chromium; tests that need a browser are skipped where it is absent. */
export const CHROMIUM = "/usr/bin/chromium";
export const hasChromium = existsSync(CHROMIUM);
if (!hasChromium) console.warn(`${CHROMIUM} is absent: the tests that look at the report in a browser are skipped`);

/** Starts the browser without any service of its own that would use a network. */
export function startBrowser(): Promise<Browser> {
  const quiet = ["--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update"];
  return chromium.launch({
    executablePath: CHROMIUM,
    args: ["--headless", "--no-sandbox", "--disable-gpu", "--disable-sync", ...quiet],
  });
}

/** A page with everything it did: console messages, errors, dialogs, requests. */
export interface WatchedPage {
  readonly page: Page;
  readonly faults: string[];
  readonly requests: string[];
}

/** Opens a file of a report in a fresh context. */
export async function openPage(
  browser: Browser,
  file: string,
  options: BrowserContextOptions = {},
): Promise<WatchedPage> {
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, ...options });
  const page = await context.newPage();
  const faults: string[] = [];
  const requests: string[] = [];
  page.on("console", (message) => faults.push(`${message.type()}: ${message.text()}`));
  page.on("pageerror", (error) => faults.push(`error: ${error.message}`));
  page.on("dialog", (dialog) => {
    faults.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on("request", (request) => requests.push(request.url()));
  await page.goto(pathToFileURL(file).href);
  return { page, faults, requests };
}

/** How much wider the content of a page is than its window, in pixels. */
export function overflowOf(page: Page): Promise<number> {
  return page.evaluate("document.documentElement.scrollWidth - window.innerWidth") as Promise<number>;
}

const axeSource = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

/** Violations that axe-core finds, as `rule: first element concerned`; all rules, or those named. */
export async function axeViolations(page: Page, rules?: readonly string[]): Promise<string[]> {
  await page.evaluate(`if (window.axe === undefined) { ${axeSource} }`);
  const options = { resultTypes: ["violations"], ...(rules === undefined ? {} : { runOnly: rules }) };
  const found = (await page.evaluate(`axe.run(document, ${JSON.stringify(options)})`)) as {
    violations: { id: string; nodes: { html: string; failureSummary: string }[] }[];
  };
  return found.violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html.slice(0, 200)} ${nodes[0]?.failureSummary}`);
}

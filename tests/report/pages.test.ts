import { rmSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import { axeViolations, hasChromium, openPage, overflowOf, startBrowser } from "./chromium.ts";
import { HOSTILE_NAMES, MANY, makeHostileCollection } from "./hostile-collection.ts";
import { type WrittenReport, writeReport } from "./written-report.ts";

const demo = fileURLToPath(new URL("../../datasets/demo/", import.meta.url));
const GENERAL = ["index", "flags", "refused", "sources", "methods", "settings", "cautions"].map((n) => `${n}.html`);
const NARROW = { width: 390, height: 844 };
const WIDE = { width: 1280, height: 900 };

/** A browser on a busy machine may take long. */
const PATIENCE_MS = 120_000;
vi.setConfig({ testTimeout: PATIENCE_MS, hookTimeout: PATIENCE_MS });

let browser: Browser;
beforeAll(async () => {
  if (hasChromium) browser = await startBrowser();
});
afterAll(() => browser?.close());

describe.skipIf(!hasChromium)("the report in a browser", () => {
  let report: WrittenReport;
  const file = (name: string) => join(report.folder, "report", name);
  beforeAll(async () => {
    report = await writeReport(demo);
  });
  afterAll(() => report?.remove());

  /** Pages of three systems: the flagged ones with most and with fewest measurements, and the smallest of all. */
  const chosen = () => {
    const { systems, flags } = report.edition;
    const bySize = [...systems].sort((a, b) => b.rows.length - a.rows.length);
    const flagged = bySize.filter(({ index }) => flags.some(({ system }) => system === index));
    return [flagged[0], flagged.at(-1), bySize.at(-1)].map((system) => `systems/${system?.id}.html`);
  };

  test("every kind of page opens without a message or a request beyond itself, fits at 390 and 1280 px, and axe-core finds nothing in light and dark", async () => {
    const { page, faults, requests } = await openPage(browser, file("index.html"));
    const [, small] = chosen();
    const inDark = new Set(["refused.html", small]);
    for (const name of [...GENERAL, ...chosen()]) {
      requests.length = 0;
      await page.setViewportSize(WIDE);
      await page.emulateMedia({ colorScheme: "light" });
      await page.goto(`file://${file(name)}`);
      expect(requests, name).toEqual([`file://${file(name)}`]);
      expect(await overflowOf(page), `${name} at 1280 px`).toBeLessThanOrEqual(0);
      // The largest table has nothing that the others have not, and would take most of the time.
      if (name !== chosen()[0]) expect(await axeViolations(page), `${name} in light`).toEqual([]);
      await page.setViewportSize(NARROW);
      await page.emulateMedia({ colorScheme: "dark" });
      expect(await overflowOf(page), `${name} at 390 px`).toBeLessThanOrEqual(0);
      if (inDark.has(name)) expect(await axeViolations(page, ["color-contrast"]), `${name} in dark`).toEqual([]);
      expect(faults, name).toEqual([]);
    }
    await page.context().close();
  });

  test("the search narrows the systems by every word typed; without a script all are listed and no dead box is shown", async () => {
    const total = report.edition.systems.length;
    const { page } = await openPage(browser, file("index.html"));
    expect(await page.locator("tr.system:visible").count()).toBe(total);
    await page.getByLabel("Show systems with").fill("Benzoic toluene");
    expect(await page.locator("tr.system:visible").count()).toBe(1);
    expect(await page.locator("tbody.group:visible").count()).toBe(1);
    expect(await page.locator("#told").textContent()).toBe(`1 of ${total} systems`);
    await page.context().close();
    const bare = await openPage(browser, file("index.html"), { javaScriptEnabled: false });
    expect(await bare.page.locator("tr.system:visible").count()).toBe(total);
    expect(await bare.page.locator("#search").isVisible()).toBe(false);
    await bare.page.context().close();
  });

  test("the keyboard first meets a link over the navigation and reaches every scrolling table; print drops the navigation, keeps every column and is dark on white", async () => {
    const { page } = await openPage(browser, file(chosen()[0] as string));
    await page.keyboard.press("Tab");
    expect(await page.evaluate("document.activeElement.textContent")).toBe("Skip to content");
    await page.keyboard.press("Enter");
    expect(await page.evaluate("document.activeElement.id")).toBe("content");
    expect(await page.locator(".wide:not([tabindex='0'])").count()).toBe(0);

    // A4 with margins of 12 mm leaves 186 mm, 703 px at 96 px per inch.
    await page.setViewportSize({ width: 703, height: 990 });
    await page.emulateMedia({ media: "print", colorScheme: "dark" });
    expect(await page.locator("nav:visible").count()).toBe(0);
    expect(await page.locator("svg.plot:visible").count()).toBe(5);
    expect(await overflowOf(page)).toBeLessThanOrEqual(0);
    expect(await page.evaluate("getComputedStyle(document.body).backgroundColor")).toBe("rgb(255, 255, 255)");
    await page.context().close();
  });
});

describe.skipIf(!hasChromium)("a report on hostile names", () => {
  let report: WrittenReport;
  let collection: string;
  const file = (name: string) => join(report.folder, "report", name);
  beforeAll(async () => {
    collection = makeHostileCollection();
    report = await writeReport(collection);
  });
  afterAll(() => {
    report?.remove();
    rmSync(collection, { recursive: true, force: true });
  });

  test("runs nothing, asks for nothing, turns no line, is bounded, and fits at 390 px", async () => {
    const { systems } = report.edition;
    expect(systems).toHaveLength(HOSTILE_NAMES.length + MANY);
    const ids = HOSTILE_NAMES.map((name) =>
      systems.find(({ identity: i }) => i.solute === name && i.solvent === "water"),
    );
    const { page, faults, requests } = await openPage(browser, file("index.html"), { viewport: NARROW });
    const names = [...GENERAL, ...ids.map((system) => `systems/${system?.id}.html`)];
    for (const name of names) {
      await page.goto(`file://${file(name)}`);
      expect(await overflowOf(page), name).toBeLessThanOrEqual(0);
      const seen = (await page.evaluate(
        "({ hit: window.hit, images: document.images.length, scripts: document.scripts.length, text: document.body.textContent })",
      )) as { hit?: number; images: number; scripts: number; text: string };
      expect([seen.hit, seen.images, seen.scripts], name).toEqual([undefined, 0, name === "index.html" ? 1 : 0]);
      expect(/\p{Bidi_Control}|(?!\n)\p{Cc}/u.exec(seen.text)?.[0], name).toBeUndefined();
      expect(seen.text, name).not.toMatch(/x{1001}/);
    }
    expect(faults).toEqual([]);
    expect(requests).toHaveLength(names.length + 1);
    await page.context().close();
  });

  test("shows names as they were written, or cut with their whole length told; 200 systems of one solute stand together", async () => {
    const { page } = await openPage(browser, file("index.html"));
    const heads = (await page.locator("tbody.group th[scope=rowgroup]").allTextContents()) as string[];
    expect(heads).toContain(HOSTILE_NAMES[0]);
    expect(heads).toContain(HOSTILE_NAMES[1]);
    expect(heads).toContain(`${"x".repeat(120)}… (2000 characters)`);
    const crowded = page.locator("tbody.group", { hasText: HOSTILE_NAMES[3] });
    expect(await crowded.locator("tr.system").count()).toBe(MANY + 1);
    expect(await overflowOf(page)).toBeLessThanOrEqual(0);
    await page.context().close();
  });
});

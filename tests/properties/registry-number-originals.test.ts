import { existsSync, readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readInchikey } from "../../pipeline/properties/inchikey.ts";
import { isRegistryNumber, readRegistryNumber } from "../../pipeline/properties/registry-number.ts";
import { suggestedNumbers } from "../../pipeline/properties/registry-number-suggestions.ts";
import { programIndex } from "./read-tables.ts";

const suggestions = (text: string): readonly string[] => {
  const read = readRegistryNumber(text);
  return read.ok ? [] : read.suggestions;
};

const MONTHS = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split(" ");

/** Days from 30 December 1899 by stepping through the calendar: the count that a spreadsheet keeps for a date. */
function dayCount(year: number, month: number, day: number): number {
  const leap = (y: number) => (y % 4 === 0 && y % 100 !== 0) || y % 400 === 0;
  let days = 1;
  for (let y = 1900; y < year; y++) days += leap(y) ? 366 : 365;
  const lengths = [31, leap(year) ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
  for (let m = 1; m < month; m++) days += lengths[m - 1] as number;
  return days + day;
}

describe("A registry number that became a date", () => {
  // 7758-02-3 is potassium bromide, 50-02-2 dexamethasone.
  test.each([
    ["day, month, year", "03/02/7758", "7758-02-3"],
    ["month, day, year", "2/3/7758", "7758-02-3"],
    ["the order of ISO 8601", "7758-02-03", "7758-02-3"],
    ["a time behind", "7758-02-03 00:00:00", "7758-02-3"],
    ["the T of ISO 8601", "7758-02-03T00:00:00.000Z", "7758-02-3"],
    ["points", "03.02.7758", "7758-02-3"],
    ["the month in letters", "3-Feb-7758", "7758-02-3"],
    ["the month first, in letters", "Feb 3, 7758", "7758-02-3"],
    ["a year that was completed", "1950-02-02", "50-02-2"],
    ["a year of two digits", "02/02/50", "50-02-2"],
    ["a year of two digits first", "50-02-02", "50-02-2"],
    ["day and short year in letters", "2-Feb-50", "50-02-2"],
    ["the day lost", "Feb-50", "50-02-2"],
    ["the day lost, long year", "Feb-7758", "7758-02-3"],
  ])("is recognised with %s: %s", (_, text, original) => {
    expect(readRegistryNumber(text)).toMatchObject({ ok: false, fault: "date" });
    expect(suggestions(text)).toContain(original);
  });

  test("is recognised by the count of days that a spreadsheet keeps", () => {
    // 18,295 days: 1 February 1950, as spreadsheets count (1 January 1900 is day 1, with their 29 February 1900).
    expect(dayCount(1950, 2, 1)).toBe(18_295);
    expect(suggestions(String(dayCount(1950, 2, 2)))).toContain("50-02-2");
    expect(suggestions(String(dayCount(7758, 2, 3)))).toContain("7758-02-3");
  });

  test("leads back to its original from every way of writing the date", () => {
    const number = fc
      .tuple(fc.integer({ min: 1000, max: 9999 }), fc.integer({ min: 1, max: 12 }))
      .map(([first, month]) => {
        const digits = `${first}${String(month).padStart(2, "0")}`;
        const sum = [...digits].reverse().reduce((total, digit, i) => total + (i + 1) * Number(digit), 0);
        return { first, month, digit: sum % 10 };
      })
      .filter(({ digit }) => digit > 0);
    fc.assert(
      fc.property(number, ({ first, month, digit }) => {
        const [mm, dd] = [month, digit].map((part) => String(part).padStart(2, "0"));
        const written = [`${first}-${mm}-${dd}`, `${dd}/${mm}/${first}`, `${month}/${digit}/${first}`];
        const words = [`${digit}-${MONTHS[month - 1]}-${first}`, `${MONTHS[month - 1]}-${first}`];
        const counted = first >= 1930 ? [String(dayCount(first, month, digit))] : [];
        for (const text of [...written, ...words, ...counted]) {
          expect(suggestions(text), text).toContain(`${first}-${mm}-${digit}`);
          expect(suggestions(text).every(isRegistryNumber)).toBe(true);
        }
      }),
      { numRuns: 60 },
    );
  });

  test.each([
    ["2057-02-27", "date"],
    ["31/12/2024", "date"],
    ["5-17-64", "shape"],
    ["45992", "shape"],
    ["13/13/2024", "shape"],
  ])("that no registry number gives has no original: %s", (text, fault) => {
    expect(readRegistryNumber(text)).toMatchObject({ ok: false, fault, suggestions: [] });
  });
});

describe("A registry number damaged otherwise", () => {
  test.each([
    ["its hyphens lost", "64175", "64-17-5"],
    ["its hyphens doubled", "64--17-5", "64-17-5"],
    ["points for hyphens", "64.17.5", "64-17-5"],
    ["padded with zeros", "000064-17-5", "64-17-5"],
    ["written with a power of ten", "6.4175E+04", "64-17-5"],
    ["written as a decimal", "7732185.0", "7732-18-5"],
  ])("is told with its likely original: %s (%s)", (_, text, original) => {
    expect(suggestions(text)).toEqual([original]);
  });

  test("keeps the mark of a text cell out", () => {
    expect(readRegistryNumber("'64-17-5")).toEqual({ ok: true, cas: "64-17-5" });
  });

  test("has no original where a power of ten has lost digits", () => {
    expect(suggestions("7.73E+06")).toEqual([]);
  });

  // 2-propanol, caffeine and paracetamol with two digits exchanged or one wrong.
  test.each([
    ["67-36-0", "67-63-0", "2-propanol"],
    ["58-80-2", "58-08-2", "caffeine"],
    ["103-90-3", "103-90-2", "paracetamol"],
    ["103-9-2", "103-90-2", "paracetamol"],
  ])("%s is asked about as the listed %s", (text, cas, name) => {
    expect(suggestedNumbers(text, programIndex.substances)).toContainEqual({ cas, name });
  });

  test("is not asked about where it is right, or like none", () => {
    expect(suggestedNumbers("64-17-5", programIndex.substances)).toEqual([]);
    expect(suggestedNumbers("water", programIndex.substances)).toEqual([]);
    expect(suggestedNumbers("1".repeat(1_000_000), programIndex.substances)).toEqual([]);
  });
});

const folder = new URL("../../../shared/reference/properties/", import.meta.url);
const present = existsSync(folder);
const examples = (file: string): Record<string, string>[] =>
  present ? parse(readFileSync(new URL(file, folder)), { columns: true }) : [];

/** Examples that are wrong as they stand but differ in typography only, which is folded before the check. */
const FOLDED = ["64–17–5", "CAS 64-17-5"];

test.skipIf(!present)("32 worked examples of registry numbers (skipped where ../shared is absent)", () => {
  const rows = examples("cas_rn_examples.csv");
  expect(rows.length).toBe(32);
  for (const { text = "", valid } of rows) {
    expect(isRegistryNumber(text), text).toBe(valid === "yes" || FOLDED.includes(text));
  }
  const dates = rows.filter(({ reason = "" }) => reason.includes("date"));
  expect(dates.length).toBe(3);
  for (const { text = "", reason = "" } of dates) expect(suggestions(text)).toEqual([/^[\d-]+/.exec(reason)?.[0]]);
});

test.skipIf(!present)("15 worked examples of InChIKeys (skipped where ../shared is absent)", () => {
  const rows = examples("inchikey_examples.csv");
  expect(rows.length).toBe(15);
  for (const { text = "", valid } of rows) expect(readInchikey(text).ok, text).toBe(valid === "yes");
});

test.skipIf(!present)(
  "the shapes of the identifier rules (skipped where ../shared is absent) are those held here",
  () => {
    const rules = JSON.parse(readFileSync(new URL("identifier_rules.json", folder), "utf8"));
    const [number, key] = [new RegExp(rules.cas_rn.regex), new RegExp(rules.inchikey.regex)];
    // The check digit that the rule's worked example computes.
    expect(rules.cas_rn.worked).toContain("105 mod 10 = 5");
    fc.assert(
      fc.property(fc.stringMatching(/^[0-9]{1,8}-[0-9]{1,3}-[0-9]{1,2}$/), (text) => {
        if (!number.test(text)) expect(isRegistryNumber(text)).toBe(false);
        if (isRegistryNumber(text)) expect(number.test(text)).toBe(true);
      }),
    );
    fc.assert(
      fc.property(fc.stringMatching(/^[A-Z0-9]{13,15}-[A-Z]{8}[A-Z][AB]-[A-Z]$/), (text) => {
        expect(readInchikey(text).ok).toBe(key.test(text));
      }),
    );
  },
);

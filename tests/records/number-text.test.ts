import fc from "fast-check";
import { expect, test } from "vitest";
import { parseInterval, parseNumber } from "../../pipeline/records/number-text.ts";

test.each([
  ["12", 12],
  ["-1.5", -1.5],
  ["+2", 2],
  [".5", 0.5],
  ["5.", 5],
  ["007", 7],
  ["1e-3", 0.001],
  ["1.2E+05", 120000],
  ["−3.5", -3.5],
  ["1.2×10^-3", 0.0012],
  ["1.2 x 10^-3", 0.0012],
  ["1.2·10⁻³", 0.0012],
  ["0e-400", 0],
])("%s is the number %d", (text, value) => {
  expect(parseNumber(text, ".")).toEqual({ ok: true, value });
});

test.each([
  ["1,5", 1.5],
  ["-0,25", -0.25],
  [",5", 0.5],
  ["1,234", 1.234],
  ["1,2e-3", 0.0012],
  ["12", 12],
])("%s is the number %d where the source uses a decimal comma", (text, value) => {
  expect(parseNumber(text, ",")).toEqual({ ok: true, value });
});

test.each(["", "-", ".", "n.d.", "NaN", "Infinity", "-inf", "0x10", "0b1", "1_000", "1e", "e5", "1..2", "12a", "1 2"])(
  "%j is not a number",
  (text) => {
    expect(parseNumber(text, ".")).toMatchObject({ ok: false, code: "not-a-number" });
    expect(parseNumber(text, ",")).toMatchObject({ ok: false, code: "not-a-number" });
  },
);

test.each(["12 g", "5 ± 0.2", "~5", "25 °C", "1.2×10-3", "1e2×10^3", "٣", "１２", "true", "65-85-0", "2026-03-14"])(
  "%j is refused, not stripped down to a number",
  (text) => {
    expect(parseNumber(text, ".")).toMatchObject({ ok: false, code: "not-a-number" });
  },
);

test.each(["1.2e400", "-1e309", "1e-400", "9".repeat(310)])("%s does not fit a double and is refused", (text) => {
  expect(parseNumber(text, ".")).toMatchObject({ ok: false, code: "number-out-of-range" });
});

test.each([
  ["1,234.5", ".", "1234.5"],
  ["1,234", ".", "1234 (with a thousands separator) or as 1.234"],
  ["1,234,567", ".", "1234567"],
  ["1.234,5", ".", "1234.5"],
  ["12,5", ".", "12.5 or as 125"],
  ["12.5", ",", "12.5 or as 125"],
  ["1.234", ",", "1234 (with a thousands separator) or as 1.234"],
  ["1 234,5", ",", "1234.5"],
  ["1'234.5", ".", "1234.5"],
] as const)("%s with the decimal mark %s is refused with its readings: %s", (text, decimal, readings) => {
  const read = parseNumber(text, decimal);
  expect(read).toMatchObject({ ok: false, code: "ambiguous-number" });
  expect(read).toHaveProperty("found", expect.stringContaining(`"${text}" can be read as ${readings}`));
});

test("every finite double is read back from its shortest text, with either decimal mark", () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      expect(parseNumber(String(value), ".")).toEqual({ ok: true, value: value === 0 ? 0 : value });
      expect(parseNumber(String(value).replace(".", ","), ",")).toEqual({ ok: true, value: value === 0 ? 0 : value });
    }),
  );
});

test("whatever the text, the result is a finite number or a refusal with a code", () => {
  const nearNumbers = fc.string({ unit: fc.constantFrom(..."0123456789.,eE+-−x×^ <>'n"), maxLength: 12 });
  fc.assert(
    fc.property(fc.oneof(nearNumbers, fc.string()), fc.constantFrom(".", ","), (text, decimal) => {
      const read = parseNumber(text, decimal as "." | ",");
      if (read.ok) expect(Number.isFinite(read.value)).toBe(true);
      else expect(read.found.length).toBeGreaterThan(0);
    }),
  );
});

test("a hostile cell of a million digits is refused at once", () => {
  const start = performance.now();
  for (const text of ["1".repeat(1e6), `${"1".repeat(1e6)}x`, `<${"1,".repeat(5e5)}`]) {
    expect(parseNumber(text, ".").ok).toBe(false);
    parseInterval(text, ".");
  }
  expect(performance.now() - start).toBeLessThan(500);
});

test.each([
  ["<0.05", { high: 0.05 }],
  ["< 0.05", { high: 0.05 }],
  ["<= 0.05", { high: 0.05 }],
  ["≤0.05", { high: 0.05 }],
  [">1", { low: 1 }],
  ["≥ 1e3", { low: 1000 }],
  ["0.2-0.4", { low: 0.2, high: 0.4 }],
  ["0.2 – 0.4", { low: 0.2, high: 0.4 }],
  ["0.2 to 0.4", { low: 0.2, high: 0.4 }],
  ["-3.2--3.0", { low: -3.2, high: -3 }],
  ["1e-3-2e-3", { low: 0.001, high: 0.002 }],
])("%s is a range", (text, limits) => {
  expect(parseInterval(text, ".")).toEqual({ ok: true, ...limits });
});

test.each(["5", "1e-3", "-2", "n.d.", "", "<", "2026-03-14", "65-85-0"])("%j has not the form of a range", (text) => {
  expect(parseInterval(text, ".")).toBeUndefined();
});

test("a range with limits that are no numbers, ambiguous or the wrong way round is refused", () => {
  expect(parseInterval("<n.d.", ".")).toMatchObject({ ok: false, code: "not-a-number" });
  expect(parseInterval("1,000-2,000", ".")).toMatchObject({ ok: false, code: "ambiguous-number" });
  expect(parseInterval("0.4-0.2", ".")).toMatchObject({ ok: false, code: "not-a-number" });
});

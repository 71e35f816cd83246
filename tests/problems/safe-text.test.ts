import fc from "fast-check";
import { expect, test } from "vitest";
import { safeText } from "../../pipeline/problems/safe-text.ts";

test("ordinary text of any script is left as it is", () => {
  expect(safeText("CuSO₄·5H₂O, 25 °C, Löslichkeit, растворимость, 溶解度")).toBe(
    "CuSO₄·5H₂O, 25 °C, Löslichkeit, растворимость, 溶解度",
  );
});

test.each([
  ["\u001b[2J", "\\x1b[2J"],
  ["a\tb\nc\r", "a\\tb\\nc\\r"],
  ["\u202eabc\u2066", "\\u{202e}abc\\u{2066}"],
  ["\u200bzero\ufeff", "\\u{200b}zero\\u{feff}"],
  ["\u009b31m", "\\x9b31m"],
  ["\u2028", "\\u{2028}"],
  ["\ud800", "\\u{d800}"],
  ["\u{e0041}", "\\u{e0041}"],
])("%j is shown as %s", (text, shown) => {
  expect(safeText(text)).toBe(shown);
});

test("a long text is cut with its length told, never in the middle of a character", () => {
  expect(safeText("abcdef", 3)).toBe("abc… (6 characters)");
  expect(safeText("ab😀cd", 3)).toBe("ab… (6 characters)");
});

test("whatever the text, the result holds no control, format or unpaired surrogate character", () => {
  fc.assert(
    fc.property(fc.string({ unit: "binary", maxLength: 60 }), fc.integer({ min: 1, max: 40 }), (text, length) => {
      expect(safeText(text, length)).not.toMatch(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/u);
    }),
  );
});

import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { escapeText, html, raw } from "../../../pipeline/publish/report/html.ts";

describe("text in a page of the report", () => {
  test("is shown, never run", () => {
    expect(html`<td>${"<script>alert(1)</script>"}</td>`.html).toBe("<td>&lt;script&gt;alert(1)&lt;/script&gt;</td>");
  });

  test("cannot leave an attribute", () => {
    expect(html`<a title="${`" onmouseover='x' a="`}">`.html).toBe(
      '<a title="&quot; onmouseover=&#39;x&#39; a=&quot;">',
    );
  });

  test("has no markup left whatever it was, unless it was made as markup", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (text) => {
        expect(html`${text}`.html).not.toMatch(/[<>"']/);
      }),
    );
    expect(html`${raw("<b>")}${[html`<i>`, html`${"<u>"}`]}${undefined}${3}`.html).toBe("<b><i>&lt;u&gt;3");
  });

  // Unicode property Bidi_Control: U+061C, U+200E, U+200F, U+202A to U+202E, U+2066 to U+2069.
  test.each(["061c", "200e", "200f", "202a", "202b", "202c", "202d", "202e", "2066", "2067", "2068", "2069"])(
    "shows the bidirectional control U+%s as a code instead of letting it turn the line",
    (code) => {
      const character = String.fromCodePoint(Number.parseInt(code, 16));
      const shown = escapeText(`abc${character}def`);
      expect(shown).not.toContain(character);
      expect(shown).toContain(code.replace(/^0/, ""));
    },
  );

  test("holds no control or escape character", () => {
    for (let code = 0; code < 0xa0; code++) {
      const character = String.fromCodePoint(code);
      if (!/\p{Cc}/u.test(character) || character === "\n" || character === "\t") continue;
      expect(escapeText(`a${character}b`)).not.toContain(character);
    }
  });
});

import fc from "fast-check";
import { expect, test } from "vitest";
import { beyondMark, intervalMark } from "../../../pipeline/publish/report/marks.ts";

const EDGES = { top: 50, bottom: 350 };

/** Heights that a path goes through; it is made of M, V, h, v, m and l alone. */
function heights(mark: string): number[] {
  const [, path = ""] = / d="([^"]*)"/.exec(mark) ?? [];
  let y = 0;
  const found: number[] = [];
  for (const [, command = "", text = ""] of path.matchAll(/([MVhvml])([-\d.,]*)/g)) {
    const numbers = text.split(",").map(Number);
    if (command === "M") y = numbers[1] as number;
    else if (command === "V") y = numbers[0] as number;
    else if (command === "v") y += numbers[0] as number;
    else if (command !== "h") y += numbers[1] as number;
    found.push(y);
  }
  return found;
}

const inside = fc.double({ min: EDGES.top + 10, max: EDGES.bottom - 10, noNaN: true });

test("a range with both ends goes from cap to cap, and ends at an edge without a cap where it goes on beyond", () => {
  fc.assert(
    fc.property(inside, inside, (a, b) => {
      const [low, high] = [Math.max(a, b), Math.min(a, b)];
      const whole = intervalMark(100, low, high, EDGES).html;
      expect(whole.match(/h10/g)).toHaveLength(2);
      expect(intervalMark(100, 900, high, EDGES).html.match(/h10/g)).toHaveLength(1);
      expect(intervalMark(100, 900, -900, EDGES).html).not.toContain("h10");
      for (const one of [whole, intervalMark(100, 900, -900, EDGES).html]) {
        for (const y of heights(one)) expect(y >= EDGES.top - 0.1 && y <= EDGES.bottom + 0.1).toBe(true);
      }
    }),
  );
});

test("an open side is an arrow that stays inside the plot", () => {
  fc.assert(
    fc.property(inside, (y) => {
      const [down, up] = [intervalMark(100, Number.NaN, y, EDGES).html, intervalMark(100, y, Number.NaN, EDGES).html];
      expect(Math.max(...heights(down))).toBeGreaterThan(y + 8);
      expect(Math.max(...heights(down))).toBeLessThanOrEqual(EDGES.bottom + 0.1);
      expect(Math.min(...heights(up))).toBeLessThan(y - 8);
      expect(Math.min(...heights(up))).toBeGreaterThanOrEqual(EDGES.top - 0.1);
    }),
  );
});

test("a range that lies beyond an edge as a whole stands at that edge", () => {
  expect(Math.min(...heights(beyondMark(100, EDGES, true).html))).toBe(EDGES.top);
  expect(Math.max(...heights(beyondMark(100, EDGES, false).html))).toBe(EDGES.bottom);
});

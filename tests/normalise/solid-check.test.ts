import { expect, test } from "vitest";
import { createSolidCheck } from "../../pipeline/normalise/solid-check.ts";
import type { SourceCells } from "../../pipeline/normalise/source-cells.ts";
import type { Identified } from "../../pipeline/records/identified.ts";
import type { Reading } from "../../pipeline/records/readings.ts";
import type { Identity } from "../../pipeline/records/systems.ts";

test.each([
  ["XRPD", "", 1],
  ["xrpd", "form I", 1],
  ["Karl Fischer", "Form I", 1],
  ["XRPD", "I", 1],
  ["XRPD", "form II", 0],
  ["XRPD", "monohydrate", 0],
  ["none", "form I", 0],
  ["", "form I", 0],
  ["by eye", "form I", 0],
])("solid_check %j with solid_after %j counts as %i for form I, reported as I", (check, after, expected) => {
  const cells: Readonly<Record<string, string>> = { solid_check: check, solid_after: after, solid_form: "I" };
  const text = Object.fromEntries(Object.entries(cells).map(([field, value]) => [field, () => value]));
  const checked = createSolidCheck({ text: text as unknown as SourceCells["text"] }, [
    { solidForm: "form I" } as unknown as Identity,
  ]);
  expect(checked({} as Reading, { index: 0 } as Identified)).toBe(expected);
});

import { expect, test } from "vitest";
import { findDecimalMark } from "../../pipeline/read/decimal-mark.ts";

const mark = (...values: string[]) =>
  findDecimalMark(
    values.map((value, i) => ({ line: i + 2, cells: ["x,y", value], valueIndex: 1 })),
    [1],
  );

test.each([
  ["whole numbers", ["1", "20"], "."],
  ["decimal points", ["1.5", "1.234"], "."],
  ["decimal commas", ["1,5", "20"], ","],
  ["decimal commas, one of them before three digits", ["1,5", "1,234"], ","],
  ["a comma after a leading zero", ["0,123"], ","],
  ["a comma after four digits", ["1234,567"], ","],
  ["ranges and limits with commas", ["<0,05", "0,2-0,4"], ","],
  ["points between thousands and a decimal comma", ["1.234,5"], ","],
  ["commas between thousands and a decimal point", ["1,234.5", "12"], "."],
  ["commas between thousands and millions", ["1,234,567"], "."],
  ["commas that can be read both ways", ["1,234", "2,000"], "."],
  ["commas and points mixed", ["1,5", "2.5"], "."],
  ["no values", [], "."],
])("%s: the decimal mark is found", (_, values, expected) => {
  expect(mark(...values)).toBe(expected);
});

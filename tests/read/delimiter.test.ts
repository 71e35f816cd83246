import { expect, test } from "vitest";
import { findDelimiter } from "../../pipeline/read/delimiter.ts";

const WANTED = ["Compound", "T"];
const place = { file: "a.csv" };

test.each([
  ["comma", "Compound,T\na,1", ","],
  ["semicolon with decimal commas", "Compound;T\na;1,5\nb;2,5", ";"],
  ["tab", "Compound\tT\na\t1", "\t"],
  ["vertical bar", "Compound|T\na|1", "|"],
  ["headings in quotes that hold another delimiter", '"Compound","T","S; g/100 g"\na,1,2', ","],
  ["a head that ends inside a quoted cell", 'Compound;T;x\na;1;"begins here', ";"],
  ["a single column", "Compound\na\nb", ","],
])("the headings that the card names show the delimiter: %s", (_, head, expected) => {
  expect(findDelimiter(head, WANTED, place)).toBe(expected);
});

test("where no heading is found the delimiter under which the rows are even is taken", () => {
  expect(findDelimiter("a;b;c\n1,5;2;3\n4,5;5;6", WANTED, place)).toBe(";");
});

test("where two delimiters do equally well the table is refused", () => {
  expect(() => findDelimiter("a;b,c\n1;2,3\n4;5,6", WANTED, place)).toThrow(
    expect.objectContaining({
      problem: expect.objectContaining({
        code: "ambiguous-delimiter",
        found: "the cells may be separated by comma or semicolon",
      }),
    }),
  );
});

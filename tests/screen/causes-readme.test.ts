import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";

const FOLDER = new URL("../../pipeline/screen/causes/", import.meta.url);
const sections = readFileSync(new URL("README.md", FOLDER), "utf8").split(/^## /m).slice(1);
const titles = sections.map((section) => section.slice(0, section.indexOf("\n")));
const schema = JSON.parse(readFileSync(new URL("../../schemas/flags.schema.json", import.meta.url), "utf8")) as unknown;

/** Names of causes as their files give them. */
const named = readdirSync(FOLDER)
  .filter((file) => file.endsWith(".ts"))
  .flatMap((file) => {
    const [, name] = /^ {2}name: "([a-z -]+)",$/m.exec(readFileSync(new URL(file, FOLDER), "utf8")) ?? [];
    return name === undefined ? [] : [{ file, name }];
  });

/** Every text that stands in an `enum` of a schema. */
function enumsOf(node: unknown): string[][] {
  if (typeof node !== "object" || node === null) return [];
  const own = "enum" in node && Array.isArray(node.enum) ? [node.enum.filter((item) => typeof item === "string")] : [];
  return [...own, ...Object.values(node).flatMap(enumsOf)];
}

describe("the README of the causes", () => {
  test("has one section for each cause, with a question and its limits", () => {
    expect(named.length).toBeGreaterThan(15);
    for (const { file, name } of named) {
      const section = sections[titles.indexOf(name)];
      expect(section, `${file} ("${name}") has no section`).toBeDefined();
      expect(section, name).toMatch(/\*[A-Z][^*]+\?\*/);
      expect(section, name).toContain("Limits:");
    }
  });

  test("and the files cover every suspected cause that a flag may carry, and no other", () => {
    const allowed = enumsOf(schema).find((values) => values.includes("power of ten"));
    expect(allowed).toBeDefined();
    const causes = allowed!.filter((cause) => cause !== "");
    expect(titles.toSorted()).toEqual(causes.toSorted());
    expect([...named.map(({ name }) => name), "no simple cause"].toSorted()).toEqual(causes.toSorted());
  });
});

import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { groupIntoSystems, systemKey } from "../../pipeline/group/systems.ts";
import { createMeasurementTable, type MeasurementTable } from "../../pipeline/records/measurements.ts";
import type { Identity } from "../../pipeline/records/systems.ts";

const IDENTITY: Identity = {
  ...{ solute: "copper(II) sulfate", solidForm: "pentahydrate", solvent: "water", composition: "", medium: "" },
  solventComponents: [{ name: "water", massFraction: 1 }],
  ...{ soluteMolarMass: 159.6, solventMolarMass: 18.015, aqueousSalt: true },
};

/** A table whose rows have these identities, in this order. */
function tableOf(identities: readonly number[]): MeasurementTable {
  const table = createMeasurementTable(identities.length);
  for (const identity of identities) table.identity[table.count++] = identity;
  return table;
}

const systemOf = (identity: Partial<Identity>) => groupIntoSystems(tableOf([0]), [{ ...IDENTITY, ...identity }])[0]!;

describe("the id of a system", () => {
  test("is a readable ASCII slug and eight hexadecimal digits of its canonical key", () => {
    // SHA-256 of the key as sha256sum gives it, first eight digits.
    expect(systemKey(IDENTITY)).toBe('["copper(II) sulfate","pentahydrate","water","",""]');
    expect(systemOf({}).id).toBe("copper-ii-sulfate-pentahydrate-in-water-5696e841");
    expect(systemOf({}).family).toBe("copper-ii-sulfate-in-water-5554dd71");
  });

  test("leaves an unspecified form out of the words, not out of the key", () => {
    expect(systemOf({ solidForm: "unspecified" }).id).toMatch(/^copper-ii-sulfate-in-water-[0-9a-f]{8}$/);
    expect(systemOf({ solidForm: "unspecified" }).id).not.toBe(systemOf({ solidForm: "unspecified" }).family);
  });

  test("is a safe file name whatever the solute is called", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), fc.string({ unit: "grapheme" }), (solute, medium) => {
        expect(systemOf({ solute, medium }).id).toMatch(/^[a-z0-9]+(?:-[a-z0-9]+)*$/);
        expect(systemOf({ solute, medium }).id.length).toBeLessThanOrEqual(69);
      }),
    );
  });

  test("does not depend on molar masses, so that a better value renames nothing", () => {
    expect(systemOf({ soluteMolarMass: Number.NaN }).id).toBe(systemOf({}).id);
  });
});

describe("the key of a system", () => {
  const parts = fc.record({
    solute: fc.oneof(fc.string(), fc.constantFrom('a","b', "a,b", "a", "", '"', "\\", "a|b", "a\u0000b")),
    solidForm: fc.oneof(fc.string(), fc.constantFrom("b", 'b"', "", "unspecified")),
    solvent: fc.oneof(fc.string(), fc.constantFrom("c", '","c')),
    composition: fc.string(),
    medium: fc.string(),
  });

  test("differs for any two identities that differ, whatever characters they hold", () => {
    fc.assert(
      fc.property(parts, parts, (a, b) => {
        const [first, second] = [
          { ...IDENTITY, ...a },
          { ...IDENTITY, ...b },
        ];
        const same = (Object.keys(a) as (keyof typeof a)[]).every((part) => a[part] === b[part]);
        expect(systemKey(first) === systemKey(second)).toBe(same);
      }),
      { numRuns: 500 },
    );
  });

  test("can be read back into the parts of its identity", () => {
    fc.assert(
      fc.property(parts, (part) => {
        const { solute, solidForm, solvent, composition, medium } = part;
        const back = JSON.parse(systemKey({ ...IDENTITY, ...part }));
        expect(back).toEqual([solute, solidForm, solvent, composition, medium]);
      }),
    );
  });
});

describe("grouping", () => {
  const identities = ["zinc sulfate", "alum", "borax"].map((solute) => ({ ...IDENTITY, solute }));

  test("gives one system to each identity with measurements, sorted by id, with the rows in their order", () => {
    const systems = groupIntoSystems(tableOf([0, 2, 0, 2, 2]), identities);
    expect(systems.map(({ identity, rows, index }) => [identity.solute, [...rows], index])).toEqual([
      ["borax", [1, 3, 4], 0],
      ["zinc sulfate", [0, 2], 1],
    ]);
  });

  test("puts every row into exactly one system", () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 2 }), { maxLength: 60 }), (order) => {
        const rows = groupIntoSystems(tableOf(order), identities).flatMap((system) => [...system.rows]);
        expect(rows.sort((a, b) => a - b)).toEqual(order.map((_, i) => i));
      }),
    );
  });

  test("makes a family of the forms of one solute in one solvent and medium, and of nothing else", () => {
    const forms = ["unspecified", "pentahydrate", "trihydrate"].map((solidForm) => ({ ...IDENTITY, solidForm }));
    const others = [
      { ...IDENTITY, medium: "0.1 mol/L sulfuric acid" },
      { ...IDENTITY, solvent: "ethanol" },
    ];
    const systems = groupIntoSystems(tableOf([0, 1, 2, 3, 4]), [...forms, ...others]);
    const familyOf = (identity: Identity) => systems.find((system) => system.identity === identity)?.family;
    expect(new Set(forms.map(familyOf)).size).toBe(1);
    expect(new Set([...forms, ...others].map(familyOf)).size).toBe(3);
    expect(new Set(systems.map(({ id }) => id)).size).toBe(5);
  });

  test("fits the mass ratio where no molar mass is known, and the mole fraction otherwise", () => {
    expect(systemOf({}).fitBasis).toBe("ln x");
    expect(systemOf({ soluteMolarMass: Number.NaN }).fitBasis).toBe("ln r");
  });
});

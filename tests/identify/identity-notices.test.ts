import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { resolveIdentity } from "../../pipeline/identify/identity.ts";
import { identityNotices } from "../../pipeline/identify/notices.ts";
import { createIdentityRegister, register } from "../../pipeline/identify/source.ts";
import { programIndex as index } from "../properties/read-tables.ts";

type Cells = Readonly<Record<string, string>>;

/** A register after these rows, in water unless told; remarks of single rows as the source would place them. */
function registered(rows: readonly Cells[]) {
  const all = createIdentityRegister();
  for (const [at, cells] of rows.entries()) {
    const found = resolveIdentity(
      (field) => ({ solvent: "water", ...cells })[field] ?? "",
      index,
      () => undefined,
    );
    if ("code" in found) throw new Error(`${found.code}: ${found.found}`);
    register(all, found);
    for (const remark of found.solute.remarks) all.remarks.push({ ...remark, source: "a", line: at + 2 });
  }
  return all;
}

const notices = (...rows: readonly Cells[]) =>
  identityNotices(registered(rows), index, []).map(({ code, found, mend }) => ({ code, found, mend }));
const codes = (...rows: readonly Cells[]) => notices(...rows).map(({ code }) => code);

describe("A name close to one of the tables", () => {
  test("is asked about and never assumed", () => {
    const [notice, ...rest] = notices({ solute: "Parcetamol" });
    expect(rest).toEqual([]);
    expect(notice).toMatchObject({ code: "unknown-solute", mend: "did you mean paracetamol?" });
    expect(notice?.found).toContain("Parcetamol");
    expect(registered([{ solute: "Parcetamol" }]).identities.map(({ solute }) => solute)).toEqual(["parcetamol"]);
  });

  test("with another stereo prefix is another stereoisomer, not asked about; without a prefix it is", () => {
    expect(codes({ solute: "D-valine" })).toEqual([]);
    expect(notices({ solute: "valine" })[0]?.mend).toContain("L-valine");
    expect(notices({ solute: "L-valin" })[0]?.mend).toContain("L-valine");
  });
});

describe("Keys that may stand for one substance are told and stay apart", () => {
  test("one name with a registry number and without", () => {
    const rows = [{ solute: "HX-7", cas: "629-11-8" }, { solute: "hx 7" }, { cas: "629-11-8" }];
    // 629-11-8, hexane-1,6-diol, is in no table.
    expect(index.byCas("629-11-8")).toBeUndefined();
    expect([...registered(rows).solutes.keys()].sort()).toEqual(["629-11-8", "hx 7"]);
    expect(notices(...rows)).toMatchObject([
      { code: "possibly-the-same", found: '"629-11-8" and "hx 7" share the name "HX-7"' },
    ]);
  });

  test("one registry number with an InChIKey and without", () => {
    const rows = [{ cas: "629-11-8", inchikey: "XXMIOPMDWAUFGU-UHFFFAOYSA-N" }, { cas: "629-11-8" }];
    expect(codes(...rows)).toEqual(["possibly-the-same"]);
  });

  test("names that differ in blanks, hyphens or the prefix of a racemate", () => {
    expect(codes({ solute: "HX-7" }, { solute: "hx 7" })).toEqual(["possibly-the-same"]);
    expect(codes({ solute: "rac-HX" }, { solute: "DL-HX" })).toEqual(["possibly-the-same"]);
    expect(codes({ solute: "(R)-HX" }, { solute: "(S)-HX" })).toEqual([]);
  });

  test("one skeleton with two stereochemistries, listed or not", () => {
    // (R)-ibuprofen and ibuprofen.
    const [notice] = notices({ inchikey: "HEFNNWSXXWATRW-SNVBAGLBSA-N" });
    expect(notice?.code).toBe("stereochemistry-differs");
    expect(notice?.found).toContain('"ibuprofen"');
  });

  test("forms that differ in the kind of numeral", () => {
    const rows = ["form 1", "Form I", "form II"].map((solid_form) => ({ solute: "HX-7", solid_form }));
    expect(registered(rows).identities.length).toBe(3);
    expect(notices(...rows)).toMatchObject([{ code: "possibly-the-same", found: "hx-7 form 1 and hx-7 form I" }]);
  });

  test("an enantiomer by its column and by its name", () => {
    expect(codes({ solute: "ibuprofen", stereo: "S" })).toEqual(["possibly-the-same"]);
  });

  test("nothing is told of substances of the tables under all their names", () => {
    expect(codes({ solute: "paracetamol" }, { cas: "103-90-2" }, { solute: "APAP" }, { solute: "caffeine" })).toEqual(
      [],
    );
  });
});

test("a remark is told once a source, however many rows share it", () => {
  expect(codes({ solute: "cаffeine" }, { solute: "cаffeine", solid_form: "form I" })).toEqual(["look-alike-letters"]);
});

test("which solutes and systems there are does not depend on the order of the rows", () => {
  const rows: Cells[] = [
    ...[{ solute: "HX-7", cas: "629-11-8" }, { cas: "629-11-8" }, { solute: "hx 7" }, { solute: "HX 7" }],
    ...[{ solute: "paracetamol", solid_form: "I" }, { solute: "APAP", solid_form: "polymorph I" }, { solute: "Δ-Foo" }],
    ...[{ solute: "delta-foo" }, { solute: "ibuprofen", stereo: "rac" }, { solute: "DL-Bar" }, { solute: "dl-bar" }],
  ];
  const systems = (order: readonly Cells[]) =>
    registered(order)
      .identities.map(({ solute, solidForm, solvent, medium }) => [solute, solidForm, solvent, medium].join("|"))
      .sort();
  const first = systems(rows);
  fc.assert(
    fc.property(fc.shuffledSubarray(rows, { minLength: rows.length }), (order) => {
      expect(systems(order)).toEqual(first);
    }),
    { numRuns: 30 },
  );
});

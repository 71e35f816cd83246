import { describe, expect, test } from "vitest";
import { readInchikey } from "../../pipeline/properties/inchikey.ts";
import { isRegistryNumber, readRegistryNumber } from "../../pipeline/properties/registry-number.ts";

describe("CAS Registry Numbers are checked by shape and check digit", () => {
  // Registry numbers of water, ethanol, 2-propanol, paracetamol, caffeine, NaCl, sucrose, CuSO4·5H2O, theophylline
  // monohydrate, boric acid, potash alum, N-methyl-2-pyrrolidone.
  test.each(
    "7732-18-5 64-17-5 67-63-0 103-90-2 58-08-2 7647-14-5 57-50-1 7758-99-8 5967-84-0 10043-35-3 7784-24-9 872-50-4".split(
      " ",
    ),
  )("%s is right", (text) => {
    expect(readRegistryNumber(text)).toEqual({ ok: true, cas: text });
  });

  test.each(
    "7732-18-4 64-17-6 67-36-0 103-90-3 58-80-2 5967-84-5 7647-15-4 10043-53-3 7758-98-9 872-05-4 50-00-1".split(" "),
  )("%s has a wrong check digit", (text) => {
    expect(readRegistryNumber(text)).toMatchObject({ ok: false, fault: "check digit" });
  });

  test.each(["57-50-01", "5-17-64", "64--17-5", "64-175", "", "water", "0064-17-5"])("%s has a wrong shape", (text) => {
    expect(readRegistryNumber(text)).toMatchObject({ ok: false, fault: "shape" });
  });

  test.each(["64–17–5", " 64-17-5 ", "CAS 64-17-5", "CAS RN: 64-17-5", "[64-17-5]", "64‑17‑5"])(
    "%s is folded to 64-17-5",
    (text) => {
      expect(readRegistryNumber(text)).toEqual({ ok: true, cas: "64-17-5" });
    },
  );

  test.each([
    ["03/02/7758", "7758-02-3"],
    ["2/3/7758", "7758-02-3"],
    ["7758-02-03", "7758-02-3"],
    ["7758-02-03 00:00:00", "7758-02-3"],
    ["3-Feb-7758", "7758-02-3"],
    ["04/11/7758", "7758-11-4"],
    ["03/04/6132", "6132-04-3"],
  ])("%s is a date that was %s", (text, original) => {
    const read = readRegistryNumber(text);
    expect(read).toMatchObject({ ok: false, fault: "date" });
    if (!read.ok) expect(read.suggestions).toContain(original);
    if (!read.ok) expect(read.suggestions.every(isRegistryNumber)).toBe(true);
  });

  test("the message names the digit that would be right", () => {
    const read = readRegistryNumber("7732-18-4");
    expect(read.ok ? "" : read.message).toContain("should be 5");
  });
});

describe("InChIKeys are checked by shape", () => {
  test.each([
    "LFQSCWFLJHTTHZ-UHFFFAOYSA-N",
    "XLYOFNOQVPJJNP-UHFFFAOYSA-N",
    "FAPWRFPIFSIZLT-UHFFFAOYSA-M",
    "CZMRCDWAGMRECN-UGDNZRGBSA-N",
    "InChIKey=RZVAJINKPMORJF-UHFFFAOYSA-N",
  ])("%s is well-formed", (text) => {
    expect(readInchikey(text)).toMatchObject({ ok: true, standard: true });
  });

  test.each([
    ["LFQSCWFLJHTTHZ-UHFFFAOYSA", "14, 10 and 1"],
    ["LFQSCWFLJHTTH-UHFFFAOYSA-N", "14, 10 and 1"],
    ["LFQSCWFLJHTTHZ-UHFFFAOYS-N", "14, 10 and 1"],
    ["lfqscwfljhtthz-uhfffaoysa-n", "capitals"],
    ["LFQSCWFLJHTTHZ-UHFFFAOYXA-N", "14, 10 and 1"],
    ["LFQSCWFLJHTTHZ-UHFFFAOYSB-N", "14, 10 and 1"],
    ["LFQSCWFLJHTTH0-UHFFFAOYSA-N", "14, 10 and 1"],
    ["InChI=1S/C2H6O/c1-2-3/h3H,2H2,1H3", "not an InChIKey"],
  ])("%s is refused", (text, says) => {
    const read = readInchikey(text);
    expect(read.ok ? "" : read.message).toContain(says);
  });
});

import { describe, expect, test } from "vitest";
import { resolveIdentity } from "../../pipeline/identify/identity.ts";
import { compositionNotices } from "../../pipeline/identify/mixtures/composition-notices.ts";
import { createIdentityRegister, register } from "../../pipeline/identify/source.ts";
import { programIndex } from "../properties/read-tables.ts";

/** Notices of rows of paracetamol with these cells. */
function notices(...rows: readonly Readonly<Record<string, string>>[]): string[] {
  const all = createIdentityRegister();
  for (const cells of rows) {
    const found = resolveIdentity(
      (field) => (field === "solute" ? (cells.solute ?? "paracetamol") : (cells[field] ?? "")),
      programIndex,
      () => undefined,
    );
    if ("code" in found) throw new Error(found.found);
    register(all, found);
  }
  return compositionNotices(all).map(({ code, found }) => `${code}: ${found}`);
}

const of = (ratio: string, more: Readonly<Record<string, string>> = {}) => ({
  solvent: `ethanol/water ${ratio} w/w`,
  ...more,
});

describe("Compositions on two sides of an edge between keys", () => {
  test("that differ by at most 0.0025 are told, once, with both", () => {
    // 70.2 belongs to 70.0, 70.3 to 70.5 % mass.
    const found = notices(of("70.2:29.8"), of("70.3:29.7"), of("70.2:29.8"), of("69.9:30.1"));
    expect(found).toHaveLength(1);
    expect(found[0]).toContain("nearby-compositions: paracetamol: 70.2 wt % ethanol");
    expect(found[0]).toContain("70.3 wt % ethanol");
  });

  test("are told at 0.0025 and no longer at 0.0026", () => {
    expect(notices(of("70.1:29.9"), of("70.35:29.65"))).toHaveLength(1);
    expect(notices(of("70.1:29.9"), of("70.36:29.64"))).toHaveLength(0);
  });

  test("of one key are one system and no notice; whole steps apart they are no neighbours", () => {
    expect(notices(of("70.1:29.9"), of("69.9:30.1"))).toEqual([]);
    expect(notices(of("70:30"), of("70.5:29.5"))).toEqual([]);
  });

  test("are told between a plain solvent with a trace of water and the wet one", () => {
    const found = notices(
      { solvent: "acetone", solvent_water_wt_percent: "0.2" },
      { solvent: "acetone", solvent_water_wt_percent: "0.3" },
    );
    expect(found).toHaveLength(1);
    expect(found[0]).toContain("plain acetone");
  });

  test("of two solutes or two media are nobody's neighbours", () => {
    expect(notices(of("70.2:29.8"), of("70.3:29.7", { solute: "caffeine" }))).toEqual([]);
    expect(notices(of("70.2:29.8"), of("70.3:29.7", { medium: "0.1 M HCl" }))).toEqual([]);
  });

  test("of three components are compared in all of them", () => {
    const three = (ratio: string) => ({ solvent: `acetone/ethanol/water ${ratio} w/w` });
    expect(notices(three("50:30.2:19.8"), three("50:30.3:19.7"))).toHaveLength(1);
    expect(notices(three("50:30.2:19.8"), three("49:30.3:20.7"))).toHaveLength(0);
  });
});

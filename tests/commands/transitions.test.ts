import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { curate } from "../../pipeline/curate.ts";
import { curveRows, curvesJson } from "../../pipeline/publish/tables/curves.ts";
import { gridRows } from "../../pipeline/publish/tables/grid.ts";
import { coolingRows } from "../../pipeline/publish/tables/planning-cooling.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { type Edition, flagId, measurementId } from "../../pipeline/records/edition.ts";
import type { SystemFit } from "../../pipeline/records/fits.ts";
import type { System } from "../../pipeline/records/systems.ts";
import { editionOf } from "./curated.ts";
import { ROOT } from "./saltern.ts";

const ZERO_CELSIUS = 273.15;

function only(edition: Edition, prefix: string): { system: System; fit: SystemFit } {
  const found = edition.systems.filter(
    ({ id, identity }) => id.startsWith(prefix) && identity.solidForm === "unspecified",
  );
  if (found.length !== 1) throw new Error(`${found.length} systems ${prefix}`);
  const system = found[0] as System;
  return { system, fit: edition.fits[system.index] as SystemFit };
}

describe("In the handbook collection", () => {
  let edition: Edition;
  beforeAll(async () => {
    edition = (await curate(await readCollection(join(ROOT, "datasets", "handbook")), "test")).edition;
  });

  test("sodium sulfate in water changes its solid at 32.4 ± 0.5 °C, and the limits hold 32.38 °C", () => {
    // 32.38 °C: decahydrate to anhydrous, a fixed point of thermometry (T. W. Richards and R. C. Wells, 1903).
    const { transition, curves } = only(edition, "sodium-sulfate-in-water").fit;
    const celsius = (transition?.temperatureK ?? 0) - ZERO_CELSIUS;
    expect(Math.abs(celsius - 32.4)).toBeLessThan(0.5);
    expect(transition!.low - ZERO_CELSIUS).toBeLessThan(32.38);
    expect(transition!.high - ZERO_CELSIUS).toBeGreaterThan(32.38);
    // The decahydrate takes up heat, the anhydrous salt gives off a little.
    const [below, above] = curves.map(({ dissolutionEnthalpy }) => dissolutionEnthalpy?.value ?? 0);
    expect(below).toBeGreaterThan(30_000);
    expect(above).toBeLessThan(0);
  });

  test("sodium carbonate in water changes its solid between 30 and 40 °C", () => {
    const { transition } = only(edition, "sodium-carbonate-in-water").fit;
    expect((transition?.temperatureK ?? 0) - ZERO_CELSIUS).toBeGreaterThan(30);
    expect((transition?.temperatureK ?? 0) - ZERO_CELSIUS).toBeLessThan(40);
  });

  test("no value of these two salts is flagged as off the curve", () => {
    for (const prefix of ["sodium-sulfate-in-water", "sodium-carbonate-in-water"]) {
      const { system } = only(edition, prefix);
      const flags = edition.flags.filter((flag) => flag.system === system.index);
      expect(flags.filter(({ code }) => code.includes("off-curve"))).toEqual([]);
    }
  });

  test("calcium hydroxide and cerium(III) sulfate fall with temperature, which is no break and no mistake", () => {
    for (const prefix of ["calcium-hydroxide-in-water", "cerium-iii-sulfate-in-water"]) {
      const { system, fit } = only(edition, prefix);
      const [curve] = fit.curves;
      const [low, high] = curve!.temperatureRangeK;
      expect(curve!.evaluate(high)).toBeLessThan(curve!.evaluate(low));
      expect([fit.transition, fit.kink]).toEqual([undefined, undefined]);
      const flagged = edition.flags.flatMap((flag) => (flag.system === system.index ? [flagId(edition, flag)] : []));
      // 17.0 g at 10 °C lies above its neighbours 21.4 and 10.1 g, whichever way the curve runs.
      expect(flagged).toEqual(prefix.startsWith("cerium") ? ["off-curve@teaching-table-a:91"] : []);
    }
  });

  test("every published transition has p below 0.01, three temperatures a side and a slope that falls", () => {
    const broken = edition.fits.filter(({ transition }) => transition !== undefined);
    expect(broken.length).toBeGreaterThan(5);
    for (const { transition, curves, robust } of broken) {
      expect(transition!.probability).toBeLessThan(0.01);
      expect(curves.map(({ branch }) => branch)).toEqual([1, 2]);
      const [below, above] = curves as [(typeof curves)[0], (typeof curves)[0]];
      const T = transition!.temperatureK;
      expect(below.evaluate(T) - below.evaluate(T - 1)).toBeGreaterThan(above.evaluate(T + 1) - above.evaluate(T));
      const sides = [new Set<number>(), new Set<number>()];
      robust.points.temperatureK.forEach((t, i) => {
        if (robust.kept[i] === 1) sides[t < T ? 0 : 1]!.add(Math.round(t));
      });
      for (const side of sides) expect(side.size).toBeGreaterThanOrEqual(3);
    }
  });

  test("rows carry the branch they lie on, and each branch lists its own measurements", () => {
    const { system, fit } = only(edition, "sodium-sulfate-in-water");
    const T = fit.transition!.temperatureK;
    for (const row of system.rows)
      expect(edition.rowResults.branch[row]).toBe((edition.table.temperatureK[row] as number) < T ? 1 : 2);
    const { curves } = JSON.parse([...curvesJson(edition)].join("")) as {
      curves: { system: string; branch: number; measurement_ids: string[]; transition?: { temperature_K: number } }[];
    };
    const own = curves.filter((curve) => curve.system === system.id);
    expect(own.map(({ transition }) => transition?.temperature_K)).toEqual([T, undefined]);
    const kept = Array.from(system.rows).filter((row) => edition.rowResults.weight[row] === 1);
    expect(own.flatMap(({ measurement_ids }) => measurement_ids).sort()).toEqual(
      kept.map((row) => measurementId(edition, row)).sort(),
    );
  });

  test("curves.csv gives the transition with its limits at the warm end of the first branch", () => {
    const { system, fit } = only(edition, "sodium-sulfate-in-water");
    const rows = [...curveRows(edition)].filter((row) => row.system === system.id);
    const { temperatureK, low, high, probability } = fit.transition!;
    expect(rows.map((row) => [row.branch, row.transition_K, row.transition_low_K, row.transition_high_K])).toEqual([
      [1, temperatureK, low, high],
      [2, undefined, undefined, undefined],
    ]);
    expect(rows[0]).toMatchObject({ T_max_K: temperatureK, transition_probability: probability });
    expect(rows[1]).toMatchObject({ T_min_K: temperatureK });
  });

  test("grid.csv runs along both branches without a gap at the transition", () => {
    const { system } = only(edition, "sodium-sulfate-in-water");
    const temperatures = [...gridRows(edition)].filter(([, id]) => id === system.id).map(([, , T]) => Number(T));
    for (const celsius of [5, 20, 30, 35, 50, 90])
      expect(temperatures.some((T) => Math.abs(T - ZERO_CELSIUS - celsius) < 1e-9)).toBe(true);
    expect(temperatures).toEqual([...new Set(temperatures)].sort((a, b) => a - b));
  });

  test("a plan of sodium sulfate dissolves 5 K above its transition, where most dissolves, and gives the decahydrate", () => {
    const { system, fit } = only(edition, "sodium-sulfate-in-water");
    const [first, second] = [...coolingRows(edition)].filter((row) => row.system === system.id);
    // The listed transition, 32.38 °C, and the fitted one are both kept clear of.
    const highest = Math.max(fit.transition!.temperatureK, 305.53);
    expect(first).toMatchObject({ crystal_form: "decahydrate", T_hot_K: highest + 5, T_cold_K: 278.15 });
    expect(first!.max_recovery_equilibrium_percent).toBeGreaterThan(90);
    // The anhydrous salt of the warm branch dissolves less on heating.
    expect(second!.blank_reason).toMatch(/does not rise on heating/);
  });

  test("a cooling plan across a transition dissolves on the warm branch and crystallises the form of the cold one", () => {
    const { system, fit } = only(edition, "nickel-ii-sulfate-in-water");
    const [first] = [...coolingRows(edition)].filter((row) => row.system === system.id);
    expect(first!.crystal_form).toBe("heptahydrate");
    expect(first!.T_cold_K).toBeLessThan(fit.transition!.temperatureK - 5);
    expect(first!.T_hot_K).toBeGreaterThan(fit.transition!.temperatureK + 5);
    const S = (curve: number, T: number) => fit.curves[curve]!.evaluate(T);
    const massRatio = (lnX: number) => {
      const x = Math.exp(lnX);
      return (x * system.identity.soluteMolarMass) / ((1 - x) * system.identity.solventMolarMass);
    };
    expect(first!.hot_g_per_100g_solvent).toBeCloseTo(100 * massRatio(S(1, first!.T_hot_K!)), 9);
    expect(first!.cold_g_per_100g_solvent).toBeCloseTo(100 * massRatio(S(0, first!.T_cold_K!)), 9);
  });
});

describe("Sodium sulfate in water, mass percent by CRC Handbook of Chemistry and Physics, 98th ed. (2017),", () => {
  const celsius = [20, 25, 30, 40, 50, 60, 70, 80, 90, 100];
  const massPercent = [16.13, 21.94, 29.22, 32.35, 31.55, 30.9, 30.39, 30.02, 29.79, 29.67];
  const card = (constants: object) =>
    JSON.stringify({
      ...{ format: 1, source: "salt", origin: "handbook", file: "salt.csv" },
      columns: { temperature: { column: "T", unit: "°C" }, solubility: { column: "S", unit: "g/100 g solution" } },
      constants: { solute: "sodium sulfate", solvent: "water", solute_basis: "anhydrous", ...constants },
    });
  const files = (constants: object) => ({
    "sources/salt.csv": `T,S\n${celsius.map((t, i) => `${t},${massPercent[i]}\n`).join("")}`,
    "sources/salt.source.json": card(constants),
  });

  test("has its transition at 32.4 ± 0.5 °C", async () => {
    const { transition } = (await editionOf(files({}))).fits[0] as SystemFit;
    expect(Math.abs(transition!.temperatureK - ZERO_CELSIUS - 32.4)).toBeLessThan(0.5);
  });

  test("has two branches where the solid is not specified, and one curve where a form is named", async () => {
    const open = await editionOf(files({}));
    expect(open.fits.map(({ curves }) => curves.length)).toEqual([2]);
    const named = await editionOf(files({ solid_form: "anhydrous" }));
    expect(named.fits.map(({ curves, transition }) => [curves.length, transition])).toEqual([[1, undefined]]);
  });

  test("gives the same transition to the last digit every time", async () => {
    const [one, other] = [await editionOf(files({})), await editionOf(files({}))];
    expect(one.fits[0]?.transition).toEqual(other.fits[0]?.transition);
  });
});

/**
 * Surfaces over composition, by simulation: `npx tsx tests/benchmarks/mixture-coverage.ts [runs] [seed]`.
 *
 * The truth is a Jouyban-Acree-van 't Hoff surface with four terms J, a heat-capacity term for each solvent and a wave of
 * 2 % over composition, none of which the published equation has in full; one or two sources that share the compositions
 * lie 3.5 % (standard deviation) off it and scatter by 2 %, at six temperatures from 5 to 55 °C. Counted are how often
 * the truth lies inside the 95 % limits, at random places and midway between compositions; how often a sound composition
 * would be told off by the others (|z| above 3); and, with one composition between the ends off by a factor 1.5, how often
 * that one alone is left out, none is, or another.
 */
import { seededRandom } from "../../pipeline/numerics/random.ts";
import type { MixtureModel } from "../../pipeline/records/mixtures.ts";
import { fitsOf, type MixtureReading, mixtureWorld, readingsOn } from "../fit/mixture-support.ts";

const COMPOSITIONS = [3, 4, 5, 6, 7, 9, 11] as const;
const TEMPERATURES = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
const PLACES = 12;

const [runs = 150, seed = 11] = process.argv.slice(2).map(Number);
const { uniform, normal } = seededRandom(seed);

type Surface = (w: number, T: number) => number;

function drawTruth(): Surface {
  const [A1, B1, A2, B2] = [3 + normal(), -2200 + 300 * normal(), 1 + 2 * normal(), -2900 + 400 * normal()];
  const J = [3 + 3 * normal(), 2 * normal(), normal(), 0.7 * normal()];
  const [c1, c2] = [6 * Math.abs(normal()), 6 * normal() + 9 * uniform()];
  const phase = 6 * uniform();
  return (w, T) => {
    const d = 2 * w - 1;
    const u = 298.15 / T - 1;
    const excess = J.reduce((sum, j, i) => sum + j * d ** i, 0);
    const curvature = (w * c1 + (1 - w) * c2) * (u - Math.log1p(u));
    const pure = w * (A1 + B1 / T) + (1 - w) * (A2 + B2 / T);
    const ln = pure + w * (1 - w) * (1 + u) * excess + curvature + 0.02 * Math.sin(phase + 9 * w);
    return Math.min(-1, ln);
  };
}

function measured(truth: Surface, fractions: readonly number[]): MixtureReading[] {
  const sources = uniform() < 0.5 ? 1 : 2;
  const offsets = [0.035 * normal(), 0.035 * normal()];
  return readingsOn(fractions, TEMPERATURES, truth).map((one) => {
    const source = sources === 1 ? 0 : fractions.indexOf(one.fraction) % 2;
    return { ...one, source, lnValue: one.lnValue + (offsets[source] ?? 0) + 0.02 * normal() };
  });
}

/** Left-out ends take their compositions and temperatures with them. */
function covers({ temperaturesAt }: MixtureModel, w: number, T: number): boolean {
  const limits = temperaturesAt(w);
  return limits !== undefined && T >= limits[0] && T <= limits[1];
}

console.log("| compositions | inside | midway | half-width, % | \\|z\\| above 3 | one off: found | none | another |");
console.log("| --- | --- | --- | --- | --- | --- | --- | --- |");
for (const count of COMPOSITIONS) {
  const fractions = Array.from({ length: count }, (_, i) => i / (count - 1));
  const tally = {
    inside: 0,
    places: 0,
    midway: 0,
    middles: 0,
    width: 0,
    told: 0,
    judged: 0,
    found: 0,
    none: 0,
    other: 0,
  };
  for (let run = 0; run < runs; run++) {
    const truth = drawTruth();
    const readings = measured(truth, fractions);
    const [model] = fitsOf(mixtureWorld(readings)).models;
    if (model === undefined) continue;
    for (let k = 0; k < PLACES; k++) {
      const [w, T] = [uniform(), 280 + 46 * uniform()];
      if (!covers(model, w, T)) continue;
      const half = model.limits(w, T).curve;
      tally.places++;
      tally.width += half;
      if (Math.abs(model.evaluate(w, T) - truth(w, T)) <= half) tally.inside++;
    }
    fractions.slice(1).forEach((w) => {
      const middle = w - 0.5 / (count - 1);
      if (!covers(model, middle, 303)) return;
      tally.middles++;
      if (Math.abs(model.evaluate(middle, 303) - truth(middle, 303)) <= model.limits(middle, 303).curve) tally.midway++;
    });
    for (const { leftOut } of model.members) {
      if (leftOut === undefined) continue;
      tally.judged++;
      if (Math.abs(leftOut.meanDeviation) > 3 * leftOut.meanSd) tally.told++;
    }
    const off = fractions[1 + Math.floor((count - 2) * uniform())] as number;
    const moved = readings.map((one) =>
      one.fraction === off ? { ...one, lnValue: one.lnValue + Math.log(1.5) } : one,
    );
    const out = fitsOf(mixtureWorld(moved)).models[0]?.members.filter(({ nUsed }) => nUsed === 0) ?? [];
    if (out.length === 0) tally.none++;
    else if (out.length === 1 && Math.abs((out[0]?.fraction ?? 0) - off) < 1e-6) tally.found++;
    else tally.other++;
  }
  const percent = (part: number, whole: number) => ((100 * part) / whole).toFixed(1);
  const { inside, places, midway, middles, width, told, judged, found, none, other } = tally;
  console.log(
    `| ${count} | ${percent(inside, places)} | ${percent(midway, middles)} | ${percent(width, places)} | ${told} of ${judged} | ${found} | ${none} | ${other} |`,
  );
}

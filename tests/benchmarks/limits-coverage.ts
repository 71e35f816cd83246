/**
 * Coverage of the 95 % limits, by simulation: `npx tsx tests/benchmarks/limits-coverage.ts [editions] [seed]`.
 *
 * Every edition holds ten systems of each kind: 6, 10, 20 or 40 points by 1 to 4 of its twelve sources. The truth is a
 * van 't Hoff line with a heat-capacity term in two of three systems; sources scatter by 1 to 3 % and lie 2.5 to 4 %
 * (standard deviation) off the truth; every third block has besides a stated uncertainty of 1 to 3 % that its points share
 * (a density, a molar mass), drawn once for the block; one point in 25 is off by a blunder. The program sees none of this: it estimates
 * the scales from the edition, decides which points stay, chooses the model and gives limits. Counted is how often the
 * true curve, and a measurement by a source not yet seen, lie inside them, at eleven temperatures of the fitted range.
 */
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { isCurve, publishedCurve } from "../../pipeline/fit/published-curve.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import type { PooledScales, RobustFit } from "../../pipeline/records/fits.ts";
import type { SystemPoints } from "../../pipeline/records/systems.ts";
import { plainSystem } from "../fit/plain-system.ts";

const POINTS = [6, 10, 20, 40] as const;
const SOURCES = [1, 2, 3, 4] as const;
const SYSTEMS_PER_KIND = 10;
const SOURCES_PER_EDITION = 12;
const PLACES = 11;
const BLUNDER_PROBABILITY = 0.04;
/** Stated repeatability of every point, standard uncertainty of ln value. */
const STATED_U = 0.02;

/** What the simulation knows and the program does not. */
interface Truth {
  readonly lnValue: (temperatureK: number) => number;
  readonly kind: number;
}

interface Kind {
  systems: number;
  withoutCurve: number;
  readonly models: Map<string, number>;
  readonly curve: Int32Array;
  readonly newMeasurement: Int32Array;
  halfWidth: number;
}

const editions = Number(process.argv[2] ?? 500);
const generator = xoroshiro128plus(Number(process.argv[3] ?? 20260314));
const uniform = (low = 0, high = 1): number => low + (high - low) * uniformFloat64(generator);
const gaussian = (): number => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());

const kinds: Kind[] = POINTS.flatMap(() => SOURCES).map(() => ({
  ...{ systems: 0, withoutCurve: 0, models: new Map(), halfWidth: 0 },
  ...{ curve: new Int32Array(PLACES), newMeasurement: new Int32Array(PLACES) },
}));

for (let edition = 0; edition < editions; edition++) countEdition();
printTable();

function countEdition(): void {
  const between = uniform(0.025, 0.04);
  const noise = Float64Array.from({ length: SOURCES_PER_EDITION }, () => uniform(0.01, 0.03));
  const truths: Truth[] = [];
  const points: SystemPoints[] = [];
  for (let kind = 0; kind < kinds.length; kind++)
    for (let i = 0; i < SYSTEMS_PER_KIND; i++) {
      const truth = drawTruth(kind);
      truths.push(truth);
      points.push(drawPoints(truth, noise, between));
    }
  const { fits, scales } = robustFits(
    points,
    points.map(() => ({ aqueousSalt: false })),
    SOURCES_PER_EDITION,
  );
  fits.forEach((fit, s) => {
    countSystem(fit, scales, truths[s] as Truth, between);
  });
}

function drawTruth(kind: number): Truth {
  const centreK = 305;
  const a = uniform(-7, -2);
  const b = -uniform(5, 16);
  const c = uniform() < 1 / 3 ? 0 : 6 * gaussian();
  return {
    kind,
    lnValue: (T) => {
      const u = centreK / T - 1;
      return a + b * u + c * (u - Math.log1p(u));
    },
  };
}

/** Each source covers a window of its own of 278 to 333 K; a single one covers all of it. */
function drawPoints(truth: Truth, noise: Float64Array, between: number): SystemPoints {
  const n = POINTS[Math.floor(truth.kind / SOURCES.length)] as number;
  const k = SOURCES[truth.kind % SOURCES.length] as number;
  const sources = drawSources(k);
  const [temperatureK, lnValue, source] = [new Float64Array(n), new Float64Array(n), new Int32Array(n)];
  const sharedLnU = new Float64Array(n);
  let at = 0;
  for (let b = 0; b < k; b++) {
    const count = Math.floor(n / k) + (b < n % k ? 1 : 0);
    const width = k === 1 ? 55 : uniform(30, 55);
    const low = k === 1 ? 278.15 : uniform(278.15, 333.15 - width);
    const shared = sharedUncertainty();
    const offset = between * gaussian() + shared * gaussian();
    const s = sources[b] as number;
    for (let i = 0; i < count; i++, at++) {
      const T = low + (count === 1 ? uniform(0, width) : (width * i) / (count - 1)) + uniform(-0.5, 0.5);
      const blunder = uniform() < BLUNDER_PROBABILITY ? (uniform() < 0.5 ? -1 : 1) * uniform(0.15, 0.8) : 0;
      temperatureK[at] = T;
      lnValue[at] = truth.lnValue(T) + offset + (noise[s] as number) * gaussian() + blunder;
      source[at] = s;
      sharedLnU[at] = shared;
    }
  }
  return {
    ...{ n, temperatureK, lnValue, source, row: Int32Array.from({ length: n }, (_, i) => i) },
    temperatureU: new Float64Array(n).fill(0.1),
    lnU: sharedLnU.map((shared) => Math.hypot(STATED_U, shared)),
    sharedLnU,
    level: new Float64Array(n).fill(50),
  };
}

/** Standard uncertainty of ln value that the points of a block share. */
function sharedUncertainty(): number {
  return uniform() < 1 / 3 ? uniform(0.01, 0.03) : 0;
}

function drawSources(count: number): number[] {
  const left = Array.from({ length: SOURCES_PER_EDITION }, (_, s) => s);
  return Array.from({ length: count }, () => left.splice(Math.floor(uniform(0, left.length)), 1)[0] as number);
}

function countSystem(fit: RobustFit, scales: PooledScales, truth: Truth, between: number): void {
  const kind = kinds[truth.kind] as Kind;
  kind.systems++;
  const curve = publishedCurve(
    fit,
    { system: plainSystem(fit.system), branch: 1, meltingPointK: Number.NaN },
    { scales, laboratories: [], weighting: "relative" },
  );
  if (!isCurve(curve)) {
    kind.withoutCurve++;
    return;
  }
  kind.models.set(curve.model, (kind.models.get(curve.model) ?? 0) + 1);
  const [low, high] = curve.temperatureRangeK;
  for (let place = 0; place < PLACES; place++) {
    const T = Math.min(high, low + ((high - low) * place) / (PLACES - 1));
    const limits = curve.limits(T);
    const error = truth.lnValue(T) - curve.evaluate(T);
    const measured = error + between * gaussian() + sharedUncertainty() * gaussian() + uniform(0.01, 0.03) * gaussian();
    if (Math.abs(error) <= limits.curve) kind.curve[place]!++;
    if (Math.abs(measured) <= limits.newMeasurement) kind.newMeasurement[place]!++;
    kind.halfWidth += limits.curve / PLACES;
  }
}

function printTable(): void {
  console.log("coverage of the 95 % limits, percent (mean over temperature / lowest of 11 temperatures)");
  console.log("points sources  systems no curve   curve         new measurement   half-width %   models chosen");
  let [curveSum, newSum] = [0, 0];
  let missed = 0;
  kinds.forEach((kind, i) => {
    const counted = kind.systems - kind.withoutCurve;
    const share = (hits: Int32Array) => {
      const percents = Array.from(hits, (hit) => (100 * hit) / counted);
      const mean = percents.reduce((sum, p) => sum + p, 0) / PLACES;
      const lowest = Math.min(...percents);
      if (mean < 93 || mean > 97 || lowest < 91) missed++;
      return { mean, text: `${mean.toFixed(2)} / ${lowest.toFixed(2)}` };
    };
    const [ofCurve, ofNew] = [share(kind.curve), share(kind.newMeasurement)];
    curveSum += ofCurve.mean / kinds.length;
    newSum += ofNew.mean / kinds.length;
    const models = Array.from(
      kind.models,
      ([name, count]) => `${name} ${((100 * count) / counted).toFixed(0)} %`,
    ).sort();
    const cells = [
      String(POINTS[Math.floor(i / SOURCES.length)]).padStart(6),
      String(SOURCES[i % SOURCES.length]).padStart(7),
      String(kind.systems).padStart(8),
      String(kind.withoutCurve).padStart(8),
      `  ${ofCurve.text}`,
      `  ${ofNew.text}  `,
      ((100 * kind.halfWidth) / counted).toFixed(2).padStart(8),
      `      ${models.join(", ")}`,
    ];
    console.log(cells.join(" "));
  });
  console.log(
    missed === 0
      ? "every mean lies in 93 to 97, no lowest below 91"
      : `${missed} of ${2 * kinds.length} coverages miss 93 to 97 in the mean or 91 at the lowest`,
  );
  if (missed > 0) process.exitCode = 1;
  console.log(`mean of all kinds: curve ${curveSum.toFixed(2)}, new measurement ${newSum.toFixed(2)}`);
}

/**
 * Time of the whole fit of one system on one core: `npx tsx tests/benchmarks/fit-speed.ts`.
 *
 * The robust screening of an edition (three passes, scales included) and the published curve with its models, choice
 * and limits at ten temperatures are timed apart, over invented systems of 20 points by two sources. CPU time, best of thirty rounds.
 */
import { spawnSync } from "node:child_process";
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { isCurve, publishedCurve } from "../../pipeline/fit/published-curve.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import { sourceStandings } from "../../pipeline/fit/sources/source-standing.ts";
import type { SystemPoints } from "../../pipeline/records/systems.ts";
import { plainPoints, plainSystem } from "../fit/plain-system.ts";

const SYSTEMS = 500;
const POINTS = 20;
const ROUNDS = 30;
const BUDGET_MS = 0.12;

const generator = xoroshiro128plus(7);
const uniform = (low: number, high: number): number => low + (high - low) * uniformFloat64(generator);

function inventedPoints(): SystemPoints {
  const slope = uniform(1500, 5000);
  const T = Array.from({ length: POINTS }, (_, i) => 278.15 + (55 * Math.floor(i / 2)) / (POINTS / 2 - 1));
  const lnX = T.map((t) => -3 - slope * (1 / t - 1 / 305) + uniform(-0.03, 0.03));
  return plainPoints(
    T,
    lnX,
    T.map((_, i) => i % 2),
  );
}

/** Best CPU time of several rounds, milliseconds a system; other programs on the machine do not count. */
function timed(round: () => void): number {
  let best = Number.POSITIVE_INFINITY;
  for (let i = 0; i < ROUNDS; i++) {
    const before = process.cpuUsage();
    round();
    const { user, system } = process.cpuUsage(before);
    best = Math.min(best, (user + system) / 1000 / SYSTEMS);
  }
  return best;
}

const points = Array.from({ length: SYSTEMS }, inventedPoints);
const perSystem = points.map(() => ({ aqueousSalt: false }));
const { fits, scales } = robustFits(points, perSystem, 2);
const context = { scales, laboratories: ["north", "south"], weighting: "relative" } as const;

const fitAll = (meltingPointK: number) => () => {
  for (const fit of fits) publishedCurve(fit, { system: plainSystem(fit.system), branch: 1, meltingPointK }, context);
};
const screening = timed(() => {
  robustFits(points, perSystem, 2);
});
const curve = timed(fitAll(Number.NaN));
const withLambdaH = timed(fitAll(440));
const curves = fits.map((fit) =>
  publishedCurve(fit, { system: plainSystem(fit.system), branch: 1, meltingPointK: Number.NaN }, context),
);
const limits = timed(() => {
  for (const outcome of curves) if (isCurve(outcome)) for (let T = 280; T < 330; T += 5) outcome.limits(T);
});

const standings = timed(() => {
  for (const [s, robust] of fits.entries()) {
    const outcome = curves[s];
    const subject = { system: plainSystem(robust.system), meltingPointK: Number.NaN };
    sourceStandings(robust, outcome !== undefined && isCurve(outcome) ? [outcome] : [], subject, context);
  }
});

const total = screening + curve;
console.log(`fit of a system of ${POINTS} points, CPU milliseconds (Node ${process.version}, ${SYSTEMS} systems)`);
console.log(`  robust screening, three passes            ${screening.toFixed(4)}`);
console.log(`  published curve, choice of three models   ${curve.toFixed(4)}`);
console.log(`  the same with lambda-h besides            ${withLambdaH.toFixed(4)}`);
console.log(`  limits at ten temperatures                ${limits.toFixed(4)}`);
console.log(`  how two sources stand (asked for only)    ${standings.toFixed(4)}`);
console.log(`  screening and curve                       ${total.toFixed(4)}  (budget ${BUDGET_MS})`);
printPeer("Python, numpy.linalg.lstsq of three models", "python3", ["-c", pythonProgram()]);
printPeer("R, lm() of three models", "Rscript", ["-e", rProgram()]);

/** The same three least-squares fits alone in another environment, where it is installed. */
function printPeer(title: string, command: string, args: readonly string[]): void {
  const { status, stdout } = spawnSync(command, args, { encoding: "utf8" });
  console.log(`  ${title.padEnd(41)} ${status === 0 ? Number(stdout).toFixed(4) : "not installed here"}`);
}

function pythonProgram(): string {
  return `
import time, numpy as np
T = np.repeat(np.linspace(278.15, 333.15, 10), 2); u = 305 / T - 1
y = -3 - 3000 * (1 / T - 1 / 305) + 0.01 * np.sin(37 * np.arange(20))
one = np.ones(20)
designs = [np.column_stack(c) for c in ([one, u], [one, u, u - np.log1p(u)], [one, u, u * u])]
best = 1e9
for _ in range(5):
    start = time.perf_counter()
    for _ in range(500):
        for X in designs: np.linalg.lstsq(X, y, rcond=None)
    best = min(best, (time.perf_counter() - start) / 500 * 1000)
print(best)`;
}

function rProgram(): string {
  return `T <- rep(seq(278.15, 333.15, length.out = 10), 2); u <- 305 / T - 1
y <- -3 - 3000 * (1 / T - 1 / 305) + 0.01 * sin(37 * seq_along(T))
t <- system.time(for (i in 1:500) { lm(y ~ u); lm(y ~ u + I(u - log1p(u))); lm(y ~ u + I(u^2)) })
cat(t[["elapsed"]] / 500 * 1000)`;
}

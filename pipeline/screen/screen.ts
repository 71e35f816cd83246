import type { Flag, RobustFit } from "../records/fits.ts";
import { blockFlags } from "./block-flags.ts";
import { type OffBlock, screenBlocks } from "./block-screen.ts";
import { calculatedFlags } from "./causes/calculated-value-copied.ts";
import { createSuspectFinder } from "./causes/suspects.ts";
import { conflictFlags } from "./conflicts.ts";
import { familyFlags } from "./families.ts";
import { intervalFlags } from "./intervals.ts";
import { isOutsideLiquid, liquidRangeFlags } from "./liquid-range.ts";
import { judgeByMixtures } from "./mixture-screen.ts";
import { patternBlocks } from "./pattern-blocks.ts";
import { plausibilityFlags } from "./plausibility/plausibility.ts";
import { pointFlags, type SuspectFinder } from "./point-flags.ts";
import { type OffPoint, screenPoints } from "./point-screen.ts";
import { withoutTransitions } from "./possible-transitions.ts";
import { redundantColumnFlags } from "./redundant-columns.ts";
import { repeatFlags } from "./repeats.ts";
import { type ScreenInput, thresholdOf } from "./screen-input.ts";
import { createSystemModel, type SystemModel } from "./system-model.ts";
import { counted } from "./wording.ts";

/**
 * Everything that is off in an edition, with what was seen and what probably happened: first whole blocks, then points
 * of the other blocks, then systems without a majority; repeats and temperatures outside the liquid range as notices.
 * Pure and deterministic; blind to rulings.
 *
 * @returns flags, at most one of a code for each target
 */
export function screen(input: ScreenInput): Flag[] {
  const capacity = input.fits.reduce((most, { points }) => Math.max(most, points.n), 1);
  const models: readonly [SystemModel, SystemModel] = [createSystemModel(capacity), createSystemModel(capacity)];
  const suspectsOf = createSuspectFinder(input);
  const blocksOf = (blocks: readonly OffBlock[]) => new Set(blocks.map(({ system, source }) => `${system}:${source}`));
  const single = screenBlocks(input, models, suspectsOf);
  const throughout = patternBlocks(input, models, suspectsOf, blocksOf(single));
  const offBlocks = [...single, ...throughout.blocks];
  const offPoints = screenPoints(input, blocksOf(offBlocks));
  const { blocks, points, flags: transitions } = withoutTransitions(input, models[0], offBlocks, offPoints);
  const blocked = blocksOf(blocks);
  const mixtures = judgeByMixtures(input, new Set(blocks.map(({ system }) => system)));
  return [
    ...conflictFlags(input, models, suspectsOf),
    ...throughout.flags,
    ...transitions,
    ...blockFlags(input, blocks),
    ...pointFlags(input, models, points, suspectsOf),
    ...misreadTemperatures(input, models, points, blocked, suspectsOf),
    ...mixtures.flags,
    ...cannotTellFlags(input, new Set([...points.map(({ system }) => system), ...mixtures.judged])),
    ...repeatFlags(input),
    ...calculatedFlags(input),
    ...liquidRangeFlags(input),
    ...plausibilityFlags(input, blocked, points),
    ...intervalFlags(input),
    ...familyFlags(input),
    ...redundantColumnFlags(input),
  ];
}

/**
 * Points outside the liquid range take no part in a fit, and so far off the curve says little; but where the temperature
 * on another scale puts them on it, the scale is what is wrong.
 *
 * @param told points that are flagged already
 * @param blocked `SYSTEM:SOURCE` of the blocks that are off as a whole
 */
function misreadTemperatures(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  told: readonly OffPoint[],
  blocked: ReadonlySet<string>,
  suspectsOf: SuspectFinder,
): Flag[] {
  const known = new Set(told.map(({ system, point }) => `${system}:${point}`));
  const outside: OffPoint[] = [];
  for (const { system, points, deviation, deviationSd } of input.fits) {
    for (let point = 0; point < points.n; point++) {
      if (!isOutsideLiquid(input, system, point)) continue;
      if (known.has(`${system}:${point}`) || blocked.has(`${system}:${points.source[point]}`)) continue;
      const threshold = thresholdOf(input, system, point);
      if (!(Math.abs(deviation[point]!) > threshold)) continue;
      const z = deviation[point]! / deviationSd[point]!;
      outside.push({ system, point, z, threshold, impossible: false, unsure: false });
    }
  }
  return pointFlags(input, models, outside, suspectsOf).filter((flag) => flag.suspectedCause === "temperature unit");
}

/** Deviations that look off in a system too small to say so: one notice a system, none where all looks well. */
function cannotTellFlags(input: ScreenInput, told: ReadonlySet<number>): Flag[] {
  return input.fits.flatMap((fit): Flag[] => {
    if (fit.agreement !== "cannot tell" || told.has(fit.system)) return [];
    const doubtful = doubtfulPoints(input, fit);
    if (doubtful === 0) return [];
    return [
      {
        scope: "system",
        code: "cannot-tell",
        severity: "notice",
        system: fit.system,
        evidence:
          `${counted(doubtful, "point")} of ${fit.points.n} looks off by more than the material threshold, but too few ` +
          "points are left to say which is wrong",
        lookAt: "Look at the values again; more temperatures or another source would decide.",
      },
    ];
  });
}

/** z from which a point of a small system is worth a notice. */
const DOUBTFUL_Z = 4;

function doubtfulPoints(input: ScreenInput, { system, points, deviation, deviationSd }: RobustFit): number {
  let count = 0;
  for (let i = 0; i < points.n; i++) {
    const off = Math.abs(deviation[i]!);
    if (off > DOUBTFUL_Z * deviationSd[i]! && off > thresholdOf(input, system, i)) count++;
  }
  return count;
}

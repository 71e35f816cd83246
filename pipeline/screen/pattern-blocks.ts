import type { Flag, RobustFit } from "../records/fits.ts";
import { type OffBlock, readBlock } from "./block-screen.ts";
import type { Suspects } from "./causes/cause.ts";
import { temperatureOffset } from "./causes/temperature-offset.ts";
import { middle } from "./middle.ts";
import { type ScreenInput, sourceName, thresholdOf } from "./screen-input.ts";
import { besideOthers, SHAPES, type SourcePattern, sourcePattern } from "./source-patterns.ts";
import { ownPosterior } from "./source-wide.ts";
import type { SystemModel } from "./system-model.ts";
import { counted, offBy, threeDigits } from "./wording.ts";

/** Other sound sources that a block needs to be judged. */
const LEAST_OTHERS = 2;
/** Part of the deviation by the pattern that the block's own values must show. */
const SHOWN = 0.5;

/** Blocks that are off by what is wrong with all that their source measured, and one flag for each such source. */
export interface PatternBlocks {
  readonly blocks: readonly OffBlock[];
  readonly flags: readonly Flag[];
}

/**
 * Where one pattern runs through all that a source measured, every block of it that the pattern moves by more than its
 * material threshold somewhere, and whose own values show it, is off, however little it stands out by itself: the scales
 * it would be judged by are widened by the pattern, so that its scatter about the pattern takes their place.
 *
 * @param told blocks that are found already, `SYSTEM:SOURCE`
 */
export function patternBlocks(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
  told: ReadonlySet<string>,
): PatternBlocks {
  const blocks: OffBlock[] = [];
  const flags: Flag[] = [];
  for (const source of input.sourceNames.keys()) {
    const pattern = sourcePattern(input, models[0], source);
    if (pattern === undefined) continue;
    const moved = input.fits.flatMap((fit) => {
      const points = movedPoints(input, models[0], fit, pattern);
      return points === undefined ? [] : [{ fit, points }];
    });
    if (moved.length < 2) continue;
    flags.push(sourceFlag(input, pattern, moved.length));
    for (const { fit, points } of moved) {
      if (told.has(`${fit.system}:${source}`)) continue;
      const others = fit.soundSources.filter((other) => other !== source);
      const block = readBlock(input, models, suspectsOf, withScatter(fit, pattern), source, points, others);
      blocks.push({ ...block, posterior: ownPosterior(block.readings) });
    }
  }
  return { blocks, flags };
}

/** All points of a block that the pattern moves materially and that shows it; undefined otherwise. */
function movedPoints(
  input: ScreenInput,
  model: SystemModel,
  fit: RobustFit,
  { source, kind, amplitude }: SourcePattern,
): readonly number[] | undefined {
  const others = fit.soundSources.filter((other) => other !== source);
  if (fit.agreement !== "agreed" || others.length < LEAST_OTHERS) return undefined;
  const block = besideOthers(input, model, fit.system, source);
  if (block === undefined) return undefined;
  const shown = SHAPES[kind](block).flatMap((shape, i) => {
    const by = amplitude * shape;
    return Math.abs(by) < thresholdOf(input, fit.system, block.points[i]!) ? [] : [block.deviations[i]! / by];
  });
  return shown.length > 0 && middle(shown) > SHOWN ? block.points : undefined;
}

/** The fit with the scatter of the source about its pattern in place of what the pattern widened. */
function withScatter(fit: RobustFit, { source, noiseSd, offsetSd }: SourcePattern): RobustFit {
  const noise = fit.noiseSd.map((sd, i) => (fit.points.source[i] === source ? Math.min(sd, noiseSd) : sd));
  return { ...fit, noiseSd: noise, betweenSd: Math.min(fit.betweenSd, offsetSd) };
}

function sourceFlag(input: ScreenInput, pattern: SourcePattern, moved: number): Flag {
  const { source, kind, amplitude, systems, siding } = pattern;
  const how =
    kind === "one factor"
      ? `lie ${offBy(amplitude)} those of the others`
      : `are those of ${kind}, by ${threeDigits(-amplitude)} ${kind === "temperatures off by a constant" ? "K" : "K per K"}`;
  const ofTemperature = kind !== "one factor";
  return {
    scope: "source",
    code: "source-off-throughout",
    severity: "notice",
    source,
    suspectedCause: ofTemperature ? temperatureOffset.name : "no simple cause",
    evidence:
      `the values of ${sourceName(input, source)} ${how}: seen in ${siding} of ${counted(systems, "system")} with two ` +
      `other sources that agree; it matters in ${moved}`,
    lookAt: ofTemperature
      ? temperatureOffset.lookAt
      : "Look at what all its values share: calibration, balance, stock solution, purity of the solvent.",
  };
}

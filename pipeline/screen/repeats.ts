import type { Flag, RobustFit } from "../records/fits.ts";
import { type CopiedBlock, type CopiedSource, RepeatKind } from "../records/repeats.ts";
import { changedCopies } from "./changed-copies.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { counted, listed } from "./wording.ts";

/**
 * Notices of what counts once though it is written more than once: readings that stand twice in a source, blocks that
 * repeat another source or give the mean of several, sources that repeat others all over the edition; and values of such
 * blocks that differ from what they were copied from.
 */
export function repeatFlags(input: ScreenInput): Flag[] {
  const told = new Set<string>();
  const sources = new Map<CopiedSource, number>();
  const flags = input.fits.flatMap((fit) => {
    if (fit.repeats === undefined) return [];
    for (const source of fit.repeats.sources) sources.set(source, (sources.get(source) ?? 0) + 1);
    const blocks = fit.repeats.blocks.map((block) => {
      told.add(`${block.source}:${fit.system}`);
      return blockFlag(input, fit, block);
    });
    return [...sameSource(input, fit), ...blocks, ...changedCopies(input, fit)];
  });
  return [...flags, ...sourceFlags(input, sources)];
}

function sameSource({ table }: ScreenInput, { system, points, repeats }: RobustFit): Flag[] {
  const flags: Flag[] = [];
  for (const [i, kind] of repeats!.kind.entries()) {
    if (kind !== RepeatKind.sameReading && kind !== RepeatKind.twoUnits) continue;
    const [row, earlier] = [points.row[i]!, points.row[repeats!.countedAs[i]!]!];
    const where = `line ${table.line[earlier]} of this source`;
    const flag = { scope: "measurement", severity: "notice", row, source: points.source[i]!, system } as const;
    flags.push(
      kind === RepeatKind.twoUnits
        ? {
            ...flag,
            code: "one-value-in-two-units",
            evidence: `the value of ${where} at the same temperature, in another unit: it counts once`,
            lookAt: "Look at whether both are one measurement; a true replicate is told by the field `replicate`.",
          }
        : {
            ...flag,
            code: "exact-repeat",
            evidence: `the same value at the same temperature stands in ${where}: it counts once`,
            lookAt: "Look at whether the row was entered twice; a true replicate is told by the field `replicate`.",
          },
    );
  }
  return flags;
}

function blockFlag(input: ScreenInput, { system }: RobustFit, block: CopiedBlock): Flag {
  const { source, from, points, equal, logChance } = block;
  const names = listed(from.map((one) => sourceName(input, one)));
  const mean = from.length > 1;
  const seen = mean
    ? `${equal.length} of its ${counted(points, "value")} are the mean of those of ${names} at the same temperatures`
    : `${equal.length} of its ${counted(points, "value")} are those of ${names} at the same temperatures`;
  return {
    scope: "block",
    code: mean ? "averaged-copy" : "re-reported",
    severity: "notice",
    source,
    system,
    evidence: `${seen}, to the digits given; by chance about 1 in 10^${Math.round(-logChance / Math.LN10)}`,
    lookAt: mean
      ? "Look at whether the table averages others: it is no measurement of its own, and does not count beside them."
      : "Look at whether both report one measurement: equal values count once, in the vote of the sources and the curve.",
  };
}

/** One notice for a source that repeats others all over the edition, naming them. */
function sourceFlags(input: ScreenInput, sources: ReadonlyMap<CopiedSource, number>): Flag[] {
  const bySource = new Map<number, CopiedSource[]>();
  for (const one of sources.keys()) bySource.set(one.source, [...(bySource.get(one.source) ?? []), one]);
  return [...bySource]
    .sort(([a], [b]) => a - b)
    .map(([source, copies]): Flag => {
      const told = [...copies]
        .sort((a, b) => a.from - b.from)
        .map(
          ({ from, equal, compared, byChance }) =>
            `${equal} of ${compared} of ${sourceName(input, from)} (by chance about ${Math.round(byChance)})`,
        );
      return {
        scope: "source",
        code: "re-reporting-source",
        severity: "notice",
        source,
        evidence: `at the same temperatures, to the digits given or within 0.01 of a logarithm, its values are those of others: ${told.join(", ")}`,
        lookAt: "Look at where the source took its values from; each counts once, with the source named first.",
      };
    });
}

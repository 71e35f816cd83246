import type { MixtureModel } from "../../records/mixtures.ts";

/** A stretch of compositions without measurement that is worth a remark, mass fraction. */
const WIDE_GAP = 0.3;

/**
 * Remarks on a mixture's model: few compositions, wide gaps, ends that were not measured, systems left out, systems whose
 * own curve breaks.
 *
 * @param breaksK temperature at which the curve of each member breaks, K; NaN = nowhere
 */
export function mixtureNotices(
  {
    members,
    solvents,
    nCompositions,
    nSources,
    fractionRange: [low, high],
  }: Pick<MixtureModel, "members" | "solvents" | "nCompositions" | "nSources" | "fractionRange">,
  breaksK: readonly number[],
): string[] {
  const used = members.filter(({ nUsed }) => nUsed > 0).map(({ fraction }) => fraction);
  const gaps = used.flatMap((fraction, i) => {
    const next = used[i + 1];
    return next !== undefined && next - fraction > WIDE_GAP ? [[fraction, next] as const] : [];
  });
  const left = members.filter(({ whyNot }) => whyNot !== undefined);
  const broken = members.filter(({ nUsed }, m) => nUsed > 0 && Number.isFinite(breaksK[m]));
  return [
    ...(broken.length > 0
      ? [
          `the curve of ${broken.map(({ fraction }) => `${percent(fraction)} %`).join(", ")} ${solvents[0]} breaks, as if ` +
            "the solid changed: the surface smooths over it",
        ]
      : []),
    ...(nCompositions < 5 ? [`only ${nCompositions} compositions: what lies between them rests on the model`] : []),
    ...(low > 0 ? [`${solvents[1]} alone is not among the data: its coefficients describe the mixtures only`] : []),
    ...(high < 1 ? [`${solvents[0]} alone is not among the data: its coefficients describe the mixtures only`] : []),
    ...gaps.map(([from, to]) => `nothing measured between ${percent(from)} and ${percent(to)} % ${solvents[0]}`),
    ...left.map(({ fraction, whyNot }) => `${percent(fraction)} % ${solvents[0]} left out: ${whyNot ?? ""}`),
    ...(nSources === 1 ? ["one source only: an offset it may have is in the limits by the usual scatter"] : []),
  ];
}

function percent(fraction: number): string {
  return String(Number((100 * fraction).toFixed(1)));
}

import type { RunnerUp } from "../records/fits.ts";
import type { Candidate } from "./candidate.ts";

/** Models whose AICc lies closer than this are not told apart by it; leave-one-out decides. */
const CLOSE_AICC = 2;

/** The model chosen, and what was passed over, each with its reason. */
export interface Choice {
  /** Undefined where every model is physically impossible. */
  readonly chosen: Candidate | undefined;
  readonly runnersUp: readonly RunnerUp[];
}

/**
 * Chooses among models fitted to one common set of points under one common covariance.
 *
 * The physical veto comes first. Of the rest the smallest AICc wins; those less than 2 above it are told apart by the
 * root mean square leave-one-out residual. Where the points are too few for AICc (below p + 3) leave-one-out decides
 * among the models of fewest coefficients. What is still equal goes to the model that stands first.
 * @param candidates simplest first
 * @param veto reason why a candidate is physically impossible, if it is
 * @see Burnham and Anderson, Model Selection and Multimodel Inference, 2nd ed. (2002), section 2.6.
 */
export function chooseModel(
  candidates: readonly Candidate[],
  veto: (candidate: Candidate) => string | undefined,
): Choice {
  const reasons = new Map<Candidate, string>();
  for (const candidate of candidates) {
    const reason = veto(candidate);
    if (reason !== undefined) reasons.set(candidate, reason);
  }
  const possible = candidates.filter((candidate) => !reasons.has(candidate));
  const best = possible.reduce((least, { aicc }) => Math.min(least, aicc), Number.POSITIVE_INFINITY);
  const close = possible.filter(({ aicc }) => aicc - best < CLOSE_AICC);
  const finalists = best < Number.POSITIVE_INFINITY ? close : fewestCoefficients(possible);
  const chosen = finalists.reduce<Candidate | undefined>(
    (least, c) => (least === undefined || c.leaveOneOut < least.leaveOneOut * (1 - 1e-9) ? c : least),
    undefined,
  );
  const runnersUp = candidates
    .filter((candidate) => candidate !== chosen)
    .map((candidate) => ({
      model: candidate.model,
      aicc: finiteOrBlank(candidate.aicc),
      leaveOneOut: finiteOrBlank(candidate.leaveOneOut),
      why: reasons.get(candidate) ?? passedOver(candidate, chosen as Candidate, finalists.includes(candidate), best),
    }));
  return { chosen, runnersUp };
}

/** A criterion for a table: NaN, an empty cell, where it is not defined. */
export function finiteOrBlank(criterion: number): number {
  return Number.isFinite(criterion) ? criterion : Number.NaN;
}

function fewestCoefficients(candidates: readonly Candidate[]): Candidate[] {
  const fewest = Math.min(...candidates.map((candidate) => candidate.parameterCount));
  return candidates.filter((candidate) => candidate.parameterCount === fewest);
}

function passedOver(candidate: Candidate, chosen: Candidate, finalist: boolean, best: number): string {
  if (finalist) {
    const [own, other] = [candidate, chosen].map(({ leaveOneOut }) => percent(leaveOneOut));
    return own === other
      ? `leave-one-out residual no smaller (${own}), AICc within ${CLOSE_AICC} of the best`
      : `leave-one-out residual ${own} against ${other}, AICc within ${CLOSE_AICC} of the best`;
  }
  if (candidate.aicc < Number.POSITIVE_INFINITY) return `AICc ${(candidate.aicc - best).toFixed(1)} above the best`;
  return "too few points for its coefficients: AICc is not defined";
}

function percent(leaveOneOut: number): string {
  return Number.isFinite(leaveOneOut) ? `${(100 * leaveOneOut).toFixed(2)} %` : "not defined";
}

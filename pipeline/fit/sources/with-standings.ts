import type { SourceStanding, SystemFit } from "../../records/fits.ts";
import type { CurveContext, CurveSubject } from "../system-models.ts";
import { campReadings } from "./camp-readings.ts";
import { sourceStandings } from "./source-standing.ts";

/**
 * Adds to the fit of a system how its sources stand to one another, and in a conflict what each group of them says.
 *
 * Standings need a fit a source, which few callers look at: they are worked out when first asked for, and kept.
 */
export function withStandings(fit: SystemFit, subject: Omit<CurveSubject, "branch">, context: CurveContext): SystemFit {
  const { robust, curves } = fit;
  if (!severalSources(robust.points.source)) return fit;
  let known: readonly SourceStanding[] | undefined;
  const standings = () => {
    known ??= sourceStandings(robust, curves, subject, context);
    return known;
  };
  return robust.agreement === "conflict"
    ? { ...fit, standings, campReadings: campReadings(robust, subject, context) }
    : { ...fit, standings };
}

function severalSources(source: Int32Array): boolean {
  for (let i = 1; i < source.length; i++) if (source[i] !== source[0]) return true;
  return false;
}

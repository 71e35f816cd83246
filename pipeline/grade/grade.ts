import type { Grade } from "../records/edition.ts";
import type { Flag, SystemFit } from "../records/fits.ts";

/** Fewest independent laboratories for a grade better than doubtful when anything else is amiss. */
const LABORATORIES = 2;
/** Fewest distinct temperatures and narrowest span, K, that count as temperature cover. */
const TEMPERATURES = 4;
const SPAN_K = 20;

/** What the grade of one system rests on. */
export interface GradeEvidence {
  readonly fit: SystemFit;
  readonly flags: readonly Flag[];
  /** Distinct laboratories among the kept points. */
  readonly laboratories: number;
  /** Distinct methods among the kept points. */
  readonly methods: number;
  /** True if every kept point has its solid phase checked at equilibrium. */
  readonly solidChecked: boolean;
}

/**
 * Proposes a grade in the sense of the IUPAC Solubility Data Series, with each criterion and its number.
 *
 * - rejected: no point is left to fit
 * - doubtful: sources disagree, an open blocking flag, or a single laboratory with no temperature cover
 * - tentative: everything else; `recommended` is never proposed by the program alone, a ruling with a name confirms it
 */
export function proposeGrade({ fit, flags, laboratories, methods, solidChecked }: GradeEvidence): Grade {
  const { temperatureK, n } = fit.robust.points;
  const blocking = flags.filter((flag) => flag.severity === "blocking").length;
  const temperatures = new Set(temperatureK).size;
  const span = n > 0 ? Math.max(...temperatureK) - Math.min(...temperatureK) : 0;
  const covered = temperatures >= TEMPERATURES && span >= SPAN_K;
  const reasons = [
    `${laboratories} independent ${laboratories === 1 ? "laboratory" : "laboratories"} (at least ${LABORATORIES} wanted)`,
    `${temperatures} temperatures over ${Math.round(span)} K (at least ${TEMPERATURES} over ${SPAN_K} K wanted)`,
    `${methods} ${methods === 1 ? "method" : "methods"}`,
    solidChecked ? "solid phase checked at equilibrium" : "solid phase not checked at equilibrium: tentative at best",
    fit.robust.agreement === "agreed"
      ? "sources agree or only one measured"
      : `agreement of sources: ${fit.robust.agreement}`,
    blocking === 0 ? "no open flag" : `${blocking} open ${blocking === 1 ? "flag needs" : "flags need"} a person`,
  ];
  if (n === 0) return { grade: "rejected", reasons: ["no point to fit", ...reasons] };
  const doubtful =
    fit.robust.agreement === "conflict" ||
    blocking > 0 ||
    (laboratories < LABORATORIES && !covered && temperatures > 1);
  return { grade: doubtful ? "doubtful" : "tentative", reasons };
}

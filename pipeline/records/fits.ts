import type { Repeats } from "./repeats.ts";
import type { FitBasis, SystemPoints } from "./systems.ts";

/** Scales pooled over the whole edition. All are standard deviations of ln value. */
export interface PooledScales {
  /** Within-source scatter by source (position in the edition's list), shrunk towards the edition's. */
  readonly within: Float64Array;
  /** Between-source scatter: general, and for salts in water. */
  readonly between: number;
  readonly betweenAqueousSalt: number;
  /** Between-source scatter of systems at one temperature, which mostly come from compilations. */
  readonly betweenOneTemperature: number;
  /** Degrees of freedom behind the three; 0 = the default setting was used, nothing could be estimated. */
  readonly betweenDegreesOfFreedom: number;
  readonly betweenAqueousSaltDegreesOfFreedom: number;
  readonly betweenOneTemperatureDegreesOfFreedom: number;
}

/** How far the sources of a system agree. */
export type Agreement = "agreed" | "conflict" | "cannot tell";

/** The robust screening fit of one system: which points stay, and how far each lies from what the others say. */
export interface RobustFit {
  readonly system: number;
  readonly points: SystemPoints;
  readonly agreement: Agreement;
  /** 1 = stays in the published curve. */
  readonly kept: Uint8Array;
  /** ln value expected at each point with that point left out (its whole source, where that is set apart). */
  readonly predicted: Float64Array;
  /** lnValue - predicted. */
  readonly deviation: Float64Array;
  /** Standard deviation of the deviation: noise, source offset and curve uncertainty together. */
  readonly deviationSd: Float64Array;
  /** Standard deviation of the noise of each point within its source, as the fit assumed it. */
  readonly noiseSd: Float64Array;
  /** Between-source standard deviation the fit assumed. */
  readonly betweenSd: number;
  /** Temperature at which the screening curve was allowed to break, K; NaN = nowhere. */
  readonly breakTemperatureK: number;
  /** True if that break was tested and the curvature may change there too; else it only protects points near it. */
  readonly breakTested?: boolean;
  /** Degrees of freedom for judging z = deviation / deviationSd. */
  readonly degreesOfFreedom: number;
  /** Sources (positions in the edition's list) whose blocks are sound: they agree and form the majority. Ascending. */
  readonly soundSources: readonly number[];
  /** Sources whose whole block lies apart from the sound majority; a pure copy of another is in neither list. Ascending. */
  readonly apartSources: readonly number[];
  /** In a conflict: the groups of sources that agree within themselves, largest first. */
  readonly camps: readonly (readonly number[])[];
  /** Points that count once though they are written more than once; absent where there are none. */
  readonly repeats?: Repeats;
}

/** Names of the curve models. */
export type CurveModel =
  | "van 't Hoff"
  | "modified Apelblat"
  | "Buchowski-Ksiazczak lambda-h"
  | "quadratic in 1/T"
  | "constant";

/** A model that was tried and not chosen. */
export interface RunnerUp {
  readonly model: CurveModel;
  /** AICc by least squares on the common set of kept points; NaN where points are fewer than p + 3. */
  readonly aicc: number;
  /** Root mean square leave-one-out residual of ln value; NaN where a point alone decides a coefficient. */
  readonly leaveOneOut: number;
  /** Why it was passed over. */
  readonly why: string;
}

/** A solubility held against the ideal one; each pair is a bracket from no heat-capacity term to the full one. */
export interface IdealComparison {
  readonly temperatureK: number;
  /** Ideal mole fraction. */
  readonly low: number;
  readonly high: number;
  /** Activity coefficient against the supercooled melt. */
  readonly gammaLow: number;
  readonly gammaHigh: number;
}

/** A fitted temperature model with what is needed to evaluate it and its limits. */
export interface Curve {
  readonly curveId: string;
  readonly system: number;
  readonly branch: number;
  readonly model: CurveModel;
  readonly fitBasis: FitBasis;
  /**
   * Coefficients in the usual published form, with their standard uncertainties. Names by model: A, B, C; lambda, h and
   * the melting point Tm, which is given and has no uncertainty here.
   */
  readonly coefficients: readonly {
    readonly name: string;
    readonly value: number;
    readonly standardUncertainty: number;
  }[];
  /** Covariance of the coefficients, row-major, in the same order. */
  readonly covariance: readonly number[];
  /** Lowest and highest temperature of the kept points, K; a branch reaches to the transition. */
  readonly temperatureRangeK: readonly [number, number];
  readonly n: number;
  readonly nSources: number;
  readonly nLaboratories: number;
  /** Root mean square deviation of ln value. */
  readonly rmsd: number;
  /** Average relative deviation of the value, percent. */
  readonly ardPercent: number;
  /** Residual standard deviation within sources; undefined where n - p is below 5. */
  readonly withinSd: number | undefined;
  /** Between-source standard deviation used in the limits, and its degrees of freedom (0 = default setting). */
  readonly betweenSd: number;
  readonly betweenDegreesOfFreedom: number;
  /** NaN where points are fewer than p + 3. */
  readonly aicc: number;
  readonly runnersUp: readonly RunnerUp[];
  /** Remarks: few points, large |C|, why no richer model. */
  readonly notices: readonly string[];
  /** Apparent dissolution enthalpy at the mean (harmonic) temperature, J/mol, with 95 % limits. */
  readonly dissolutionEnthalpy:
    | { readonly value: number; readonly low: number; readonly high: number; readonly temperatureK: number }
    | undefined;
  /** ln value at a temperature inside the range. @throws RangeError outside it. */
  readonly evaluate: (temperatureK: number) => number;
  /** Half-widths, in ln value, of the 95 % limits of the curve and of a new measurement from a new source. */
  readonly limits: (temperatureK: number) => { readonly curve: number; readonly newMeasurement: number };
}

/** A change of the solid phase within a system whose solid form is not specified. */
export interface Transition {
  /** Temperature at which the two branches meet, K, with 95 % limits. */
  readonly temperatureK: number;
  readonly low: number;
  readonly high: number;
  /** p of as strong a break under one smooth curve, by parametric bootstrap. */
  readonly probability: number;
}

/** A change of slope that no equilibrium transition makes: d ln value/dT rises on heating. */
export interface RisingKink {
  readonly temperatureK: number;
  /** p of as strong a kink under one smooth curve, by parametric bootstrap. */
  readonly probability: number;
  /** d ln value/dT (1/K) of straight lines through the three nearest temperatures on either side. */
  readonly slopeBelow: number;
  readonly slopeAbove: number;
}

/** A curve fitted without one source: the published model, or the simplest where the other points do not carry it. */
export interface CurveWithout {
  readonly model: CurveModel;
  /** In the usual published form, as of a {@link Curve}. */
  readonly coefficients: readonly { readonly name: string; readonly value: number }[];
  readonly temperatureRangeK: readonly [number, number];
  readonly n: number;
  readonly nSources: number;
  /** ln value at a temperature inside the range. */
  readonly evaluate: (temperatureK: number) => number;
}

/** How one source of a system of several stands to the others. */
export interface SourceStanding {
  /** Position in the edition's list. */
  readonly source: number;
  /** Branch of the curve, 1 and up. */
  readonly branch: number;
  /** Number of its points in the curve; 0 where the fit leaves out the whole source. */
  readonly n: number;
  /** Points that the offset rests on: those within the temperatures of the others; 0 = no temperature in common. */
  readonly compared: number;
  /** Mean deviation of its points, ln value, from the curve of the other sources, with 95 % limits; NaN where none. */
  readonly offset: number;
  readonly low: number;
  readonly high: number;
  /** Largest change of the published curve, ln value, over its range when the source is left out; NaN where no curve remains. */
  readonly influence: number;
  /** The curve without the source; absent where none can be fitted, or the source is not in it anyway. */
  readonly without?: CurveWithout;
}

/** What one group of agreeing sources says in a system whose sources disagree without a majority. */
export interface CampReading {
  /** Positions in the edition's list, ascending. */
  readonly sources: readonly number[];
  /** Curve of these sources alone; absent where none can be fitted. */
  readonly curve?: Curve;
}

/** Why a system has no curve. */
export interface NoCurve {
  readonly system: number;
  readonly reason: string;
}

/** Outcome of fitting one system. */
export interface SystemFit {
  readonly robust: RobustFit;
  /** One curve, or one a branch, ascending in temperature. */
  readonly curves: readonly Curve[];
  readonly noCurve?: string;
  /** Where the two branches of two curves meet. */
  readonly transition?: Transition;
  readonly kink?: RisingKink;
  /** Works out how the sources stand to one another, by branch and source; absent where a single source is left. */
  readonly standings?: () => readonly SourceStanding[];
  /** In a conflict: what each group of sources that agree says. */
  readonly campReadings?: readonly CampReading[];
}

/** A remark on a measurement, block, source or system, as `flags.csv` lists it. */
export interface Flag {
  readonly scope: "measurement" | "block" | "source" | "system";
  readonly code: string;
  readonly severity: "blocking" | "notice";
  /** Row of the measurement table, for scope measurement. */
  readonly row?: number;
  /** Position of the source, for scope measurement, block or source. */
  readonly source?: number;
  /** Position of the system; absent for scope source. */
  readonly system?: number;
  readonly suspectedCause?: string;
  readonly causeDetail?: string;
  readonly causeProbability?: number;
  /** Value that would fit, in the reported unit. */
  readonly proposedValue?: number;
  /** What was seen, in words with figures. */
  readonly evidence: string;
  /** What a person should look at. */
  readonly lookAt: string;
}

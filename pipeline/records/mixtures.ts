import type { FitBasis } from "./systems.ts";

/** Jouyban-Acree-van 't Hoff model of one solute in one solid form over a binary solvent. */
export interface MixtureModel {
  /** Readable id, unique in the edition. */
  readonly id: string;
  readonly solute: string;
  readonly solidForm: string;
  readonly medium: string;
  /** The two solvents in the order of the systems' `solvent`. */
  readonly solvents: readonly [string, string];
  /** The systems over this binary, pure solvents included, ascending by mass fraction of the first solvent. */
  readonly members: readonly MixtureMember[];
  readonly fitBasis: FitBasis;
  /** A1, B1, A2, B2, then as many of J0, J1, J2 as the data determine; for mass fractions free of solute. */
  readonly coefficients: readonly {
    readonly name: string;
    readonly value: number;
    readonly standardUncertainty: number;
  }[];
  /** Row-major, in the order of the coefficients. */
  readonly covariance: readonly number[];
  /** Mass fraction of the first solvent, free of solute: lowest and highest of the data. */
  readonly fractionRange: readonly [number, number];
  readonly temperatureRangeK: readonly [number, number];
  /** Temperatures inside the data at a composition, K, and compositions at a temperature; undefined where there is none. */
  readonly temperaturesAt: (fraction: number) => readonly [number, number] | undefined;
  readonly fractionsAt: (temperatureK: number) => readonly [number, number] | undefined;
  /** Corners of the convex hull of the data, counter-clockwise from the lowest fraction: the model holds inside only. */
  readonly domain: readonly { readonly fraction: number; readonly temperatureK: number }[];
  readonly n: number;
  readonly nCompositions: number;
  readonly nSources: number;
  /** Root mean square deviation of ln value, and average relative deviation of the value, percent, of the points used. */
  readonly rmsd: number;
  readonly ardPercent: number;
  /** Standard deviation by which a composition's own curve lies off the surface, ln value, as the limits take it. */
  readonly lackOfFitSd: number;
  /** Between-source standard deviation in the limits, and its degrees of freedom (0 = default setting). */
  readonly betweenSd: number;
  readonly betweenDegreesOfFreedom: number;
  /** AICc of the model with 0, 1 ... terms J that could be fitted. */
  readonly aicc: readonly number[];
  /** Solubility passes through a maximum inside the composition range at these temperatures; empty where none. */
  readonly innerMaxima: readonly InnerMaximum[];
  readonly notices: readonly string[];
  /** ln value inside the range of compositions and temperatures. @throws RangeError outside it. */
  readonly evaluate: (fraction: number, temperatureK: number) => number;
  /** Half-widths, in ln value, of the 95 % limits of the surface and of a new measurement from a new source. */
  readonly limits: (
    fraction: number,
    temperatureK: number,
  ) => { readonly curve: number; readonly newMeasurement: number };
}

/** A maximum of the solubility between the ends of the compositions measured. */
export interface InnerMaximum {
  readonly temperatureK: number;
  /** Mass fraction of the first solvent at the maximum, with the range where the solubility is not less within limits. */
  readonly fraction: number;
  readonly fractionLow: number;
  readonly fractionHigh: number;
  readonly lnValue: number;
  /** By how much ln value exceeds the higher of the two ends, with 95 % limits. */
  readonly rise: number;
  readonly riseHalfWidth: number;
}

/**
 * What all the other systems of a mixture, this one left out, say of the points of one system. Arrays run over the
 * system's points as its fit has them; NaN where nothing can be said (outside the others' compositions and temperatures).
 */
export interface LeftOutPrediction {
  /** ln value expected at each point. */
  readonly predicted: Float64Array;
  /** Standard deviation of (ln value - predicted): surface, lack of fit, source and noise together. */
  readonly sd: Float64Array;
  /** The part of `sd` that all points of the system share. */
  readonly sharedSd: Float64Array;
  /**
   * Mean of (ln value - predicted) and its standard deviation over the points that have a prediction and that the surface
   * uses; over those kept by the system's own fit where it uses none of them.
   */
  readonly meanDeviation: number;
  readonly meanSd: number;
  /** Number of points behind that mean. */
  readonly n: number;
  /** Degrees of freedom for judging them. */
  readonly degreesOfFreedom: number;
}

/** One system of a mixture: a composition of the binary solvent, or one of the two pure solvents. */
export interface MixtureMember {
  /** Position of the system in the edition's list. */
  readonly system: number;
  /** Mass fraction of the first solvent, free of solute: mean over its points, else that of its composition key. */
  readonly fraction: number;
  /** Points of the system that the surface uses. */
  readonly nUsed: number;
  /** Lowest and highest temperature of those points, K; NaN where none is used. */
  readonly temperatureRangeK: readonly [number, number];
  /** Why the surface does not use the system; absent where it does. */
  readonly whyNot?: string;
  /** 1 = used by the surface, by point of the system. */
  readonly used: Uint8Array;
  /** Mass fraction of the first solvent at each point. */
  readonly fractions: Float64Array;
  /** Root mean square deviation of its used points from the surface, and their mean deviation, ln value. */
  readonly rmsd: number;
  readonly meanDeviation: number;
  /** What the other systems say of it. */
  readonly leftOut?: LeftOutPrediction;
  /** The same with the two solvents exchanged, for a composition written the wrong way round: one entry a way of it. */
  readonly reversed: readonly ExchangedPrediction[];
}

/** What the other systems say of one whose two solvents are read exchanged. */
export interface ExchangedPrediction extends LeftOutPrediction {
  /** What was exchanged: parts by mass, or volumes before mixing. */
  readonly of: "masses" | "volumes";
  /** Mass fraction of the first solvent, so read: mean over its points. */
  readonly fraction: number;
}

/** Why the systems of a solute in a binary solvent have no common model. */
export interface NoMixtureModel {
  /** Readable id, unique in the edition. */
  readonly id: string;
  readonly solvents: readonly [string, string];
  readonly systems: readonly number[];
  readonly reason: string;
}

/** All mixtures of an edition, both lists by id. */
export interface Mixtures {
  readonly models: readonly MixtureModel[];
  readonly without: readonly NoMixtureModel[];
}

import type { Basis, Caution, Outcome } from "../basis.ts";
import type { HorizonKind } from "../study/model.ts";

export type RefersTo = "event-surface" | "base-of-smear" | "contact" | "level";

/** A marker horizon placed in one section, given by a person or found in the measurements. */
export interface MarkerHorizon {
  readonly section: string;
  /** Its own name: the given one, or `<analyte>-1`, `-2` from below. */
  readonly name: string;
  /** The name it answers to after `boundary.same`. */
  readonly horizon: string;
  readonly kind: HorizonKind;
  readonly refersTo: RefersTo;
  readonly source: "given" | "found" | "manual";
  readonly evidence: string;
  readonly positionM: number;
  readonly lowM: number;
  readonly highM: number;
  readonly level: number;
  readonly shape: "normal" | "uniform" | "profile-likelihood" | "sample-bounds";
  /** One standard deviation (half the 68 % interval where not normal). */
  readonly sigmaM: number;
  readonly enrichment?: number;
  readonly fluence?: Estimate;
  readonly mixing?: Mixing;
  readonly outcome: Outcome;
  readonly note: string;
}

export interface Estimate {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

/** Box mixing accepted for a found horizon: base of the smear and mixing length. */
export interface Mixing {
  readonly baseM: number;
  readonly lengthM: number;
  readonly lowM: number;
  readonly highM: number;
}

/** One sample of an element's profile, judged against its background. */
export interface ProfileSample {
  readonly sample: string;
  readonly baseM: number;
  readonly topM: number;
  readonly heightM: number;
  /** The measured value, or the limit where censored. */
  readonly value: number;
  readonly censored: "none" | "left" | "right" | "interval";
  readonly sigma: number;
  readonly densityGCm3: number;
  readonly excess?: number;
  readonly p?: number;
  readonly q?: number;
  readonly flagged: boolean;
}

export interface Background {
  readonly median: number;
  readonly mean: number;
  /** Standard deviation of the decimal logarithm. */
  readonly logSd: number;
  readonly kept: number;
  readonly censored: number;
  /** median x 10^(3 logSd): the ceiling drawn and printed. */
  readonly threshold: number;
  /** Product-limit quartiles of the kept samples; absent where not estimable or half of the cells are censored. */
  readonly lowerQuartile?: number;
  readonly upperQuartile?: number;
}

/** A run of adjacent flagged samples, with its integrated excess and the mixing models fitted to it. */
export interface Anomaly {
  readonly name: string;
  readonly firstSample: number;
  readonly lastSample: number;
  readonly windowBaseM: number;
  readonly windowTopM: number;
  readonly enrichment: number;
  readonly fluence?: Fluence;
  readonly models: readonly MixingModel[];
  readonly accepted: "M0" | "M1" | "M2" | "unresolved";
}

export interface Fluence {
  /** ng/cm2 */
  readonly value: number;
  readonly sigma: number;
  readonly low: number;
  readonly high: number;
  readonly level: number;
  readonly coverage: number;
  readonly zeroFill: number;
  readonly nearestFill: number;
  readonly lowCensored: number;
  readonly highCensored: number;
  readonly tail?: number;
  /** Simulated distribution under all errors. */
  readonly simulated?: SimulatedSpread;
  /** Named shares of the variance, (ng/cm2)^2. */
  readonly variance: Readonly<Record<string, number>>;
}

export interface SimulatedSpread {
  readonly median: number;
  readonly sd: number;
  readonly low68: number;
  readonly high68: number;
  readonly low95: number;
  readonly high95: number;
  readonly replicates: number;
  readonly seed: number;
}

export interface MixingModel {
  readonly id: "M0" | "M1" | "M2";
  readonly logLikelihood: number;
  readonly parameters: number;
  readonly aicc?: number;
  readonly weight?: number;
  readonly fluence?: number;
  readonly background?: number;
  readonly baseM?: number;
  readonly lengthM?: Estimate;
  readonly surfaceM?: Estimate;
  readonly baseInterval?: Estimate;
  /** For drawing: heights and modelled values. */
  readonly curve?: { readonly heightsM: readonly number[]; readonly values: readonly number[] };
}

export interface Profile {
  readonly section: string;
  readonly analyte: string;
  readonly unit: string;
  readonly samples: readonly ProfileSample[];
  readonly background?: Background;
  /** Number of tests among which false discoveries were controlled. */
  readonly tests?: number;
  /** Chance of a false flag somewhere in the profile by a plain 3-sigma rule. */
  readonly falseThreeSigmaChance?: number;
  readonly anomalies: readonly Anomaly[];
}

export interface Flag {
  readonly section: string;
  readonly horizon: string;
  readonly flag: string;
  readonly numbers: Readonly<Record<string, number>>;
  readonly consequence: string;
}

/** The main horizon H of the study: which name, and where it is placed in each section that has it. */
export interface MainHorizon {
  readonly name?: string;
  /** How it was settled: declared, the only given impact, or section by section the found iridium of largest fluence. */
  readonly settledBy: "setting" | "given-impact" | "found-iridium" | "none" | "ambiguous";
  /** False where sections were never declared to share it: then they are answered one by one. */
  readonly isShared: boolean;
  readonly bySection: ReadonlyMap<string, MarkerHorizon>;
}

export interface Markers {
  readonly horizons: readonly MarkerHorizon[];
  readonly profiles: readonly Profile[];
  readonly flags: readonly Flag[];
  readonly main: MainHorizon;
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}

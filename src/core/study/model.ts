import type { Occurrences } from "./occurrence.ts";
import type { Origin } from "./origin.ts";
import type { Problem } from "./problem.ts";
import type { Settings } from "./settings.ts";
import type { Sheet } from "./sheet.ts";

export type { Decimal, Delimiter, Dialect, Encoding } from "./dialect.ts";
export type { Occurrence, Occurrences, Qualifier } from "./occurrence.ts";
export type { Origin } from "./origin.ts";
export type { Sheet } from "./sheet.ts";

export type LengthUnit = "m" | "cm" | "mm" | "ft";
export type Axis = "height" | "depth";

/** A file of the study as bytes were given: what the repeat sheet records. */
export interface StudyFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** Everything about one question: the tables read, converted to metres of height, and the settings. */
export interface Study {
  readonly name: string;
  readonly settings: Settings;
  readonly sections: readonly Section[];
  readonly taxa: ReadonlyMap<string, Taxon>;
  readonly choices: readonly Choice[];
  readonly claims: readonly Claim[];
  readonly problems: readonly Problem[];
  readonly sheets: readonly Sheet[];
  readonly files: readonly StudyFile[];
}

/** One measured section. All `*M` are metres of stratigraphic height, increasing upward (a depth d is -d). */
export interface Section {
  readonly name: string;
  readonly title: string;
  readonly axis: Axis;
  readonly unit: LengthUnit;
  readonly datum: string;
  /** Declared ends, else the ends of what was searched, measured and logged. */
  readonly bottomM: number;
  readonly topM: number;
  readonly densityGCm3?: number;
  readonly source: string;
  readonly legs: readonly Leg[];
  readonly intervals: readonly RockInterval[];
  readonly beds: readonly Bed[];
  /** From below upward. */
  readonly samples: readonly Sample[];
  readonly searches: readonly Search[];
  readonly occurrences: Occurrences;
  readonly publishedRanges: readonly PublishedRange[];
  readonly measurements: readonly Measurement[];
  readonly horizons: readonly GivenHorizon[];
  readonly recovery: readonly RecoveryPoint[];
  readonly origin?: Origin;
}

/** A traverse or core run read on its own scale: piecewise linear from reading to height. */
export interface Leg {
  readonly name: string;
  /** Sorted by reading, in the section's own unit. */
  readonly readings: readonly number[];
  readonly heightsM: readonly number[];
}

export type IntervalKind = "covered" | "core-loss" | "not-searched" | "fault-cut" | "fault-repeat" | "slump";

export interface RockInterval {
  readonly kind: IntervalKind;
  readonly baseM: number;
  readonly topM: number;
  readonly thicknessLowM?: number;
  readonly thicknessHighM?: number;
  readonly notes: string;
  readonly origin: Origin;
}

export type Contact = "sharp" | "gradational" | "erosive" | "hardground" | "burrowed" | "karst" | "faulted";

export interface Bed {
  readonly baseM: number;
  readonly topM: number;
  readonly lithology: string;
  readonly baseContact?: Contact;
  readonly facies?: string;
  readonly waterDepthM?: number;
  readonly bioturbation?: number;
  readonly carbonatePercent?: number;
  readonly formation?: string;
  readonly member?: string;
  readonly notes: string;
  readonly origin: Origin;
}

export interface Sample {
  readonly name: string;
  readonly baseM: number;
  readonly topM: number;
  /** The middle of base and top. */
  readonly heightM: number;
  readonly leg?: string;
  /** One standard deviation. */
  readonly positionErrorM?: number;
  readonly densityGCm3?: number;
  readonly notes: string;
  readonly origin: Origin;
}

export type Counting = "presence" | "count" | "scale";

/** This group was looked for in this sample. `derived`: no searches.csv, every sample counts as searched. */
export interface Search {
  readonly sample: string;
  readonly group: string;
  readonly heightM: number;
  readonly effort?: number;
  readonly effortUnit?: string;
  readonly counting: Counting;
  readonly countedTo?: number;
  readonly derived: boolean;
  readonly origin?: Origin;
}

export interface PublishedRange {
  readonly taxon: string;
  readonly firstM: number;
  readonly lastM: number;
  readonly horizons: number;
  readonly firstErrorM?: number;
  readonly lastErrorM?: number;
  readonly counted: "horizons" | "finds" | "specimens";
  readonly origin: Origin;
}

/** What a value cell says, in the canonical unit of its quantity. */
export type Reading =
  | { readonly kind: "value"; readonly value: number }
  | { readonly kind: "below"; readonly limit: number }
  | { readonly kind: "above"; readonly limit: number }
  | { readonly kind: "between"; readonly low: number; readonly high: number };

export type Quantity = "mass-fraction" | "per-mil" | "per-gram" | "count" | "percent" | "polarity" | "other";

export interface Measurement {
  /** Lower case, as declared: iridium, nickel, mercury, toc, d13c, shocked-quartz, spherules, polarity ... */
  readonly analyte: string;
  readonly quantity: Quantity;
  readonly sample?: string;
  readonly baseM: number;
  readonly topM: number;
  readonly heightM: number;
  readonly reading: Reading;
  /** Canonical unit of the reading: ng/g for mass fractions, else the unit as given. */
  readonly unit: string;
  readonly givenValue: string;
  readonly givenUnit: string;
  /** One standard deviation in the canonical unit. */
  readonly sigma?: number;
  readonly detectionLimit?: number;
  readonly trials?: number;
  readonly amount?: number;
  readonly amountUnit?: string;
  readonly method?: string;
  readonly densityGCm3?: number;
  readonly origin: Origin;
}

export type HorizonKind =
  | "impact"
  | "ash"
  | "reversal"
  | "isotope"
  | "volcanic"
  | "biohorizon"
  | "flooding"
  | "sequence-boundary"
  | "hiatus"
  | "other";

export interface GivenHorizon {
  readonly name: string;
  readonly kind: HorizonKind;
  readonly heightM: number;
  /** `normal`: one standard deviation downward and upward; `uniform`: half-widths. */
  readonly belowM: number;
  readonly aboveM: number;
  readonly shape: "normal" | "uniform";
  readonly ageMa?: number;
  readonly ageSigmaMa?: number;
  readonly datingMethod?: string;
  readonly laboratory?: string;
  readonly zone?: string;
  readonly notes: string;
  readonly origin: Origin;
}

export interface RecoveryPoint {
  readonly group: string;
  readonly heightM: number;
  readonly recovery: number;
  readonly origin: Origin;
}

export interface Taxon {
  readonly name: string;
  readonly group: string;
  readonly accepted?: string;
  readonly mixingLengthM?: number;
  readonly traits: Readonly<Record<string, string>>;
  readonly notes: string;
  readonly origin: Origin;
}

export interface Choice {
  readonly order: number;
  readonly choice: string;
  readonly old: string;
  readonly new: string;
  readonly reason: string;
  readonly by: string;
  readonly afterResults: boolean;
}

export interface Claim {
  readonly question: string;
  readonly value: string;
  readonly section?: string;
  readonly taxon?: string;
  readonly method?: string;
  readonly horizon?: string;
  readonly level?: number;
  readonly low?: number;
  readonly high?: number;
  readonly unit?: string;
  readonly source: string;
}

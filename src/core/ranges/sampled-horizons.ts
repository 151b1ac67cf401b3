import type { LocalTaxon } from "../study/finds-result.ts";
import type { Section } from "../study/model.ts";
import type { WorkingRange } from "./base.ts";
import type { Coordinate } from "./coordinate.ts";
import { countSampled, type SampledCount } from "./sampled.ts";

/** A level at which a group was looked for, with the samples taken there. */
export interface SampledHorizon {
  readonly heightM: number;
  readonly samples: readonly string[];
  /** Only where efforts differ between the horizons of the group, all in one unit. */
  readonly effort?: number;
  /** False where a search there was for presence or on a scale: a count is not to be had. */
  readonly isCounted: boolean;
  /** Specimens of the group that counting stopped at, where it is told. */
  readonly countedTo?: number | undefined;
}

/** A taxon's finds among the horizons that were sampled for its group. */
export interface SampledRange {
  readonly count: SampledCount;
  /** Heights of the barren sampled horizons above the highest sampled find, from below upward. */
  readonly barrenM: readonly number[];
  /** Efforts of the horizons that count, from below upward; absent where they do not differ or are not known. */
  readonly effort?: SampledEffort;
  /** Finds that are in no sample searched for the group: they do not count here. */
  readonly unsampledFinds: number;
}

export interface SampledEffort {
  /** The N' horizons of the range that carry information. */
  readonly inRange: readonly { readonly effort: number; readonly isFound: boolean }[];
  readonly above: readonly number[];
}

/** Samples nearer than this are one horizon. */
const SAME_LEVEL_M = 1e-9;

/** Levels at which a group was looked for, from below upward; samples inside rock without recovery are left out. */
export function sampledHorizons(
  section: Section,
  group: string,
  coordinate: Coordinate,
): readonly SampledHorizon[] {
  const horizons: {
    heightM: number;
    samples: string[];
    isCounted: boolean;
    countedTo?: number | undefined;
  }[] = [];
  const searches = section.searches.filter((s) => s.group === group && !isInGap(s.heightM, coordinate));
  for (const { heightM, sample, counting, countedTo } of searches.toSorted((a, b) => a.heightM - b.heightM)) {
    const last = horizons[horizons.length - 1];
    const isCounted = counting === "count";
    if (last !== undefined && heightM - last.heightM <= SAME_LEVEL_M) {
      last.samples.push(sample);
      last.isCounted &&= isCounted;
      last.countedTo =
        last.countedTo === undefined || countedTo === undefined ? undefined : last.countedTo + countedTo;
    } else
      horizons.push({
        heightM,
        samples: [sample],
        isCounted,
        ...(countedTo === undefined ? {} : { countedTo }),
      });
  }
  return horizons;
}

function isInGap(heightM: number, { gaps }: Coordinate): boolean {
  return gaps.some((gap) => heightM > gap.baseM + SAME_LEVEL_M && heightM < gap.topM - SAME_LEVEL_M);
}

/** Undefined where none of the taxon's finds lies in a sample searched for its group. */
export function sampledRange(
  taxon: LocalTaxon,
  range: WorkingRange,
  horizons: readonly SampledHorizon[],
): SampledRange | undefined {
  const found = new Set(taxon.samples.filter((sample) => sample !== undefined));
  const counted =
    range.mode === "base" ? horizons.filter((h) => h.heightM >= range.baseM - SAME_LEVEL_M) : horizons;
  const presence = counted.map((h) => h.samples.some((sample) => found.has(sample)));
  const count = countSampled(presence, range.mode);
  if (count === undefined) return undefined;
  const effort = effortOf(counted, presence, count);
  return {
    count,
    ...(effort === undefined ? {} : { effort }),
    barrenM: counted.slice(counted.length - count.barrenAbove).map((h) => h.heightM),
    unsampledFinds: taxon.heightsM.length - presence.filter((isFound) => isFound).length,
  };
}

function effortOf(
  counted: readonly SampledHorizon[],
  presence: readonly boolean[],
  { inRange, barrenAbove }: SampledCount,
): SampledEffort | undefined {
  const efforts = counted.flatMap(({ effort }) => (effort === undefined ? [] : [effort]));
  if (efforts.length < counted.length) return undefined;
  const end = counted.length - barrenAbove;
  const used = efforts.slice(end - inRange);
  if (used.every((effort) => effort === used[0])) return undefined;
  return {
    inRange: efforts
      .slice(end - inRange, end)
      .map((effort, i) => ({ effort, isFound: presence[end - inRange + i] })),
    above: efforts.slice(end),
  };
}

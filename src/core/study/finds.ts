import { firstPassage } from "./fault-repeat.ts";
import type { Find, FindReason, LocalTaxon } from "./finds-result.ts";
import { groupBy } from "./grouping.ts";
import { type Identification, treatmentOf } from "./identification.ts";
import { LEVEL_TOLERANCE_M, levelIndex } from "./level-index.ts";
import type { Occurrence, PublishedRange, RockInterval, Section, Study, Taxon } from "./model.ts";
import type { Settings } from "./settings.ts";

export interface SettledFinds {
  readonly finds: readonly Find[];
  readonly taxa: readonly LocalTaxon[];
}

/** Decides, find by find, what counts (synonymy, qualifiers, reworked, doubtful), and gathers each taxon's horizons. */
export function settleFinds(study: Study): SettledFinds {
  const bySection = study.sections.map((section) => settleSection(section, study));
  return { finds: bySection.flatMap((s) => s.finds), taxa: bySection.flatMap((s) => s.taxa) };
}

function settleSection(section: Section, study: Study): SettledFinds {
  const judged = Array.from(section.occurrences, (occurrence) => judge(occurrence, section, study));
  const byTaxon = groupBy(judged, (find) => find.accepted);
  const searched = new Set(section.searches.map((s) => searchKey(s.sample, s.group)));
  const finds: Find[] = [];
  const taxa: LocalTaxon[] = [];
  for (const [name, ofTaxon] of byTaxon) {
    const merged = mergeHorizons(ofTaxon);
    for (const find of merged) finds.push(settledFind(find));
    const used = merged.filter((find) => find.used === "yes");
    if (used.length > 0) taxa.push(localTaxon(name, { section, study, used, judged: merged, searched }));
  }
  const found = new Set(taxa.map((t) => t.taxon));
  for (const range of section.publishedRanges) {
    const name = acceptedName(range.taxon, study.taxa);
    if (!found.has(name)) taxa.push(publishedTaxon(name, range, section, study));
  }
  finds.sort((a, b) => a.origin.row - b.origin.row);
  return { finds, taxa };
}

interface JudgedFind extends Find {
  /** The name without qualifier, before synonymy. */
  readonly named: string;
  readonly strict: boolean;
  readonly inclusive: boolean;
  readonly count?: number;
}

function settledFind({
  named: _named,
  strict: _strict,
  inclusive: _inclusive,
  count: _count,
  ...find
}: JudgedFind): Find {
  return find;
}

function judge(occurrence: Occurrence, section: Section, study: Study): JudgedFind {
  const { identification } = study.settings.taxa;
  const { heightM, isMapped } = placeInRock(occurrence.heightM, section, study.settings);
  const reasonUnder = (names: Identification) =>
    reasonAgainst({ ...occurrence, heightM }, section, study.settings, names);
  const asRead = reasonUnder(identification);
  return {
    origin: occurrence.origin,
    section: section.name,
    named: occurrence.taxon,
    verbatim: occurrence.verbatim,
    accepted: acceptedName(operationalName(occurrence), study.taxa),
    heightM,
    ...(occurrence.sample === undefined ? {} : { sample: occurrence.sample }),
    ...(occurrence.count === undefined ? {} : { count: occurrence.count }),
    used: asRead === undefined ? "yes" : "no",
    reason: asRead ?? (isMapped ? "fault-repeat-mapped" : "used"),
    strict: occurrence.reworked === "no" && reasonUnder("strict") === undefined,
    inclusive: reasonUnder("inclusive") === undefined,
  };
}

/** Where a find counts: where it lies, or where its rock is passed first (`taxa.faultRepeat` is `map`). */
function placeInRock(heightM: number, { intervals }: Section, { taxa }: Settings) {
  if (taxa.faultRepeat !== "map") return { heightM, isMapped: false };
  let placed = heightM;
  for (let repeat = repeatAt(placed, intervals); repeat; repeat = repeatAt(placed, intervals)) {
    const below = firstPassage(placed, repeat);
    if (below === undefined) return { heightM, isMapped: false };
    placed = below;
  }
  return { heightM: placed, isMapped: placed !== heightM };
}

const repeatAt = (heightM: number, intervals: readonly RockInterval[]): RockInterval | undefined =>
  intervals.find((interval) => interval.kind === "fault-repeat" && isWithin(heightM, interval));

function reasonAgainst(
  occurrence: Occurrence,
  section: Section,
  settings: Settings,
  identification: Identification,
): FindReason | undefined {
  if (occurrence.count === 0) return "zero-count";
  const treatment = treatmentOf(occurrence.qualifier, identification);
  if (treatment.kind === "set-aside") return treatment.reason;
  if (occurrence.reworked === "yes" && settings.taxa.reworked !== "include") return "reworked";
  if (occurrence.reworked === "suspected" && settings.taxa.reworked === "exclude")
    return "reworking-suspected";
  if (occurrence.doubtful && settings.taxa.doubtful === "exclude") return "doubtful";
  const within = section.intervals.filter((interval) => isWithin(occurrence.heightM, interval));
  if (within.some((interval) => interval.kind === "fault-repeat")) return "fault-repeat";
  return within.some((interval) => hasNoRecovery(interval)) ? "no-recovery" : undefined;
}

/** Rock that nobody could search: recovery is 0 there. */
export function hasNoRecovery(interval: RockInterval): boolean {
  return interval.kind === "covered" || interval.kind === "core-loss" || interval.kind === "not-searched";
}

/** Inside an interval, its ends left out. */
export function isWithin(heightM: number, interval: RockInterval): boolean {
  return heightM > interval.baseM + LEVEL_TOLERANCE_M && heightM < interval.topM - LEVEL_TOLERANCE_M;
}

function operationalName(occurrence: Occurrence): string {
  const isOwnTaxon = treatmentOf(occurrence.qualifier, "strict").kind === "own-taxon";
  return isOwnTaxon ? `${occurrence.taxon} ${occurrence.qualifier}` : occurrence.taxon;
}

/** Follows `accepted` through taxa.csv; a circle ends at the name it began with. */
export function acceptedName(name: string, taxa: ReadonlyMap<string, Taxon>): string {
  const seen = new Set([name]);
  let current = name;
  for (;;) {
    const next = taxa.get(current)?.accepted;
    if (next === undefined || next === current) return current;
    if (seen.has(next)) return name;
    seen.add(next);
    current = next;
  }
}

function groupOf(taxon: string, study: Study): string {
  return study.taxa.get(taxon)?.group ?? "ungrouped";
}

/** Finds in one sample, or at one level, are one horizon: the first is used, the rest merged into it. */
function mergeHorizons(finds: readonly JudgedFind[]): JudgedFind[] {
  const samples = new Set<string>();
  const levels = levelIndex<true>();
  return finds.map((find) => {
    if (find.used !== "yes") return find;
    const isKnown =
      (find.sample !== undefined && samples.has(find.sample)) || levels.at(find.heightM).length > 0;
    if (isKnown) {
      const reason = find.reason === "fault-repeat-mapped" ? find.reason : "same-horizon";
      return { ...find, used: "merged", reason };
    }
    if (find.sample !== undefined) samples.add(find.sample);
    levels.add(find.heightM, true);
    return find;
  });
}

interface Gathering {
  readonly section: Section;
  readonly study: Study;
  readonly used: readonly JudgedFind[];
  readonly judged: readonly JudgedFind[];
  readonly searched: ReadonlySet<string>;
}

function localTaxon(taxon: string, { section, study, used, judged, searched }: Gathering): LocalTaxon {
  const group = groupOf(study.taxa.has(taxon) ? taxon : judged[0].named, study);
  const upward = used.toSorted((a, b) => a.heightM - b.heightM);
  const lastStrictM = highest(judged.filter((find) => find.strict));
  const inclusive = levelsOf(judged.filter((find) => find.inclusive));
  const countOf = countReader(judged);
  const counts = upward.map(countOf);
  return {
    section: section.name,
    taxon,
    group,
    heightsM: upward.map((find) => find.heightM),
    // A mapped find lies in no sample of the first passage.
    samples: upward.map(({ sample, reason }) =>
      reason !== "fault-repeat-mapped" && sample !== undefined && searched.has(searchKey(sample, group))
        ? sample
        : undefined,
    ),
    ...(counts.every((count) => count === undefined) ? {} : { counts }),
    ...(lastStrictM === undefined ? {} : { lastStrictM }),
    lastInclusiveM: inclusive.at(-1) ?? upward[upward.length - 1].heightM,
    ...(inclusive.length > upward.length ? { inclusiveHeightsM: inclusive } : {}),
  };
}

/** Specimens of all finds that make one horizon; undefined where one of them was not counted. */
function countReader(judged: readonly JudgedFind[]): (find: JudgedFind) => number | undefined {
  const counted = judged.filter(({ used }) => used !== "no");
  const bySample = groupBy(counted.keys(), (at) => counted[at].sample);
  const byLevel = levelIndex<number>();
  for (const [at, { heightM }] of counted.entries()) byLevel.add(heightM, at);
  return ({ sample, heightM }) => {
    const inSample = sample === undefined ? [] : (bySample.get(sample) ?? []);
    const here = new Set([...inSample, ...byLevel.at(heightM)].toSorted((a, b) => a - b));
    let sum = 0;
    for (const at of here) {
      const { count } = counted[at];
      if (count === undefined) return undefined;
      sum += count;
    }
    return sum;
  };
}

function publishedTaxon(taxon: string, range: PublishedRange, section: Section, study: Study): LocalTaxon {
  const isPoint = Math.abs(range.lastM - range.firstM) <= LEVEL_TOLERANCE_M;
  const heightsM = isPoint ? [range.firstM] : [range.firstM, range.lastM];
  return {
    section: section.name,
    taxon,
    group: groupOf(taxon, study),
    heightsM,
    samples: heightsM.map(() => undefined),
    lastStrictM: range.lastM,
    lastInclusiveM: range.lastM,
    publishedHorizons: range.horizons,
  };
}

/** Distinct heights from below upward. */
function levelsOf(finds: readonly JudgedFind[]): readonly number[] {
  const heights = finds.map((find) => find.heightM).toSorted((a, b) => a - b);
  return heights.filter((height, i) => i === 0 || height - heights[i - 1] > LEVEL_TOLERANCE_M);
}

function highest(finds: readonly JudgedFind[]): number | undefined {
  return finds.reduce<number | undefined>(
    (most, { heightM }) => (most === undefined || heightM > most ? heightM : most),
    undefined,
  );
}

const searchKey = (sample: string, group: string) => `${sample}\u0000${group}`;

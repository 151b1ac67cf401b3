import type { Caution } from "../basis.ts";
import { groupBy } from "../study/grouping.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TaxonSet } from "./result.ts";

export interface SetOfRanges extends TaxonSet {
  readonly ranges: readonly TaxonRange[];
}

export const allCandidates = "candidates";
export const closedCandidates = "candidates-closed";
export const withoutIsolated = "candidates-without-isolated";
export const untrimmedCandidates = "candidates-untrimmed";
export const earlyStep = "step:early";
export const lateStep = "step:late";
export const groupPrefix = "group:";

/**
 * The sets that the assemblage questions run on in one section, of candidates alone: all of them; without those that
 * reach the top, where some do; each group; each declared list. Sets without a taxon here are left out.
 */
export function setsOf(
  section: string,
  ranges: readonly TaxonRange[],
  declared: Readonly<Record<string, readonly string[]>>,
): readonly SetOfRanges[] {
  if (ranges.length === 0) return [];
  const closed = ranges.filter((range) => !range.reachesTop);
  const sets = [setOf(section, allCandidates, ranges)];
  if (closed.length > 0 && closed.length < ranges.length) sets.push(setOf(section, closedCandidates, closed));
  for (const [group, ofGroup] of groupBy(ranges, (range) => range.group))
    sets.push({ ...setOf(section, `${groupPrefix}${group}`, ofGroup), group });
  for (const [name, names] of Object.entries(declared)) {
    const listed = ranges.filter((range) => names.includes(range.taxon));
    if (listed.length > 0 && !isReserved(name)) sets.push(setOf(section, name, listed));
  }
  return sets;
}

/** Declared lists that cannot be used as they stand in this section. */
export function setCautions(
  section: string,
  ranges: readonly TaxonRange[],
  declared: Readonly<Record<string, readonly string[]>>,
): Caution[] {
  const here = new Set(ranges.map((range) => range.taxon));
  return Object.entries(declared).flatMap(([subject, names]): Caution[] => {
    if (isReserved(subject)) return [{ code: "timing-set-name-taken", section, subject }];
    const missing = names.filter((name) => !here.has(name));
    if (missing.length === 0) return [];
    const numbers = { taxa: names.length, missing: missing.length, names: missing.join(", ") };
    return [{ code: "timing-set-incomplete", section, subject, numbers }];
  });
}

export function setOf(section: string, set: string, ranges: readonly TaxonRange[]): SetOfRanges {
  return { section, set, taxa: ranges.map((range) => range.taxon), ranges };
}

const reserved: ReadonlySet<string> = new Set([
  allCandidates,
  closedCandidates,
  withoutIsolated,
  untrimmedCandidates,
  earlyStep,
  lateStep,
]);

function isReserved(name: string): boolean {
  return reserved.has(name) || name.startsWith(groupPrefix);
}

import { groupBy } from "../../study/grouping.ts";
import type { SetCase } from "../set-case.ts";
import {
  allCandidates,
  closedCandidates,
  earlyStep,
  lateStep,
  untrimmedCandidates,
  withoutIsolated,
} from "../sets.ts";

/** One set of taxa in several sections. */
export interface PooledSet {
  readonly set: string;
  readonly group?: string;
  /** One a section. */
  readonly cases: readonly SetCase[];
}

/** Sets that repeat the candidates with another judgement, or declared for a question of their own. */
const notPooled: ReadonlySet<string> = new Set([withoutIsolated, untrimmedCandidates, earlyStep, lateStep]);

/**
 * The sets that sections are answered together on: those with taxa in at least two sections. Where some candidates of a
 * section reach its top, `candidates-closed` takes the candidates of the sections where none do.
 */
export function pooledSets(cases: readonly SetCase[]): readonly PooledSet[] {
  const bySet = groupBy(
    cases.filter(({ set }) => !notPooled.has(set.set)),
    ({ set }) => set.set,
  );
  const pooled: PooledSet[] = [];
  for (const [set, found] of bySet) {
    const inAll = set === closedCandidates ? withUntouched(found, bySet.get(allCandidates) ?? []) : found;
    const { group } = found[0].set;
    if (inAll.length >= 2) pooled.push({ set, ...(group === undefined ? {} : { group }), cases: inAll });
  }
  return pooled;
}

function withUntouched(closed: readonly SetCase[], all: readonly SetCase[]): readonly SetCase[] {
  const bySection = new Map(closed.map((one) => [one.section.name, one]));
  return all.flatMap((one) => {
    const here = bySection.get(one.section.name);
    if (here !== undefined) return [here];
    return one.set.ranges.some((range) => range.reachesTop) ? [] : [one];
  });
}

/** The distinct taxa of a set. */
export function taxaOf({ cases }: PooledSet): readonly string[] {
  return [...new Set(cases.flatMap(({ set }) => set.taxa))];
}

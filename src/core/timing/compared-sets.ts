import type { LocalTaxon } from "../study/finds-result.ts";
import { isolatedTaxa } from "./isolated.ts";
import type { TaxonRange } from "./range-data.ts";
import { type SetOfRanges, setOf, untrimmedCandidates, withoutIsolated } from "./sets.ts";

export interface Compared {
  readonly section: string;
  /** The candidates in the coordinate that they are judged in. */
  readonly ranges: readonly TaxonRange[];
  /** The taxa as they were settled, and as they were before finds below a reworking ceiling were taken out. */
  readonly taxa: readonly LocalTaxon[];
  readonly untrimmed: readonly LocalTaxon[];
  readonly confidence: number;
  readonly rangesOf: (taxa: readonly LocalTaxon[]) => readonly TaxonRange[];
}

/**
 * The candidates once more where a judgement about finds could change the answer: without their isolated highest finds, and
 * with the finds that a reworking ceiling took out. Each set is there only where it differs.
 */
export function comparedSets(compared: Compared): readonly SetOfRanges[] {
  const { section, ranges, taxa, untrimmed, confidence, rangesOf } = compared;
  const sets: SetOfRanges[] = [];
  const isolated = new Set(isolatedTaxa(ranges, confidence));
  if (isolated.size > 0) {
    const without = taxa.map((taxon) => (isolated.has(taxon.taxon) ? withoutHighest(taxon) : taxon));
    sets.push(setOf(section, withoutIsolated, rangesOf(without)));
  }
  if (trimmedTaxa(compared).length > 0) sets.push(setOf(section, untrimmedCandidates, rangesOf(untrimmed)));
  return sets;
}

/** Candidates that lost finds to their reworking ceiling. */
export function trimmedTaxa({
  ranges,
  taxa,
  untrimmed,
}: Pick<Compared, "ranges" | "taxa" | "untrimmed">): readonly string[] {
  const kept = new Map(taxa.map(({ taxon, heightsM }) => [taxon, heightsM.length]));
  const candidates = new Set(ranges.map(({ taxon }) => taxon));
  return untrimmed.flatMap(({ taxon, heightsM }) =>
    candidates.has(taxon) && heightsM.length > (kept.get(taxon) ?? heightsM.length) ? [taxon] : [],
  );
}

function withoutHighest(taxon: LocalTaxon): LocalTaxon {
  return { ...taxon, heightsM: taxon.heightsM.slice(0, -1), samples: taxon.samples.slice(0, -1) };
}

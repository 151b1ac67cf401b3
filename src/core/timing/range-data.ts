import { type Base, type WorkingRange, workingRange } from "../ranges/base.ts";
import type { Coordinate } from "../ranges/coordinate.ts";
import type { Candidate, LocalTaxon } from "../study/finds-result.ts";

/** A candidate as the assemblage questions see it. */
export interface TaxonRange extends WorkingRange {
  readonly taxon: string;
  readonly group: string;
  readonly reachesTop: boolean;
  /** Its finds in effective metres, from below upward; empty where a range was published without its finds. */
  readonly levels: readonly number[];
}

/** The candidates of one section with their ranges, in the order of the candidates. */
export function candidateRanges(
  candidates: readonly Candidate[],
  taxa: readonly LocalTaxon[],
  { base, coordinate }: { readonly base: Base; readonly coordinate: Coordinate },
): readonly TaxonRange[] {
  const byName = new Map(taxa.map((taxon) => [taxon.taxon, taxon]));
  return candidates.flatMap((candidate) => {
    const taxon = byName.get(candidate.taxon);
    if (candidate.role !== "candidate" || taxon === undefined || taxon.heightsM.length === 0) return [];
    const hasFinds = taxon.publishedHorizons === undefined;
    return [
      {
        ...workingRange(taxon, base, coordinate),
        taxon: taxon.taxon,
        group: taxon.group,
        reachesTop: candidate.reachesTop,
        levels: hasFinds ? taxon.heightsM.map(coordinate.toEffective) : [],
      },
    ];
  });
}

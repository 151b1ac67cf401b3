import type { LocalTaxon } from "../study/finds-result.ts";
import type { Gap } from "./coordinate.ts";

/** The finds of a taxon between its first and its last, with the rock that they could lie in. */
export interface InteriorFinds {
  readonly heightsM: readonly number[];
  /** Searchable rock between first and last find, from below upward. */
  readonly parts: readonly Gap[];
}

/** Given its first and last find, what a taxon tells about recovery: nothing with fewer than three finds. */
export function interiorFinds(taxon: LocalTaxon, gaps: readonly Gap[]): InteriorFinds | undefined {
  const { heightsM, publishedHorizons } = taxon;
  if (publishedHorizons !== undefined || heightsM.length < 3) return undefined;
  const parts = partsBetween([heightsM[0], heightsM[heightsM.length - 1]], gaps);
  return parts.length === 0 ? undefined : { heightsM: heightsM.slice(1, -1), parts };
}

function partsBetween([baseM, topM]: readonly [number, number], gaps: readonly Gap[]): readonly Gap[] {
  const parts: Gap[] = [];
  let from = baseM;
  for (const gap of gaps) {
    if (gap.topM <= from || gap.baseM >= topM) continue;
    if (gap.baseM > from) parts.push({ baseM: from, topM: gap.baseM });
    from = gap.topM;
  }
  if (topM > from) parts.push({ baseM: from, topM });
  return parts;
}

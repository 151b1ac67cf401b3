/** Taken off before rounding up: 0.07 x 100 is 7.000000000000001 in double arithmetic. */
const RANK_GUARD = 1e-12;

/** The gaps between successive finds, smallest first; with a known base the one below the lowest find too. */
export function sortedGaps(levels: readonly number[], base?: number): number[] {
  const from = base === undefined ? levels : [base, ...levels];
  return from
    .slice(1)
    .map((level, i) => level - from[i])
    .toSorted((a, b) => a - b);
}

export interface GapRank {
  /** j: the bound is the j-th smallest gap above the last find. */
  readonly rank: number;
  /** j / (N + 1), at or above the level asked for: what the bound covers. */
  readonly level: number;
}

/**
 * The smallest rank j of N gaps with j / (N + 1) at or above C. Undefined where there is none: it takes C / (1 - C)
 * gaps (`gapsNeeded`).
 *
 * Assumes that the unseen gap above the last find is exchangeable with the N seen ones: true for uniform finds, not
 * where finds thin out upward. P(top gap <= g_(j)) = j / (N + 1) then, and no less with ties.
 *
 * @param gaps N, a whole number. @param confidence C, in (0, 1); throws otherwise.
 * After C. R. Marshall 1994, Paleobiology 20:459-469.
 */
export function gapRank(gaps: number, confidence: number): GapRank | undefined {
  requireLevel("gapRank", confidence);
  const rank = Math.max(1, Math.ceil(confidence * (gaps + 1) - RANK_GUARD));
  return rank <= gaps ? { rank, level: rank / (gaps + 1) } : undefined;
}

/** The least number of gaps for a bound at level C: C / (1 - C), rounded up. */
export function gapsNeeded(confidence: number): number {
  requireLevel("gapsNeeded", confidence);
  return Math.max(1, Math.ceil(confidence / (1 - confidence) - 1e-9));
}

/** Chance of a top gap of `length` or more among exchangeable gaps: (1 + number of gaps as long) / (N + 1). */
export function gapChance(sorted: readonly number[], length: number): number {
  return (1 + sorted.filter((gap) => gap >= length).length) / (sorted.length + 1);
}

function requireLevel(name: string, confidence: number): void {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(`${name}: expected a level between 0 and 1, got ${confidence} (confidence)`);
}

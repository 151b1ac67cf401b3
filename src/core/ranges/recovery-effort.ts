import type { Gap, RecoveryPiece } from "./coordinate.ts";
import { steps } from "./recovery-pieces.ts";
import type { SampledHorizon } from "./sampled-horizons.ts";

/**
 * Recovery as search effort per metre: between two sampled levels the mean of their efforts over the searchable rock
 * between them, so that U grows by half of each level's effort on either side of it.
 *
 * Assumes that finds come in proportion to effort and that the samples stand for the rock between them. Undefined with
 * fewer than two levels.
 *
 * @param horizons sampled levels from below upward, outside rock without recovery. @param efforts one for each.
 * After C. R. Marshall 1997, Paleobiology 23:165-173.
 */
export function effortPieces(
  horizons: readonly Pick<SampledHorizon, "heightM">[],
  efforts: readonly number[],
  gaps: readonly Gap[],
): readonly RecoveryPiece[] | undefined {
  if (horizons.length < 2) return undefined;
  const edges = horizons.map(({ heightM }) => heightM);
  const values = edges.slice(1).map((topM, i) => {
    const baseM = edges[i];
    const hidden = gaps.reduce(
      (sum, gap) => sum + Math.max(0, Math.min(gap.topM, topM) - Math.max(gap.baseM, baseM)),
      0,
    );
    const searchable = topM - baseM - hidden;
    return searchable > 0 ? (efforts[i] + efforts[i + 1]) / (2 * searchable) : 0;
  });
  return steps(edges, values);
}

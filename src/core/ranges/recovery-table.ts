import type { RecoveryPoint } from "../study/model.ts";
import type { RecoveryPiece } from "./coordinate.ts";
import { steps } from "./recovery-pieces.ts";

/**
 * Recovery as declared: linear between the rows of a group, a repeated position a jump in the order of the rows. Rows
 * may run up or down the section. Undefined without a row.
 */
export function tablePieces(points: readonly RecoveryPoint[]): readonly RecoveryPiece[] | undefined {
  if (points.length === 0) return undefined;
  const runsDown = points[0].heightM > points[points.length - 1].heightM;
  const upward = (runsDown ? points.toReversed() : points).toSorted((a, b) => a.heightM - b.heightM);
  const pieces = upward.slice(1).flatMap((above, i): RecoveryPiece[] => {
    const below = upward[i];
    if (!(above.heightM > below.heightM)) return [];
    return [{ baseM: below.heightM, topM: above.heightM, atBase: below.recovery, atTop: above.recovery }];
  });
  const [only] = upward;
  return pieces.length > 0 ? pieces : steps([only.heightM, only.heightM + 1], [only.recovery]);
}

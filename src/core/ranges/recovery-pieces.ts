import { type Coordinate, type Gap, pieceCoordinate, type RecoveryPiece } from "./coordinate.ts";

/** Squared recovery is no longer linear: each sloping piece is drawn as so many linear ones. */
const PARTS = 16;

interface Extent {
  readonly gaps: readonly Gap[];
  readonly bottomM: number;
  readonly topM: number;
}

/**
 * Recovery of a section made whole: the pieces of a source, continued at their edges' values to the section's ends, 0 in
 * rock that could not be searched, scaled to a mean of 1 over the rest. Undefined where it is 0 throughout.
 *
 * @param pieces contiguous, from below upward; one or more.
 */
export function wholeRecovery(
  pieces: readonly RecoveryPiece[],
  { gaps, bottomM, topM }: Extent,
): readonly RecoveryPiece[] | undefined {
  const spread = continuedTo(pieces, [
    Math.min(bottomM, ...gaps.map((gap) => gap.baseM)),
    Math.max(topM, ...gaps.map((gap) => gap.topM)),
  ]);
  const cuts = gaps.flatMap((gap) => [gap.baseM, gap.topM]);
  const cut = spread
    .flatMap((piece) => cutAt(piece, cuts))
    .map((piece) => (isWithin(piece, gaps) ? { ...piece, atBase: 0, atTop: 0 } : piece));
  const searchable = cut.filter((piece) => !isWithin(piece, gaps));
  const length = searchable.reduce((sum, { baseM, topM: top }) => sum + top - baseM, 0);
  const area = searchable.reduce((sum, p) => sum + 0.5 * (p.atBase + p.atTop) * (p.topM - p.baseM), 0);
  if (!(area > 0)) return undefined;
  const scale = length / area;
  return cut.map((piece) => ({ ...piece, atBase: piece.atBase * scale, atTop: piece.atTop * scale }));
}

/** U of such recovery, continued beyond the section at its edges' values. */
export function coordinateOf(pieces: readonly RecoveryPiece[]): Coordinate {
  const [lowest] = pieces;
  const highest = pieces[pieces.length - 1];
  return pieceCoordinate(pieces, { below: lowest.atBase, beyond: highest.atTop, origin: lowest.baseM });
}

/** r squared: how much a bound leans on the contrast of recovery. */
export function squaredPieces(pieces: readonly RecoveryPiece[]): readonly RecoveryPiece[] {
  return pieces.flatMap((piece) => {
    const { baseM, topM, atBase, atTop } = piece;
    const edges = Array.from({ length: PARTS - 1 }, (_, i) => baseM + ((topM - baseM) * (i + 1)) / PARTS);
    const parts = atBase === atTop ? [piece] : cutAt(piece, edges);
    return parts.map((part) => ({ ...part, atBase: part.atBase ** 2, atTop: part.atTop ** 2 }));
  });
}

/** Steps of constant recovery between edges, from below upward. */
export function steps(edges: readonly number[], values: readonly number[]): readonly RecoveryPiece[] {
  return values.flatMap((value, i) =>
    edges[i + 1] > edges[i] ? [{ baseM: edges[i], topM: edges[i + 1], atBase: value, atTop: value }] : [],
  );
}

function continuedTo(
  pieces: readonly RecoveryPiece[],
  [bottomM, topM]: readonly [number, number],
): readonly RecoveryPiece[] {
  const [lowest] = pieces;
  const highest = pieces[pieces.length - 1];
  return [
    ...steps([bottomM, lowest.baseM], [lowest.atBase]),
    ...pieces,
    ...steps([highest.topM, topM], [highest.atTop]),
  ];
}

function cutAt(piece: RecoveryPiece, levels: readonly number[]): readonly RecoveryPiece[] {
  const inside = levels.filter((level) => level > piece.baseM && level < piece.topM);
  const edges = [piece.baseM, ...new Set(inside.toSorted((a, b) => a - b)), piece.topM];
  return edges.slice(1).map((topM, i) => ({
    baseM: edges[i],
    topM,
    atBase: recoveryAt(piece, edges[i]),
    atTop: recoveryAt(piece, topM),
  }));
}

function recoveryAt({ baseM, topM, atBase, atTop }: RecoveryPiece, heightM: number): number {
  return atBase === atTop ? atBase : atBase + ((atTop - atBase) * (heightM - baseM)) / (topM - baseM);
}

function isWithin({ baseM, topM }: RecoveryPiece, gaps: readonly Gap[]): boolean {
  return gaps.some((gap) => baseM >= gap.baseM && topM <= gap.topM);
}

import { hasNoRecovery } from "../study/finds.ts";
import type { Section } from "../study/model.ts";

/** A stretch of rock over which recovery r(h) changes linearly from its base to its top. */
export interface RecoveryPiece {
  readonly baseM: number;
  readonly topM: number;
  readonly atBase: number;
  readonly atTop: number;
}

/** Rock in which nothing could be found: recovery is 0. */
export interface Gap {
  readonly baseM: number;
  readonly topM: number;
}

/** Which way a level that falls into a gap is rounded: an upper limit to its top, a lower one to its base. */
export type Limit = "upper" | "lower";

/** The recovery-weighted coordinate u = U(h), in effective metres, and its inverse. */
export interface Coordinate {
  readonly gaps: readonly Gap[];
  /** Heights at which r(h) begins another straight line, from below upward; the ends of gaps where absent. */
  readonly knotsM?: readonly number[];
  readonly toEffective: (heightM: number) => number;
  /** Undefined where u lies beyond the declared recovery and nothing continues it. */
  readonly toHeight: (effective: number, limit: Limit) => number | undefined;
  readonly gapAt: (effective: number) => Gap | undefined;
}

export interface CoordinateOptions {
  /** Recovery above the highest piece and, without `below`, below the lowest. 0: nothing is known there. */
  readonly beyond: number;
  readonly below?: number;
  /** U at the base of the lowest piece. */
  readonly origin: number;
}

/** A level equal to U of a gap within this relative distance is in the gap. */
const GAP_TOLERANCE = 1e-12;

/**
 * U(h), the integral of relative recovery r(h), piecewise linear in r, jumps allowed.
 *
 * Assumes that finds are a Poisson process of intensity proportional to r(h) inside the true range; only the shape of
 * r matters. U(h0 + y) = U(h0) + r0 y + (r1 - r0) y^2 / (2 L); the inverse within a piece, for a residual s, is
 * y = 2 s / (r0 + sqrt(r0^2 + 2 s (r1 - r0) / L)). On a zero-recovery piece the inverse is its top for an upper limit
 * (the set of levels not rejected is closed and holds all of it) and its base for a lower one.
 *
 * Throws where pieces are not contiguous from below upward, or recovery is negative.
 * After C. R. Marshall 1997, Paleobiology 23:165-173.
 */
export function pieceCoordinate(
  pieces: readonly RecoveryPiece[],
  { beyond, below = beyond, origin }: CoordinateOptions,
): Coordinate {
  pieces.forEach(requirePiece);
  const bases = [origin];
  for (const piece of pieces) bases.push(bases[bases.length - 1] + area(piece, piece.topM - piece.baseM));
  const gaps = mergeGaps(pieces.filter((p) => p.atBase === 0 && p.atTop === 0));
  const bottomM = pieces.length === 0 ? origin : pieces[0].baseM;
  const topM = pieces.length === 0 ? origin : pieces[pieces.length - 1].topM;
  const total = bases[bases.length - 1];

  const toEffective = (heightM: number) => {
    if (heightM <= bottomM) return origin + below * (heightM - bottomM);
    if (heightM >= topM) return total + beyond * (heightM - topM);
    const index = lastIndexAtOrBelow(pieces.length, (i) => pieces[i].baseM, heightM);
    return bases[index] + area(pieces[index], heightM - pieces[index].baseM);
  };
  const gapLevels = gaps.map((gap) => toEffective(gap.baseM));
  const gapAt = (effective: number) => {
    const index = gapLevels.findIndex((level) => isSameLevel(level, effective));
    return index < 0 ? undefined : gaps[index];
  };
  const toHeight = (effective: number, limit: Limit) => {
    const gap = gapAt(effective);
    if (gap !== undefined) return limit === "upper" ? gap.topM : gap.baseM;
    if (effective < origin)
      return continued(bottomM, effective - origin, {
        beyond: below,
        isEdge: isSameLevel(effective, origin),
      });
    if (effective >= total)
      return continued(topM, effective - total, { beyond, isEdge: isSameLevel(effective, total) });
    const index = lastIndexAtOrBelow(pieces.length, (i) => bases[i], effective);
    return pieces[index].baseM + inverseArea(pieces[index], effective - bases[index]);
  };
  const knotsM = pieces.length === 0 ? [] : [bottomM, ...pieces.map((piece) => piece.topM)];
  return { gaps, knotsM, toEffective, toHeight, gapAt };
}

/** r = 1 everywhere: u = h. */
export const uniformCoordinate: Coordinate = {
  gaps: [],
  toEffective: (heightM) => heightM,
  toHeight: (effective) => effective,
  gapAt: () => undefined,
};

/**
 * The coordinate of a section: recovery 0 in covered rock, lost core and rock not searched, 1 elsewhere, and 1
 * continued beyond the section's ends. Below the lowest gap U(h) = h.
 */
export function recoveryCoordinate(section: Pick<Section, "intervals">): Coordinate {
  const gaps = rockWithoutRecovery(section);
  if (gaps.length === 0) return uniformCoordinate;
  const pieces: RecoveryPiece[] = [];
  gaps.forEach((gap, index) => {
    const below = gaps[index - 1];
    if (below !== undefined) pieces.push({ baseM: below.topM, topM: gap.baseM, atBase: 1, atTop: 1 });
    pieces.push({ ...gap, atBase: 0, atTop: 0 });
  });
  return pieceCoordinate(pieces, { beyond: 1, origin: gaps[0].baseM });
}

/** Covered rock, lost core and rock not searched, from below upward, touching stretches in one. */
export function rockWithoutRecovery(section: Pick<Section, "intervals">): readonly Gap[] {
  return mergeGaps(section.intervals.filter((i) => hasNoRecovery(i) && i.topM > i.baseM));
}

function requirePiece(piece: RecoveryPiece, index: number, pieces: readonly RecoveryPiece[]): void {
  const isOrdered = piece.topM > piece.baseM && (index === 0 || pieces[index - 1].topM === piece.baseM);
  if (!isOrdered || !(piece.atBase >= 0) || !(piece.atTop >= 0))
    throw new RangeError(
      `pieceCoordinate: expected contiguous pieces from below upward with recovery 0 or more, got ` +
        `${piece.baseM} to ${piece.topM} with ${piece.atBase} to ${piece.atTop} (piece ${index})`,
    );
}

function area({ baseM, topM, atBase, atTop }: RecoveryPiece, y: number): number {
  return atBase * y + ((atTop - atBase) * y * y) / (2 * (topM - baseM));
}

/** The discriminant is often a rounding error below 0 where recovery falls to 0. */
function inverseArea({ baseM, topM, atBase, atTop }: RecoveryPiece, residual: number): number {
  if (residual <= 0) return 0;
  const length = topM - baseM;
  const discriminant = atBase * atBase + (2 * residual * (atTop - atBase)) / length;
  return Math.min(length, (2 * residual) / (atBase + Math.sqrt(Math.max(0, discriminant))));
}

function continued(
  edgeM: number,
  excess: number,
  { beyond, isEdge }: { readonly beyond: number; readonly isEdge: boolean },
): number | undefined {
  if (beyond > 0) return edgeM + excess / beyond;
  return isEdge ? edgeM : undefined;
}

function isSameLevel(a: number, b: number): boolean {
  return Math.abs(a - b) <= GAP_TOLERANCE * Math.max(1, Math.abs(b));
}

function lastIndexAtOrBelow(length: number, at: (index: number) => number, value: number): number {
  let low = 0;
  let high = length - 1;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if (at(middle) <= value) low = middle;
    else high = middle - 1;
  }
  return low;
}

function mergeGaps(gaps: readonly Gap[]): Gap[] {
  const merged: { baseM: number; topM: number }[] = [];
  for (const { baseM, topM } of gaps.toSorted((a, b) => a.baseM - b.baseM)) {
    const last = merged[merged.length - 1];
    if (last !== undefined && baseM <= last.topM) last.topM = Math.max(last.topM, topM);
    else merged.push({ baseM, topM });
  }
  return merged;
}

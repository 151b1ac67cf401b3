import { exp, expm1, log, log1p } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { logSumExp } from "../../numeric/sums.ts";
import type { Coordinate } from "../../ranges/coordinate.ts";
import { type EffectiveRange, isUninformative } from "../../ranges/pivot.ts";

/** What one taxon's finds say about its true end at a height. */
export interface EndLikelihood {
  readonly taxon: string;
  /** Highest find. */
  readonly lastM: number;
  /** Lowest height at which the taxon may have ended: its last find, or the find below it where one may be out of place. */
  readonly fromM: number;
  /** Heights at which L has a kink or a jump. */
  readonly kinksM: readonly number[];
  /** ln L at a height; -Infinity where the taxon cannot have ended. L is at most 1. */
  readonly log: (heightM: number) => number;
  /** Integral of L over an interval of heights, in metres. */
  readonly area: (lowM: number, highM: number) => number;
}

export interface EndTaxon extends EffectiveRange {
  readonly taxon: string;
  readonly lastM: number;
}

/** That one find of a taxon, not known which, may be out of place and lie anywhere up to the section's top. */
export interface Contamination {
  /** Chance of it, for each taxon. */
  readonly chance: number;
  /** Second-highest find, else the working base, as a height. */
  readonly secondM: number;
  /** Top of the section, in effective metres. */
  readonly top: number;
}

/** factor (A / (U(h) - b))^exponent at heights from `fromM` up to `toM`. */
interface PowerTerm {
  readonly fromM: number;
  readonly toM: number;
  readonly logFactor: number;
  readonly exponent: number;
}

/**
 * L(tau) = ((U(M) - U(b)) / (U(tau) - U(b)))^m at and above the last find M, 0 below it; 1 above it with no informative
 * find. Assumes finds from a Poisson process of intensity proportional to recovery inside the true range.
 *
 * With contamination eps, L is (1 - eps) L + eps R: exactly one of the m finds, each equally likely, is uniform on
 * (b, H) in the coordinate. R = (A / (H - b)) (A / s)^(m - 1), s = U(tau) - U(b), A = U(M) - U(b), at and above M, where
 * any of the m finds may be the one; 1 / m of that between the second-highest find and M, where only the top find may.
 */
export function endLikelihood(
  range: EndTaxon,
  coordinate: Coordinate,
  contamination?: Contamination,
): EndLikelihood {
  const { taxon, lastM } = range;
  const terms = termsOf(range, contamination);
  const areas = terms.map((term) => termArea(term, range, coordinate));
  return {
    taxon,
    lastM,
    fromM: Math.min(...terms.map((term) => term.fromM)),
    kinksM: [...new Set([lastM, ...coordinateKnots(coordinate)])],
    log: (heightM) => logOf(terms, range, { heightM, u: coordinate.toEffective(heightM) }),
    area: (lowM, highM) => {
      let sum = 0;
      for (let t = 0; t < terms.length; t++) {
        const a = Math.max(lowM, terms[t].fromM);
        const c = Math.min(highM, terms[t].toM);
        if (c > a) sum += areas[t](a, c);
      }
      return sum;
    },
  };
}

/** Heights at which recovery changes its law. */
function coordinateKnots({ gaps, knotsM }: Coordinate): readonly number[] {
  return knotsM ?? gaps.flatMap((gap) => [gap.baseM, gap.topM]);
}

function termsOf(range: EndTaxon, contamination: Contamination | undefined): readonly PowerTerm[] {
  const { lastM, exponent, base, last } = range;
  const above = { fromM: lastM, toM: Number.POSITIVE_INFINITY };
  if (isUninformative(range)) return [{ ...above, logFactor: 0, exponent: 0 }];
  if (contamination === undefined || contamination.chance === 0)
    return [{ ...above, logFactor: 0, exponent }];
  const { chance, secondM, top } = contamination;
  const logShare = log(chance) + log((last - base) / (top - base));
  const misplaced = { exponent: exponent - 1, logFactor: logShare };
  return [
    { ...above, logFactor: log1p(-chance), exponent },
    { ...above, ...misplaced },
    { fromM: secondM, toM: lastM, ...misplaced, logFactor: logShare - log(exponent) },
  ];
}

interface Place {
  readonly heightM: number;
  /** The same in effective metres. */
  readonly u: number;
}

function logOf(terms: readonly PowerTerm[], range: EffectiveRange, { heightM, u }: Place): number {
  let found = Number.NEGATIVE_INFINITY;
  for (const term of terms) {
    if (heightM < term.fromM || heightM >= term.toM) continue;
    const next = term.logFactor + logPower(term.exponent, range, u);
    found = found === Number.NEGATIVE_INFINITY ? next : logSumExp([found, next]);
  }
  return found;
}

/** exponent ln(A / (u - b)); u may lie below M where a find may be out of place. */
function logPower(exponent: number, { base, last }: EffectiveRange, u: number): number {
  return exponent === 0 ? 0 : -exponent * log1p((u - last) / (last - base));
}

/** A stretch of heights over which recovery is constant, or not. */
interface AreaPiece {
  readonly topM: number;
  readonly isConstant: boolean;
}

function areaPieces(coordinate: Coordinate): readonly AreaPiece[] {
  const knots = coordinateKnots(coordinate).toSorted((a, b) => a - b);
  const pieces = knots.map((topM, i) => ({
    topM,
    isConstant: i === 0 || isStraight(coordinate, knots[i - 1], topM),
  }));
  return [...pieces, { topM: Number.POSITIVE_INFINITY, isConstant: true }];
}

function isStraight({ toEffective }: Coordinate, lowM: number, highM: number): boolean {
  const middle = 0.5 * (toEffective(lowM) + toEffective(highM));
  return Math.abs(toEffective(0.5 * (lowM + highM)) - middle) <= 1e-12 * Math.max(1, Math.abs(middle));
}

type Area = (lowM: number, highM: number) => number;

/** The integral of one term between heights within its reach, piece by piece of recovery. */
function termArea(term: PowerTerm, range: EffectiveRange, coordinate: Coordinate): Area {
  const pieces = areaPieces(coordinate);
  const constant = constantArea(term, range, coordinate);
  const curved = curvedArea(term, range, coordinate);
  if (pieces.length === 1) return constant;
  return (lowM, highM) => {
    let sum = 0;
    let fromM = lowM;
    for (const { topM, isConstant } of pieces) {
      if (topM <= fromM) continue;
      const toM = Math.min(topM, highM);
      sum += isConstant ? constant(fromM, toM) : curved(fromM, toM);
      if (topM >= highM) break;
      fromM = topM;
    }
    return sum;
  };
}

/**
 * Constant recovery r: (1/r) (A / (e - 1)) ((A / s0)^(e - 1) - (A / s1)^(e - 1)), for e = 1 (A / r) ln(s1 / s0), and
 * the length times (A / s0)^e where r = 0.
 */
function constantArea(term: PowerTerm, range: EffectiveRange, coordinate: Coordinate): Area {
  const { exponent, logFactor } = term;
  const curved = curvedArea(term, range, coordinate);
  return (lowM, highM) => {
    const u0 = coordinate.toEffective(lowM);
    const rise = coordinate.toEffective(highM) - u0;
    const s0 = u0 - range.base;
    if (exponent !== 0 && !(s0 > 0)) return curved(lowM, highM);
    const start = exp(logFactor + logPower(exponent, range, u0));
    if (exponent === 0 || !(rise > 0)) return (highM - lowM) * start;
    const growth = log1p(rise / s0);
    const inner = exponent === 1 ? growth : -expm1(-(exponent - 1) * growth) / (exponent - 1);
    return ((highM - lowM) * start * s0 * inner) / rise;
  };
}

/** Recovery that changes along the piece. */
function curvedArea(term: PowerTerm, range: EffectiveRange, coordinate: Coordinate): Area {
  const { nodes, weights } = gaussLegendre(8);
  return (lowM, highM) => {
    const half = 0.5 * (highM - lowM);
    let sum = 0;
    for (let i = 0; i < nodes.length; i++) {
      const u = coordinate.toEffective(lowM + half * (1 + nodes[i]));
      sum += weights[i] * exp(term.logFactor + logPower(term.exponent, range, u));
    }
    return half * sum;
  };
}

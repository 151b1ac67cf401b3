import { logChoose } from "../../numeric/binomial.ts";
import { exp } from "../../numeric/elementary.ts";
import { median } from "../../numeric/sums.ts";

export interface GapRuns {
  /** Runs of successive gaps all longer or all shorter than the median. */
  readonly runs: number;
  readonly longer: number;
  readonly shorter: number;
  /** One-sided, for few runs: stretches of dense and of sparse finds. */
  readonly p: number;
}

/** Gaps this near to the median, relative to it, equal it and are dropped. */
const SAME_GAP = 1e-9;

/**
 * Runs of gaps above and below their median, gaps equal to it dropped: exact P(R <= r) given how many lie on each side.
 * Few runs mean that dense and sparse stretches alternate, whichever way they go.
 *
 * Undefined where no gap is longer, or none shorter, than the median.
 * Source: A. Wald & J. Wolfowitz 1940, Annals of Mathematical Statistics 11:147-162, doi 10.1214/aoms/1177731909.
 */
export function gapRuns(gaps: readonly number[]): GapRuns | undefined {
  if (gaps.length < 2) return undefined;
  const middle = median(gaps);
  const sides = gaps.filter((gap) => Math.abs(gap - middle) > SAME_GAP * middle).map((gap) => gap > middle);
  const longer = sides.filter(Boolean).length;
  const shorter = sides.length - longer;
  if (longer === 0 || shorter === 0) return undefined;
  const runs = 1 + sides.filter((side, i) => i > 0 && side !== sides[i - 1]).length;
  let p = 0;
  for (let r = 2; r <= runs; r++) p += chanceOfRuns(r, longer, shorter);
  return { runs, longer, shorter, p: Math.min(1, p) };
}

function chanceOfRuns(runs: number, a: number, b: number): number {
  const half = Math.floor(runs / 2);
  const all = logChoose(a + b, a);
  const ways = (i: number, j: number) =>
    i > a || j > b ? 0 : exp(logChoose(a - 1, i - 1) + logChoose(b - 1, j - 1) - all);
  return runs % 2 === 0 ? 2 * ways(half, half) : ways(half + 1, half) + ways(half, half + 1);
}

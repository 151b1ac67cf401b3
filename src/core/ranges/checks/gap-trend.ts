import { normalCdf } from "../../numeric/normal.ts";
import { midranks, rankCorrelation } from "../../numeric/ranks.ts";

export interface GapTrend {
  /** Kendall's tau-b of gap length against order; above 0: gaps lengthen upward, recovery declines. */
  readonly tau: number;
  /** Spearman's rho of the same. */
  readonly rho: number;
  /** One-sided, for gaps that lengthen upward, from tau. */
  readonly p: number;
  readonly gaps: number;
}

/** Up to this number of gaps p is exact; beyond it normal with the exact variance. */
const EXACT_UP_TO = 80;

/**
 * Do the gaps between a taxon's finds lengthen upward? Kendall's tau-b and Spearman's rho of gap length against order.
 * Given its first and last find the gaps are exchangeable where recovery is constant, so every order of them has the
 * same chance; p is that share of orders with a tau at least as large. It is exact with equal gaps too: the inversions of a
 * random order of a multiset are independent sums of the Mann-Whitney counts of its groups of equals.
 *
 * Undefined with fewer than two gaps, or all equal.
 * Source: M. G. Kendall 1938, Biometrika 30:81-93, doi 10.1093/biomet/30.1-2.81.
 */
export function gapTrend(gaps: readonly number[]): GapTrend | undefined {
  const n = gaps.length;
  const ranks = midranks(gaps);
  const rho = rankCorrelation(ranks, midranks([...gaps.keys()]));
  if (n < 2 || rho === undefined) return undefined;
  let inversions = 0;
  for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) if (ranks[i] > ranks[j]) inversions++;
  const groups = groupSizes(ranks);
  const pairs = (n * (n - 1)) / 2;
  const untied = pairs - groups.reduce((sum, t) => sum + (t * (t - 1)) / 2, 0);
  const tau = (untied - 2 * inversions) / Math.sqrt(pairs * untied);
  const p =
    n <= EXACT_UP_TO
      ? exactLowerTail(groups, inversions)
      : normalCdf((inversions + 0.5 - untied / 2) / Math.sqrt(inversionVariance(groups, n)));
  return { tau, rho, p, gaps: n };
}

function groupSizes(ranks: Float64Array): number[] {
  const sizes = new Map<number, number>();
  for (const rank of ranks) sizes.set(rank, (sizes.get(rank) ?? 0) + 1);
  return [...sizes.values()];
}

/** P(inversions <= observed) over all orders of the multiset. */
function exactLowerTail(groups: readonly number[], observed: number): number {
  let placed = 0;
  let chances = Float64Array.of(1);
  for (const size of groups.toSorted((a, b) => b - a)) {
    if (placed > 0)
      chances = size === 1 ? oneMore(chances, placed) : convolve(chances, mannWhitney(size, placed));
    placed += size;
  }
  let sum = 0;
  for (let i = 0; i <= Math.min(observed, chances.length - 1); i++) sum += chances[i];
  return Math.min(1, sum);
}

/** One more value among those placed is out of order with 0 to all of them, each as likely. */
function oneMore(chances: Float64Array, placed: number): Float64Array<ArrayBuffer> {
  const next = new Float64Array(chances.length + placed);
  for (let i = 0, sum = 0; i < next.length; i++) {
    if (i < chances.length) sum += chances[i];
    if (i > placed) sum -= chances[i - placed - 1];
    next[i] = sum / (placed + 1);
  }
  return next;
}

function convolve(a: Float64Array, b: Float64Array): Float64Array<ArrayBuffer> {
  const product = new Float64Array(a.length + b.length - 1);
  for (let i = 0; i < a.length; i++) for (let j = 0; j < b.length; j++) product[i + j] += a[i] * b[j];
  return product;
}

/** Chances of each number of pairs out of order between m and n distinct values in random order. */
function mannWhitney(m: number, n: number): Float64Array {
  let below = Array.from({ length: n + 1 }, () => Float64Array.of(1));
  for (let i = 1; i <= m; i++) {
    const row = [Float64Array.of(1)];
    for (let j = 1; j <= n; j++) {
      const chances = new Float64Array(i * j + 1);
      // The highest of all i + j values is one of the i (it stands above j others) or one of the j.
      below[j].forEach((chance, u) => {
        chances[u + j] += (i / (i + j)) * chance;
      });
      row[j - 1].forEach((chance, u) => {
        chances[u] += (j / (i + j)) * chance;
      });
      row.push(chances);
    }
    below = row;
  }
  return below[n];
}

const varianceTerm = (t: number) => t * (t - 1) * (2 * t + 5);

function inversionVariance(groups: readonly number[], n: number): number {
  return (varianceTerm(n) - groups.reduce((sum, t) => sum + varianceTerm(t), 0)) / 72;
}

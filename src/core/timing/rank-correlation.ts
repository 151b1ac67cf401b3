import { midranks, rankCorrelation } from "../numeric/ranks.ts";
import { forEachReplicate } from "../numeric/streams.ts";
import { type Simulation, shareError } from "./pulses-bootstrap.ts";

export interface RarityTest {
  readonly rho: number;
  /** One-sided: P(rho >= observed). */
  readonly p: number;
  /** Absent where p is exact. */
  readonly mcError?: number;
}

/** Up to this number of taxa every permutation is counted. */
const EXACT_UP_TO = 9;
/** Sums of products of ranks closer than this are equal. */
const SAME_SUM = 1e-9;

/**
 * Do rarer taxa disappear lower? Spearman's rho, with midranks, of a measure of abundance and the last find; one-sided p
 * for rho as large as observed, exact for nine taxa or fewer, else from seeded permutations, (1 + reached) / (1 + N).
 *
 * With one common end and constant recovery rarer taxa seem to end earlier, so that a large rho favours one end seen through
 * sampling; it is no test of one level by itself. Undefined with fewer than three taxa, or all alike in one variable.
 * Source: C. Spearman 1904, American Journal of Psychology 15:72-101, doi 10.2307/1412159.
 */
export function rarityTest(
  abundance: readonly number[],
  lasts: readonly number[],
  simulation: Simulation,
): RarityTest | undefined {
  if (abundance.length < 3) return undefined;
  const a = midranks(abundance);
  const b = midranks(lasts);
  const rho = rankCorrelation(a, b);
  if (rho === undefined) return undefined;
  const limit = productSum(a, b) - SAME_SUM;
  if (a.length <= EXACT_UP_TO) return { rho, p: shareOfOrders(a, b, limit) };
  let reached = 0;
  const shuffled = Float64Array.from(b);
  forEachReplicate(
    simulation.replicates,
    { seed: simulation.seed, stream: "permutation" },
    (_, generator) => {
      for (let i = shuffled.length - 1; i > 0; i--) {
        const j = generator.integer(i + 1);
        [shuffled[i], shuffled[j]] = [shuffled[j], shuffled[i]];
      }
      if (productSum(a, shuffled) >= limit) reached++;
    },
  );
  const p = (1 + reached) / (1 + simulation.replicates);
  return { rho, p, mcError: shareError(reached, simulation.replicates) };
}

function productSum(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

/** Share of all orders of b whose sum of products reaches the limit: each order differs from the one before by one exchange. */
function shareOfOrders(a: Float64Array, b: Float64Array, limit: number): number {
  const k = a.length;
  const order = Float64Array.from(b);
  const turns = new Int32Array(k);
  let sum = productSum(a, order);
  let reached = sum >= limit ? 1 : 0;
  let orders = 1;
  for (let i = 1; i < k; ) {
    if (turns[i] >= i) {
      turns[i++] = 0;
      continue;
    }
    const j = i % 2 === 0 ? 0 : turns[i];
    sum += (a[i] - a[j]) * (order[j] - order[i]);
    [order[i], order[j]] = [order[j], order[i]];
    orders++;
    if (sum >= limit) reached++;
    turns[i]++;
    i = 1;
  }
  return reached / orders;
}

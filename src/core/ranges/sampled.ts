/** What the sampled horizons say about one taxon's end. */
export interface SampledCount {
  /** N': sampled horizons of the range that carry information. */
  readonly inRange: number;
  /** n': those of them with the taxon. */
  readonly finds: number;
  /** M_b: barren sampled horizons above the highest find. */
  readonly barrenAbove: number;
}

/** p within this relative distance of alpha is settled in exact integers. */
const AMBIGUOUS = 1e-9;

/**
 * Counts a presence list, from below upward, of all sampled horizons from the working base.
 *
 * `first`: N' and n' leave out the lowest find; horizons below it do not count. `base`: every sampled horizon from the
 * known base to the highest find counts, barren ones below the lowest find included. Undefined without a find.
 */
export function countSampled(presence: readonly boolean[], mode: "first" | "base"): SampledCount | undefined {
  const first = presence.indexOf(true);
  if (first < 0) return undefined;
  const last = presence.lastIndexOf(true);
  const finds = presence.reduce((count, isFound) => count + (isFound ? 1 : 0), 0);
  const barrenAbove = presence.length - 1 - last;
  return mode === "first"
    ? { inRange: last - first, finds: finds - 1, barrenAbove }
    : { inRange: last + 1, finds, barrenAbove };
}

/**
 * p(j) for j = 0..M_b: the chance, given n' finds, that j further sampled horizons inside the true range would all be
 * barren: C(N', n') / C(N' + j, n').
 *
 * Assumes the same detection at every sampled horizon of the range; nothing between horizons is assumed. O(M_b).
 * After R. E. Weiss & C. R. Marshall 1999, Mathematical Geology 31:435-453.
 */
export function barrenChances({ inRange, finds, barrenAbove }: SampledCount): Float64Array {
  const chances = new Float64Array(barrenAbove + 1).fill(1);
  for (let j = 1; j <= barrenAbove; j++)
    chances[j] = (chances[j - 1] * (inRange + j - finds)) / (inRange + j);
  return chances;
}

/**
 * J_C = the largest j up to M_b with p(j) > 1 - C: how many barren horizons above the last find may still lie inside
 * the true range. Exact and conservative. Where p(j) meets 1 - C to a part in 10^9, exact integers decide, 1 - C taken
 * from the decimal digits of C. Equal to M_b: the end may lie above all sampled horizons.
 *
 * After R. E. Weiss & C. R. Marshall 1999, Mathematical Geology 31:435-453.
 */
export function furthestBarren(count: SampledCount, confidence: number): number {
  const { inRange, finds, barrenAbove } = count;
  if (finds === 0) return barrenAbove;
  const alpha = 1 - confidence;
  let p = 1;
  let j = 0;
  while (j < barrenAbove) {
    p = (p * (inRange + j + 1 - finds)) / (inRange + j + 1);
    const isRejected =
      Math.abs(p / alpha - 1) < AMBIGUOUS ? isAtMostExact(count, j + 1, confidence) : p <= alpha;
    if (isRejected) return j;
    j++;
  }
  return j;
}

/** p(j) <= 1 - C in exact integers: C(N', n') d <= a C(N' + j, n') with 1 - C = a / d. */
function isAtMostExact({ inRange, finds }: SampledCount, j: number, confidence: number): boolean {
  const { numerator, denominator } = decimalFraction(confidence);
  const alpha = denominator - numerator;
  return binomial(inRange, finds) * denominator <= alpha * binomial(inRange + j, finds);
}

/** The decimal digits of a number in (0, 1), as they are written shortest, as a fraction. */
function decimalFraction(value: number): { numerator: bigint; denominator: bigint } {
  const [digits, exponent = "0"] = value.toString().split("e");
  const [whole, part = ""] = digits.split(".");
  const scale = part.length - Number(exponent);
  return { numerator: BigInt(whole + part), denominator: 10n ** BigInt(scale) };
}

function binomial(n: number, k: number): bigint {
  const few = Math.min(k, n - k);
  let result = 1n;
  for (let i = 1; i <= few; i++) result = (result * BigInt(n - few + i)) / BigInt(i);
  return result;
}

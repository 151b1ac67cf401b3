/** One measured value of the product-limit table of left-censored data. */
export interface ProductLimitStep {
  readonly value: number;
  /** Observations whose value or limit is at or below this value. */
  readonly atRisk: number;
  readonly detects: number;
  /** P(X <= value) and P(X < value). */
  readonly atOrBelow: number;
  readonly below: number;
}

/**
 * Product-limit estimate of the distribution of left-censored values, from the largest downward: at value v,
 * `F(v) = S`, then `S <- S (1 - d_v/n_v) = F(v-)`; a cell "<v" counts as below a detect at v.
 * Kaplan & Meier 1958, J. Am. Stat. Assoc. 53:457-481, doi:10.1080/01621459.1958.10501452, on flipped data as in
 * Helsel 2012 (Statistics for Censored Environmental Data, Wiley).
 */
export function productLimit(
  values: readonly number[],
  isCensored: readonly boolean[],
): readonly ProductLimitStep[] {
  const distinct = [...new Set(values.filter((_, i) => !isCensored[i]))].toSorted((a, b) => b - a);
  let share = 1;
  return distinct.map((value) => {
    const atRisk = values.filter((v) => v <= value).length;
    const detects = values.filter((v, i) => !isCensored[i] && v === value).length;
    const atOrBelow = share;
    share *= 1 - detects / atRisk;
    return { value, atRisk, detects, atOrBelow, below: share };
  });
}

/** Smallest measured value v with F(v) >= p; undefined where p lies in the mass left below the smallest detect. */
export function productLimitQuantile(steps: readonly ProductLimitStep[], p: number): number | undefined {
  const rounding = 1e-12;
  const lowest = steps[steps.length - 1];
  if (lowest === undefined || p <= lowest.below + rounding) return undefined;
  for (let i = steps.length - 1; i >= 0; i--) if (steps[i].atOrBelow >= p - rounding) return steps[i].value;
  return undefined;
}

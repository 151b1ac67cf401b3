/** Values closer than this, relative to the largest, are equal: decimals differ in their last bits. */
const SAME = 1e-9;

/** Ranks from 1, equal values sharing their mean rank. */
export function midranks(values: readonly number[]): Float64Array {
  const order = [...values.keys()].toSorted((a, b) => values[a] - values[b]);
  const tolerance = SAME * Math.max(0, ...values.map(Math.abs));
  const ranks = new Float64Array(values.length);
  for (let start = 0; start < order.length; ) {
    let end = start + 1;
    while (end < order.length && values[order[end]] - values[order[end - 1]] <= tolerance) end++;
    for (let i = start; i < end; i++) ranks[order[i]] = 0.5 * (start + 1 + end);
    start = end;
  }
  return ranks;
}

/** Spearman's rho of two sets of ranks; undefined where all of one are equal. */
export function rankCorrelation(a: Float64Array, b: Float64Array): number | undefined {
  const middle = 0.5 * (a.length + 1);
  let [ab, aa, bb] = [0, 0, 0];
  for (let i = 0; i < a.length; i++) {
    const x = a[i] - middle;
    const y = b[i] - middle;
    ab += x * y;
    aa += x * x;
    bb += y * y;
  }
  return aa === 0 || bb === 0 ? undefined : ab / Math.sqrt(aa * bb);
}

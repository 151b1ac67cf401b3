import { exp } from "../../numeric/elementary.ts";
import { simplexRule } from "./simplex-rule.ts";

/** Sums over the allocations of taxa to two levels that leave neither empty. */
export interface TwoShares {
  /** Relative to the better level for every taxon; `equal` is 2^-k times the sum. */
  readonly weigh: (lower: Float64Array, upper: Float64Array) => { dirichlet: number; equal: number };
  /** `dirichlet` of the pair weighed last. */
  readonly last: () => number;
  /** Adds to each taxon its share in the lower level of the pair weighed last, times a scale. */
  readonly addMembership: (sums: Float64Array, scale: number) => void;
}

/**
 * With A_i, C_i the likelihoods at the lower and the upper level: the integral over omega in (0, 1) of
 * prod (omega A_i + (1 - omega) C_i), less the allocations with one level empty, (prod A_i + prod C_i) / (k + 1).
 */
export function twoShares(k: number): TwoShares {
  const { shares, weights } = simplexRule(2, k);
  const size = weights.length;
  const alone = powersOfUpperShare(shares, k);
  const a = new Float64Array(k);
  const c = new Float64Array(k);
  const both = new Int32Array(k);
  const upperOf = new Float64Array(k);
  const difference = new Float64Array(k);
  const products = new Float64Array(size);
  let shared = 0;
  let allLower = 0;
  let last = 0;
  const weigh = (lower: Float64Array, upper: Float64Array) => {
    let allUpper = 1;
    let mixed = 1;
    shared = 0;
    allLower = 1;
    for (let i = 0; i < k; i++) {
      const better = Math.max(lower[i], upper[i]);
      a[i] = lower[i] === better ? 1 : exp(lower[i] - better);
      c[i] = upper[i] === better ? 1 : exp(upper[i] - better);
      allLower *= a[i];
      allUpper *= c[i];
      mixed *= 0.5 * (a[i] + c[i]);
      if (a[i] === 0) continue;
      difference[shared] = a[i] - c[i];
      upperOf[shared] = c[i];
      both[shared++] = i;
    }
    let sum = 0;
    for (let q = 0; q < size; q++) {
      const share = shares[2 * q];
      let product = alone[q * (k + 1) + k - shared];
      for (let j = 0; j < shared; j++) product *= upperOf[j] + share * difference[j];
      products[q] = weights[q] * product;
      sum += products[q];
    }
    last = Math.max(0, sum - (allLower + allUpper) / (k + 1));
    return { dirichlet: last, equal: Math.max(0, mixed - 2 ** -k * (allLower + allUpper)) };
  };
  const addMembership = (sums: Float64Array, scale: number) => {
    for (let j = 0; j < shared; j++) {
      const i = both[j];
      let sum = 0;
      for (let q = 0; q < size; q++) {
        const part = shares[2 * q] * a[i];
        sum += (products[q] * part) / (part + shares[2 * q + 1] * c[i]);
      }
      sums[i] += scale * (sum - allLower / (k + 1));
    }
  };
  return { weigh, last: () => last, addMembership };
}

/** (1 - omega)^n at every node, for the taxa that can only have ended at the upper level. */
function powersOfUpperShare(shares: Float64Array, k: number): Float64Array {
  const size = shares.length / 2;
  const powers = new Float64Array(size * (k + 1)).fill(1);
  for (let q = 0; q < size; q++)
    for (let n = 1; n <= k; n++) powers[q * (k + 1) + n] = powers[q * (k + 1) + n - 1] * shares[2 * q + 1];
  return powers;
}

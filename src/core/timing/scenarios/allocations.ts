import { exp } from "../../numeric/elementary.ts";
import { equalShares, type SimplexRule, simplexRule } from "./simplex-rule.ts";

/** Sums over allocations of taxa to levels, relative to the best level for every taxon: `bound` is ln of that best. */
export interface AllocationSum {
  readonly bound: number;
  /** E over flat Dirichlet shares of prod_i sum_g omega_g L_i(tau_g): levels without a taxon allowed. */
  readonly dirichlet: number;
  /** The same with equal shares. */
  readonly equal: number;
}

/** ln of the best that any allocation gives: an upper bound of both sums. */
export function allocationBound(rows: readonly Float64Array[]): number {
  let sum = 0;
  for (let i = 0; i < rows[0].length; i++) {
    let better = rows[0][i];
    for (let g = 1; g < rows.length; g++) better = Math.max(better, rows[g][i]);
    sum += better;
  }
  return sum;
}

/** Makes the sum for a number of levels; `rows` are ln L of every taxon at each level, one row a level. */
export function allocationSum(pulses: number, k: number): (rows: readonly Float64Array[]) => AllocationSum {
  const { shares, weights } = simplexRule(pulses, k, COARSE);
  const factors = new Float64Array(k * pulses);
  return (rows) => {
    const bound = scaleRows(rows, factors);
    let equal = 1;
    for (let i = 0; i < k; i++) equal *= meanOf(factors, i * pulses, pulses);
    let dirichlet = 0;
    for (let q = 0; q < weights.length; q++) {
      let product = weights[q];
      for (let i = 0; i < k; i++) {
        let factor = 0;
        for (let g = 0; g < pulses; g++) factor += shares[q * pulses + g] * factors[i * pulses + g];
        product *= factor;
      }
      dirichlet += product;
    }
    return { bound, dirichlet, equal };
  };
}

/** Nodes of shares per root of the number of taxa, where sums need no more than five digits. */
const COARSE = 2;

function scaleRows(rows: readonly Float64Array[], factors: Float64Array): number {
  const pulses = rows.length;
  let bound = 0;
  for (let i = 0; i < rows[0].length; i++) {
    let better = rows[0][i];
    for (let g = 1; g < pulses; g++) better = Math.max(better, rows[g][i]);
    for (let g = 0; g < pulses; g++)
      factors[i * pulses + g] = rows[g][i] === better ? 1 : exp(rows[g][i] - better);
    bound += better;
  }
  if (bound === Number.NEGATIVE_INFINITY) factors.fill(0);
  return bound;
}

function meanOf(values: Float64Array, first: number, count: number): number {
  let sum = 0;
  for (let g = 0; g < count; g++) sum += values[first + g];
  return sum / count;
}

/** How taxa fall to levels where no level stays empty, relative to the bound. */
export interface OccupiedSum {
  readonly bound: number;
  /** E over flat Dirichlet shares of the sum over allocations that leave no level empty. */
  readonly dirichlet: number;
  /** The same with equal shares. */
  readonly equal: number;
}

/** By inclusion and exclusion over the levels that stay empty. */
export function occupiedSum(pulses: number, k: number): (rows: readonly Float64Array[]) => OccupiedSum {
  const rule = simplexRule(pulses, k, COARSE);
  const factors = new Float64Array(k * pulses);
  return (rows) => {
    const bound = scaleRows(rows, factors);
    const signed = { factors, k };
    return {
      bound,
      dirichlet: Math.max(0, signedSum(signed, rule)),
      equal: Math.max(0, signedSum(signed, equalShares(pulses))),
    };
  };
}

interface Signed {
  readonly factors: Float64Array;
  readonly k: number;
  /** Gathers the same sums with taxon i at level g alone, at g k + i. */
  readonly members?: Float64Array;
}

function signedSum({ factors, k, members }: Signed, { pulses, shares, weights }: SimplexRule): number {
  let sum = 0;
  const parts = new Float64Array(k);
  const own = new Float64Array(pulses);
  for (let q = 0; q < weights.length; q++)
    for (let levels = 1; levels < 1 << pulses; levels++) {
      for (let g = 0; g < pulses; g++) own[g] = (levels & (1 << g)) === 0 ? 0 : shares[q * pulses + g];
      let product = weights[q] * signOf(levels, pulses);
      for (let i = 0; i < k && product !== 0; i++) {
        let part = 0;
        for (let g = 0; g < pulses; g++) part += own[g] * factors[i * pulses + g];
        parts[i] = part;
        product *= part;
      }
      sum += product;
      if (members === undefined || product === 0) continue;
      for (let i = 0; i < k; i++) {
        const per = product / parts[i];
        for (let g = 0; g < pulses; g++) members[g * k + i] += per * own[g] * factors[i * pulses + g];
      }
    }
  return sum;
}

/** Chance that taxon i is at level g, given these levels, all occupied: at g k + i. Absent where none can be. */
export function membershipAt(rows: readonly Float64Array[]): Float64Array | undefined {
  const [pulses, k] = [rows.length, rows[0].length];
  const factors = new Float64Array(k * pulses);
  scaleRows(rows, factors);
  const members = new Float64Array(k * pulses);
  const sum = signedSum({ factors, k, members }, simplexRule(pulses, k, COARSE));
  return sum > 0 ? members.map((x) => x / sum) : undefined;
}

function signOf(levels: number, pulses: number): number {
  let sign = pulses % 2 === 0 ? 1 : -1;
  for (let rest = levels; rest !== 0; rest &= rest - 1) sign = -sign;
  return sign;
}

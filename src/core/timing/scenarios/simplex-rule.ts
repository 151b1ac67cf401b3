import { gaussLegendre } from "../../numeric/gauss-legendre.ts";

/** Nodes of shares that add to 1 (node by node, one share a pulse) and weights that add to 1. */
export interface SimplexRule {
  readonly pulses: number;
  readonly shares: Float64Array;
  readonly weights: Float64Array;
}

/** Nodes along one direction are at most this many times the root of the number of taxa. */
const NODES_PER_ROOT = 2.8;

/**
 * Quadrature over shares with a flat Dirichlet law: E of a polynomial in the shares of a degree equal to the number of
 * taxa. Gauss-Legendre in sticks broken from the whole, share g a part x_g of what is left; exact up to about 25 taxa,
 * beyond within 1e-6 of a peak as wide as binomial shares are.
 */
export function simplexRule(pulses: number, taxa: number, perRoot = NODES_PER_ROOT): SimplexRule {
  const exact = Math.ceil((taxa + pulses - 1) / 2);
  const count = Math.max(2, Math.min(exact, pulses === 2 ? exact : Math.ceil(perRoot * Math.sqrt(taxa))));
  const { nodes, weights } = gaussLegendre(count);
  const size = count ** (pulses - 1);
  const rule = { pulses, shares: new Float64Array(size * pulses), weights: new Float64Array(size) };
  for (let index = 0; index < size; index++) {
    let left = 1;
    let weight = 1;
    let digits = index;
    for (let g = 0; g < pulses - 1; g++) {
      const node = digits % count;
      digits = (digits - node) / count;
      const part = 0.5 * (1 + nodes[node]);
      const remaining = pulses - 2 - g;
      weight *= 0.5 * weights[node] * (remaining + 1) * power(1 - part, remaining);
      rule.shares[index * pulses + g] = left * part;
      left *= 1 - part;
    }
    rule.shares[index * pulses + pulses - 1] = left;
    rule.weights[index] = weight;
  }
  return rule;
}

function power(x: number, n: number): number {
  let product = 1;
  for (let i = 0; i < n; i++) product *= x;
  return product;
}

/** Equal shares: the variant in which every pulse takes each taxon with the same chance. */
export function equalShares(pulses: number): SimplexRule {
  return { pulses, shares: new Float64Array(pulses).fill(1 / pulses), weights: new Float64Array([1]) };
}

import { gaussLegendre } from "../numeric/gauss-legendre.ts";

/** Gauss-Legendre nodes of each panel. */
const NODES = 16;

/** Nodes of all panels between successive edges, from below upward, with their weights. */
export function panelNodes(edges: readonly number[]) {
  const rule = gaussLegendre(NODES);
  const at = new Float64Array((edges.length - 1) * NODES);
  const weights = new Float64Array(at.length);
  for (let panel = 0; panel + 1 < edges.length; panel++) {
    const half = (edges[panel + 1] - edges[panel]) / 2;
    for (let i = 0; i < NODES; i++) {
      at[panel * NODES + i] = edges[panel] + half * (1 + rule.nodes[i]);
      weights[panel * NODES + i] = half * rule.weights[i];
    }
  }
  return { at, weights };
}

/** f(x) = integrand(x, s(x)), s smooth and costly, known at the nodes of `panelNodes`. */
export interface PanelFunction {
  readonly smooth: readonly number[];
  readonly integrand: (x: number, smooth: number) => number;
}

/** The integral of f above any level up to the last edge; s is interpolated in each panel, never asked for again. */
export function integralAbove(
  edges: readonly number[],
  { smooth, integrand }: PanelFunction,
): (level: number) => number {
  const { at, weights } = panelNodes(edges);
  const sums = Array.from(edges, () => 0);
  for (let panel = edges.length - 2; panel >= 0; panel--) {
    let mass = 0;
    for (let i = panel * NODES; i < (panel + 1) * NODES; i++)
      mass += weights[i] * integrand(at[i], smooth[i]);
    sums[panel] = sums[panel + 1] + mass;
  }
  return (level) => {
    const panel = edges.findLastIndex((edge) => edge <= level);
    if (panel + 1 >= edges.length) return 0;
    if (edges[panel] === level) return sums[panel];
    const known = smooth.slice(panel * NODES, (panel + 1) * NODES);
    const half = (edges[panel + 1] - edges[panel]) / 2;
    const inside = panelNodes([level, edges[panel + 1]]);
    return inside.at.reduce(
      (sum, x, i) =>
        sum + inside.weights[i] * integrand(x, interpolated(known, (x - edges[panel]) / half - 1)),
      sums[panel + 1],
    );
  };
}

/**
 * The polynomial through the values at the nodes, by the barycentric formula, whose weights at Gauss-Legendre nodes are
 * (-1)^j sqrt((1 - x_j^2) w_j). J.-P. Berrut & L. N. Trefethen 2004, SIAM Review 46:501-517,
 * doi 10.1137/S0036144502417715.
 */
function interpolated(values: readonly number[], at: number): number {
  const { nodes, weights } = gaussLegendre(NODES);
  let above = 0;
  let below = 0;
  for (let j = 0; j < NODES; j++) {
    if (at === nodes[j]) return values[j];
    const share = Math.sqrt((1 - nodes[j] * nodes[j]) * weights[j]) / (at - nodes[j]);
    above += j % 2 === 0 ? share * values[j] : -share * values[j];
    below += j % 2 === 0 ? share : -share;
  }
  return above / below;
}

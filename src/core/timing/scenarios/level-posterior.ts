import { findRoot } from "../../numeric/roots.ts";
import type { EndGrid, Panel } from "./end-grid.ts";

/** Posterior of one height: its distribution function, quantiles and density. */
export interface LevelPosterior {
  /** Heights between which the density is smooth, from below upward. */
  readonly edgesM: readonly number[];
  readonly meanM: number;
  /** P(height <= h). */
  readonly cdf: (heightM: number) => number;
  readonly quantile: (p: number) => number;
  /** Density per metre; 0 outside the edges. */
  readonly density: (heightM: number) => number;
}

/** Collects mass at heights and makes the posterior of it. */
export interface PosteriorBuilder {
  readonly add: (panel: number, heightM: number, mass: number) => void;
  readonly build: () => LevelPosterior;
}

/**
 * Mass at quadrature nodes as a density: within a panel the Legendre series whose coefficients are the moments of the
 * mass there, (2 l + 1) / 2 sum m P_l(z), up to the number of the panel's nodes. Exact where the density is a polynomial
 * that the nodes integrate.
 */
export function posteriorBuilder({ panels }: Pick<EndGrid, "panels">): PosteriorBuilder {
  const moments = panels.map(({ count }) => new Float64Array(count));
  let total = 0;
  let first = 0;
  const add = (panel: number, heightM: number, mass: number) => {
    const z = placeIn(panels[panel], heightM);
    const sums = moments[panel];
    let before = 0;
    let value = 1;
    for (let l = 0; l < sums.length; l++) {
      sums[l] += mass * value;
      [before, value] = [value, ((2 * l + 1) * z * value - l * before) / (l + 1)];
    }
    total += mass;
    first += mass * heightM;
  };
  return { add, build: () => posteriorOf(panels, moments, { total, meanM: first / total }) };
}

function posteriorOf(
  panels: readonly Panel[],
  moments: readonly Float64Array[],
  { total, meanM }: { readonly total: number; readonly meanM: number },
): LevelPosterior {
  const below = [0];
  for (const sums of moments) below.push(below[below.length - 1] + sums[0] / total);
  const edgesM = [panels[0].lowM, ...panels.map((panel) => panel.highM)];
  const panelAt = (heightM: number) => lastAtOrBelow(edgesM, heightM, panels.length - 1);
  const within = (panel: number, heightM: number) =>
    below[panel] + massBelow(moments[panel], placeIn(panels[panel], heightM)) / total;
  const cdf = (heightM: number) => {
    if (heightM <= edgesM[0]) return 0;
    if (heightM >= edgesM[panels.length]) return 1;
    return Math.min(1, Math.max(0, within(panelAt(heightM), heightM)));
  };
  const quantile = (p: number) => {
    const target = Math.min(p, below[panels.length]);
    const panel = lastAtOrBelow(below, target, panels.length - 1);
    const { lowM, highM } = panels[panel];
    const excess = (heightM: number) => within(panel, heightM) - target;
    if (excess(lowM) >= 0) return lowM;
    return excess(highM) <= 0 ? highM : findRoot(excess, lowM, highM);
  };
  const density = (heightM: number) => {
    if (heightM < edgesM[0] || heightM > edgesM[panels.length]) return 0;
    const panel = panelAt(heightM);
    return Math.max(0, series(moments[panel], panels[panel], heightM) / total);
  };
  return { edgesM, meanM, cdf, quantile, density };
}

/** Place in a panel, -1 at its base and 1 at its top. */
const placeIn = ({ lowM, highM }: Panel, heightM: number) => (2 * (heightM - lowM)) / (highM - lowM) - 1;

/** The integral of P_l from -1 to z is (P_(l + 1)(z) - P_(l - 1)(z)) / (2 l + 1). */
function massBelow(sums: Float64Array, z: number): number {
  let mass = 0.5 * sums[0] * (z + 1);
  let before = 1;
  let value = z;
  for (let l = 1; l < sums.length; l++) {
    const next = ((2 * l + 1) * z * value - l * before) / (l + 1);
    mass += 0.5 * sums[l] * (next - before);
    [before, value] = [value, next];
  }
  return mass;
}

function series(sums: Float64Array, panel: Panel, heightM: number): number {
  const z = placeIn(panel, heightM);
  let before = 0;
  let value = 1;
  let sum = 0;
  for (let l = 0; l < sums.length; l++) {
    sum += (l + 0.5) * sums[l] * value;
    [before, value] = [value, ((2 * l + 1) * z * value - l * before) / (l + 1)];
  }
  return (2 * sum) / (panel.highM - panel.lowM);
}

function lastAtOrBelow(sorted: readonly number[], value: number, highest: number): number {
  let low = 0;
  let high = highest;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if (sorted[middle] <= value) low = middle;
    else high = middle - 1;
  }
  return low;
}

import type { Basis } from "../basis.ts";

/** One sample of the window, lengths in cm, concentrations in ng/g. A point has equal base and top. */
export interface FluenceCell {
  readonly baseCm: number;
  readonly topCm: number;
  /** C; for a cell below detection the expected value there, given the background. */
  readonly value: number;
  readonly sigma: number;
  /** The detection limit, where the cell lies below it. */
  readonly limit?: number;
  readonly density: number;
  /** Independent from cell to cell, and common to all cells, g/cm3. */
  readonly densitySigma: number;
  readonly densityCommonSigma: number;
  /** One standard deviation of the position of its edges (of the point). */
  readonly boundarySigmaCm: number;
}

export interface FluenceInput {
  /** From below upward. */
  readonly cells: readonly FluenceCell[];
  /** Mean background and its standard error, ng/g. */
  readonly background: { readonly mean: number; readonly sigma: number };
  /** Relative error of calibration, common to all excesses. */
  readonly calibration: number;
}

export interface FluenceVariance {
  readonly analytic: number;
  readonly background: number;
  readonly densityIndependent: number;
  readonly densityCommon: number;
  readonly calibration: number;
  readonly boundaries: number;
}

export interface IntegratedExcess {
  /** ng/cm2, gaps filled linearly. */
  readonly value: number;
  readonly sigma: number;
  readonly zeroFill: number;
  readonly nearestFill: number;
  /** Sampled share of the window. */
  readonly coverage: number;
  /** With every cell below detection at 0, and at its limit. */
  readonly lowCensored: number;
  readonly highCensored: number;
  readonly variance: FluenceVariance;
}

export const fluenceBasis: Basis = {
  method: "fluence",
  statement:
    "Excess over the mean background times density and thickness, summed from one sample below to one above the anomaly; slabs summed, points by the trapezoid rule, gaps filled linearly; interval by simulation of all errors.",
  assumptions: [
    "all excess is from the event; nothing was lost or gained after burial",
    "the site is representative",
    "errors of calibration, background and assumed density are common to all samples",
  ],
  sources: [],
  after: true,
};

const sameCm = 1e-7;

/**
 * Integrated excess `F = sum (C_i - B) rho_i dz_i` (ng/cm2; 1 ng/g x 1 g/cm3 x 1 cm = 1 ng/cm2), negative excesses
 * kept. Between two slabs with a gap the mean of their `E rho` times the gap is added (`zeroFill`: nothing;
 * `nearestFill`: each half from its nearer slab, the same sum); beside a point sample this is the trapezoid rule. An
 * overlap of two slabs is counted once, at the mean of both.
 *
 * First-order variance: analytical errors independent; background, calibration and common density errors shared;
 * edges shared by neighbours, so their errors cancel except where `E rho` steps.
 *
 * @throws RangeError without cells.
 */
export function integratedExcess({ cells, background, calibration }: FluenceInput): IntegratedExcess {
  if (cells.length === 0) throw new RangeError("integratedExcess: expected at least one cell, got 0");
  const widths = effectiveWidths(cells);
  const total = (values: (cell: FluenceCell) => number, width = widths) =>
    cells.reduce((sum, cell, i) => sum + (values(cell) - background.mean) * cell.density * width[i], 0);
  const value = total((cell) => cell.value);
  const variance = varianceTerms({ cells, background, calibration }, widths, value);
  const gaps = slabGaps(cells);
  const window = cells[cells.length - 1].topCm - cells[0].baseCm;
  return {
    value,
    sigma: Math.sqrt(Object.values(variance).reduce((a: number, v: number) => a + v, 0)),
    zeroFill: total((cell) => cell.value, zeroFillWidths(cells)),
    nearestFill: value,
    coverage: window > 0 ? 1 - gaps / window : 1,
    lowCensored: total((cell) => (cell.limit === undefined ? cell.value : 0)),
    highCensored: total((cell) => cell.limit ?? cell.value),
    variance,
  };
}

/** Excess carried above the highest sample by a mixing tail: `E_top L rho`. */
export function tailAbove(excessAtTop: number, lengthCm: number, density: number): number {
  return excessAtTop * lengthCm * density;
}

/** Thickness that each cell stands for: its own, and half of the space to each neighbour. */
export function effectiveWidths(cells: readonly Pick<FluenceCell, "baseCm" | "topCm">[]): readonly number[] {
  return cells.map(({ baseCm, topCm }, i) => {
    const below = i === 0 ? 0 : baseCm - cells[i - 1].topCm;
    const above = i === cells.length - 1 ? 0 : cells[i + 1].baseCm - topCm;
    return topCm - baseCm + (below + above) / 2;
  });
}

function zeroFillWidths(cells: readonly FluenceCell[]): readonly number[] {
  const whole = effectiveWidths(cells);
  return cells.map((_, i) => whole[i] - (gapAbove(cells, i - 1) + gapAbove(cells, i)) / 2);
}

function slabGaps(cells: readonly FluenceCell[]): number {
  return cells.reduce((sum, _, i) => sum + gapAbove(cells, i), 0);
}

/** Unsampled space between two slabs; the space beside a point belongs to the trapezoid rule, not to a gap. */
function gapAbove(cells: readonly FluenceCell[], i: number): number {
  if (i < 0 || i >= cells.length - 1) return 0;
  if (isPoint(cells[i]) || isPoint(cells[i + 1])) return 0;
  return Math.max(0, cells[i + 1].baseCm - cells[i].topCm);
}

function isPoint(cell: FluenceCell): boolean {
  return cell.topCm - cell.baseCm <= sameCm;
}

function varianceTerms(
  { cells, background, calibration }: FluenceInput,
  widths: readonly number[],
  value: number,
): FluenceVariance {
  const sum = (term: (cell: FluenceCell, width: number) => number) =>
    cells.reduce((total, cell, i) => total + term(cell, widths[i]), 0);
  const excess = (cell: FluenceCell) => cell.value - background.mean;
  const mass = sum((cell, width) => cell.density * width);
  const common = sum((cell, width) => excess(cell) * width * cell.densityCommonSigma);
  return {
    analytic: sum((cell, width) => (cell.density * width * cell.sigma) ** 2),
    background: (mass * background.sigma) ** 2,
    densityIndependent: sum((cell, width) => (excess(cell) * width * cell.densitySigma) ** 2),
    densityCommon: common ** 2,
    calibration: (calibration * value) ** 2,
    boundaries: boundaryVariance(
      cells,
      cells.map((cell) => excess(cell) * cell.density),
    ),
  };
}

/** `sum_b (g_b - g_{b+1})^2 sigma_b^2` over edges, g = E rho, 0 outside; an edge beside a filled gap moves half. */
function boundaryVariance(cells: readonly FluenceCell[], g: readonly number[]): number {
  let variance = 0;
  const last = cells.length - 1;
  cells.forEach((cell, i) => {
    const touchesBelow = i > 0 && Math.abs(cell.baseCm - cells[i - 1].topCm) <= sameCm;
    const touchesAbove = i < last && Math.abs(cells[i + 1].baseCm - cell.topCm) <= sameCm;
    const sigma2 = cell.boundarySigmaCm ** 2;
    const below = i === 0 ? 0 : (g[i] + g[i - 1]) / 2;
    const above = i === last ? 0 : (g[i] + g[i + 1]) / 2;
    if (isPoint(cell)) {
      variance += sigma2 * (below - above) ** 2;
      return;
    }
    if (!touchesBelow) variance += sigma2 * (g[i] - below) ** 2;
    if (touchesAbove) variance += sigma2 * (g[i] - g[i + 1]) ** 2;
    else variance += sigma2 * (g[i] - above) ** 2;
  });
  return variance;
}

import { exp, log } from "../numeric/elementary.ts";
import { logNormalCdf } from "../numeric/normal.ts";

/** One sample as the mixing models see it: lengths in cm, concentrations in ng/g, density in g/cm3. */
export interface MixingCell {
  readonly baseCm: number;
  readonly topCm: number;
  /** Measured value, or the detection limit where censored. */
  readonly value: number;
  readonly isCensored: boolean;
  /** Measurement error (one standard deviation) at that value. */
  readonly sigma: number;
  readonly density: number;
}

/** Best fluence and background for a given shape of the layer. */
export interface LinearFit {
  readonly logLikelihood: number;
  readonly fluence: number;
  readonly background: number;
}

export interface Likelihood {
  /** Cells and their standard deviations. */
  readonly cells: readonly MixingCell[];
  readonly sds: readonly number[];
  /** `response[i]` is the mean excess of cell i per unit fluence (cm2/g); it may be reused by the caller. */
  readonly fit: (response: Float64Array) => LinearFit;
}

const halfLogTwoPi = 0.9189385332046727;
const logSqrtTwoPi = halfLogTwoPi;
const maximumIterations = 60;
/** Beyond this many standard deviations under its limit a censored cell says nothing: 1 - Phi(7) is 1e-12. */
const certain = 7;

/**
 * Likelihood of `C_i = F u_i + B` with fluence F from 0 to `mostFluence` and background B: measured cells `N(C_i; model, s_i^2)`,
 * censored ones `Phi((DL - model)/s_i)`. It is concave in F and B, so for a given shape u the best pair is found
 * exactly (2 x 2 weighted least squares) or, with censored cells, by Newton's method.
 */
export function likelihoodOf(
  cells: readonly MixingCell[],
  sds: readonly number[],
  mostFluence: number,
): Likelihood {
  const measured = cells.flatMap((cell, i) => (cell.isCensored ? [] : [i]));
  const hasCensored = measured.length < cells.length;
  const constant = measured.reduce((sum, i) => sum - log(sds[i]) - halfLogTwoPi, 0);
  const columns: Columns = {
    measured: Uint32Array.from(measured),
    isCensored: Uint8Array.from(cells, (cell) => (cell.isCensored ? 1 : 0)),
    values: Float64Array.from(cells, (cell) => cell.value),
    sds: Float64Array.from(sds),
  };
  const best = (response: Float64Array, line: Line): LinearFit =>
    hasCensored
      ? newton(columns, response, { start: line, constant })
      : { ...line, logLikelihood: constant + misfit(columns, response, line) };
  const none = new Float64Array(cells.length);
  /** The best background under a fixed fluence: that of what the layer leaves over. */
  const atFluence = (fluence: number, response: Float64Array): LinearFit => {
    const values = columns.values.map((value, i) => value - fluence * response[i]);
    const left = { ...columns, values };
    const start = weightedLine(left, none);
    const { background, logLikelihood } = hasCensored
      ? newton(left, none, { start, constant })
      : { ...start, logLikelihood: constant + misfit(left, none, start) };
    return { fluence, background, logLikelihood };
  };
  let withoutLayer: LinearFit | undefined;
  const fit = (response: Float64Array): LinearFit => {
    const line = weightedLine(columns, response);
    if (line.fluence > 0 || hasCensored) {
      const fitted = best(response, { ...line, fluence: Math.max(0, line.fluence) });
      if (fitted.fluence > mostFluence) return atFluence(mostFluence, response);
      if (fitted.fluence > 0) return fitted;
    }
    withoutLayer ??= atFluence(0, none);
    return withoutLayer;
  };
  return { cells, sds, fit };
}

interface Columns {
  /** Indices of the measured cells. */
  readonly measured: Uint32Array;
  readonly isCensored: Uint8Array;
  readonly values: Float64Array;
  readonly sds: Float64Array;
}

interface Line {
  readonly fluence: number;
  readonly background: number;
}

function misfit(
  { measured, values, sds }: Columns,
  response: Float64Array,
  { fluence, background }: Line,
): number {
  let sum = 0;
  for (const i of measured) {
    const r = (values[i] - fluence * response[i] - background) / sds[i];
    sum -= 0.5 * r * r;
  }
  return sum;
}

/** Weighted least squares over the measured cells. */
function weightedLine({ measured, values, sds }: Columns, response: Float64Array): Line {
  let w = 0;
  let wu = 0;
  let wc = 0;
  for (const i of measured) {
    const weight = 1 / (sds[i] * sds[i]);
    w += weight;
    wu += weight * response[i];
    wc += weight * values[i];
  }
  if (w === 0) return { fluence: 0, background: 0 };
  const centreU = wu / w;
  const centreC = wc / w;
  let uu = 0;
  let uc = 0;
  for (const i of measured) {
    const weight = 1 / (sds[i] * sds[i]);
    const u = response[i] - centreU;
    uu += weight * u * u;
    uc += weight * u * (values[i] - centreC);
  }
  if (!(uu > 0)) return { fluence: 0, background: centreC };
  const fluence = uc / uu;
  return { fluence, background: centreC - fluence * centreU };
}

interface NewtonStart {
  readonly start: Line;
  readonly constant: number;
}

function newton(columns: Columns, response: Float64Array, { start, constant }: NewtonStart): LinearFit {
  let { fluence, background } = start;
  let state = slopes(columns, response, { fluence, background });
  for (let pass = 0; pass < maximumIterations; pass++) {
    const determinant = state.ff * state.bb - state.fb * state.fb;
    const isFlat = !(determinant > 1e-14 * state.ff * state.bb);
    const stepF = isFlat ? 0 : (state.bb * state.f - state.fb * state.b) / determinant;
    const stepB = isFlat ? state.b / state.bb : (state.ff * state.b - state.fb * state.f) / determinant;
    let share = 1;
    let next = slopes(columns, response, { fluence: fluence + stepF, background: background + stepB });
    while (next.value < state.value && share > 1e-10) {
      share /= 2;
      next = slopes(columns, response, {
        fluence: fluence + share * stepF,
        background: background + share * stepB,
      });
    }
    if (next.value <= state.value) break;
    const gain = next.value - state.value;
    fluence += share * stepF;
    background += share * stepB;
    state = next;
    if (gain < 1e-11 * (1 + Math.abs(state.value))) break;
  }
  return { fluence, background, logLikelihood: constant + state.value };
}

/** Log-likelihood (without the constant), its first derivatives, and the negative second ones. */
function slopes({ isCensored, values, sds }: Columns, response: Float64Array, { fluence, background }: Line) {
  let value = 0;
  let f = 0;
  let b = 0;
  let ff = 0;
  let fb = 0;
  let bb = 0;
  for (let i = 0; i < values.length; i++) {
    const u = response[i];
    const z = (values[i] - fluence * u - background) / sds[i];
    let slope = z / sds[i];
    let bend = 1;
    if (isCensored[i] === 1) {
      if (z > certain) continue;
      const logShare = logNormalCdf(z);
      const mills = exp(-0.5 * z * z - logSqrtTwoPi - logShare);
      value += logShare;
      slope = -mills / sds[i];
      bend = mills * (mills + z);
    } else value -= 0.5 * z * z;
    const curvature = bend / (sds[i] * sds[i]);
    f += slope * u;
    b += slope;
    ff += curvature * u * u;
    fb += curvature * u;
    bb += curvature;
  }
  return { value, f, b, ff, fb, bb: bb > 0 ? bb : Number.MIN_VALUE };
}

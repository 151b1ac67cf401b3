import { exp, log } from "./elementary.ts";
import type { Sfc64 } from "./sfc64.ts";

/** Layers of the ziggurat, the lowest holding the tail. */
export const LAYERS = 256;
/** Where the lowest layer's rectangle ends, and the area of every layer: Marsaglia & Tsang 2000, for 256 layers. */
const TAIL_FROM = 7.69711747013105;
const AREA = 0.003949659822581557;
const TWO_53 = 9007199254740992;
const TWO_MINUS_53 = 1 / TWO_53;

/** Tables of the ziggurat under e^-x; the curve's edge falls from the tail (1) to 0 (256). */
export interface Ziggurat {
  /** Right edge of each layer; of the lowest, the width of a rectangle of its area. */
  readonly edges: Float64Array;
  /** e^-edge. */
  readonly heights: Float64Array;
  /** edge / 2^53. */
  readonly widths: Float64Array;
  /** 53-bit parts below this lie inside the curve for certain. */
  readonly bounds: Float64Array;
}

function zigguratTables(): Ziggurat {
  const edges = new Float64Array(LAYERS + 1);
  edges[0] = AREA / exp(-TAIL_FROM);
  edges[1] = TAIL_FROM;
  for (let layer = 1; layer < LAYERS - 1; layer++)
    edges[layer + 1] = -log(exp(-edges[layer]) + AREA / edges[layer]);
  const bounds = new Float64Array(LAYERS);
  for (let layer = 0; layer < LAYERS; layer++)
    bounds[layer] = Math.floor((edges[layer + 1] / edges[layer]) * TWO_53);
  return {
    edges,
    heights: edges.map((edge) => exp(-edge)),
    widths: edges.map((edge) => edge / TWO_53),
    bounds,
  };
}

export const ziggurat: Ziggurat = zigguratTables();

/**
 * A standard exponential (mean 1): one word mostly, its low 8 bits the layer and its high 53 the place in it. A draw in
 * the tail starts anew there, since an exponential has no memory.
 * Source: G. Marsaglia & W. W. Tsang 2000, Journal of Statistical Software 5(8), doi 10.18637/jss.v005.i08.
 */
export function drawExponential(source: Sfc64): number {
  const { edges, widths, bounds } = ziggurat;
  let shift = 0;
  for (;;) {
    source.step();
    const layer = source.low & 255;
    const part = source.high * 2097152 + (source.low >>> 11);
    const x = part * widths[layer];
    if (part < bounds[layer]) return shift + x;
    if (layer === 0) shift += edges[1];
    else if (isUnderCurve(layer, x, source)) return shift + x;
  }
}

/** Whether a point of the layer's rest lies under e^-x, which its tangent and its chord settle nearly always. */
function isUnderCurve(layer: number, x: number, source: Sfc64): boolean {
  const { edges, heights } = ziggurat;
  const outer = heights[layer];
  const full = heights[layer + 1] - outer;
  source.step();
  const rise = (source.high * 2097152 + (source.low >>> 11)) * TWO_MINUS_53 * full;
  const d = edges[layer] - x;
  if (rise < outer * d) return true;
  if (rise * (edges[layer] - edges[layer + 1]) > full * d) return false;
  return outer + rise < outer * expOfPart(d);
}

/** e^d for d in [0, 1): Taylor to degree 18, by Horner. */
function expOfPart(d: number): number {
  let sum = 1;
  for (let n = 18; n > 0; n--) sum = 1 + (sum * d) / n;
  return sum;
}

import { next } from "./sfc64";

/**
 * The ziggurat's tables lie below this program's own data, where the caller writes them: for each of 256 layers its
 * bound (a word) and width; then the edges and the heights of the curve there, 257 doubles each.
 */
export const LAYERS: usize = 1024;
const EDGES: usize = 5120;
const HEIGHTS: usize = 7176;

const TWO_MINUS_53: f64 = 1.0 / 9007199254740992.0;

/** Standard exponential, given that the first draw fell outside its layer's rectangle (its twin: core/numeric/ziggurat.ts). */
export function beyondRectangle(firstLayer: usize, firstX: f64): f64 {
  let layer = firstLayer;
  let x = firstX;
  let shift: f64 = 0.0;
  let isInside = false;
  while (!isInside) {
    isInside = layer > 0 && isUnderCurve(layer, x);
    if (isInside) continue;
    if (layer == 0) shift += load<f64>(EDGES + 8);
    const word = next();
    layer = <usize>(word & 255);
    const part = word >> 11;
    x = <f64>(<i64>part) * load<f64>(LAYERS + (layer << 4) + 8);
    isInside = part < load<u64>(LAYERS + (layer << 4));
  }
  return shift + x;
}

/** Whether a point of the layer's rest lies under e^-x, which its tangent and its chord settle nearly always. */
function isUnderCurve(layer: usize, x: f64): bool {
  const edge = EDGES + (layer << 3);
  const height = HEIGHTS + (layer << 3);
  const outer = load<f64>(height);
  const rise = <f64>(<i64>(next() >> 11)) * TWO_MINUS_53 * (load<f64>(height + 8) - outer);
  const d = load<f64>(edge) - x;
  if (rise < outer * d) return true;
  const width = load<f64>(edge) - load<f64>(edge + 8);
  if (rise * width > (load<f64>(height + 8) - outer) * d) return false;
  return outer + rise < outer * expOfPart(d);
}

/** e^d for d in [0, 1): Taylor to degree 18, by Horner. */
function expOfPart(d: f64): f64 {
  let sum: f64 = 1.0;
  for (let n: i32 = 18; n > 0; n--) sum = 1.0 + (sum * d) / <f64>n;
  return sum;
}

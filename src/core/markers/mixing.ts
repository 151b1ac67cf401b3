import { exp, expm1 } from "../numeric/elementary.ts";

/** A sample's edges in cm; a point has equal base and top. */
export interface Slab {
  readonly baseCm: number;
  readonly topCm: number;
}

/** Box mixing: base of the smear and mixing length in cm; the event surface is `baseCm + lengthCm`. */
export interface BoxMixing {
  readonly baseCm: number;
  readonly lengthCm: number;
}

/**
 * Mean of the box-mixing profile over a slab, per unit fluence and density: times `F0/rho` it is the mean excess.
 *
 *     E(h) rho = (F0/L) exp(-(h - hb)/L) above hb, 0 below
 *     Ebar = F0/(rho (b-a)) exp(-(l-hb)/L) (-expm1(-(b-l)/L)),  l = max(a, hb)
 *
 * Assumes instantaneous input at `h0 = hb + L`, an always fully mixed top layer of thickness L, constant accumulation
 * and no loss. For a point, the value there. Result in 1/cm, >= 0. Berger & Heath 1968, J. Mar. Res. 26:134-143.
 */
export function boxSlabMean({ baseCm, topCm }: Slab, mixing: BoxMixing): number {
  const { baseCm: hb, lengthCm: length } = mixing;
  if (topCm <= hb) return topCm === baseCm && topCm === hb ? 1 / length : 0;
  const from = baseCm > hb ? baseCm : hb;
  const start = exp(-(from - hb) / length);
  if (topCm === baseCm) return start / length;
  return (start * -expm1(-(topCm - from) / length)) / (topCm - baseCm);
}

import type { MarkerHorizon } from "../../markers/result.ts";
import { log } from "../../numeric/elementary.ts";

/** Where a marker horizon lies: normal about its position, flat over its interval, or at one height. */
export type HorizonLaw =
  | { readonly kind: "normal"; readonly meanM: number; readonly sdM: number }
  | { readonly kind: "uniform"; readonly lowM: number; readonly highM: number }
  | { readonly kind: "point"; readonly atM: number };

/**
 * `uniform` and `sample-bounds` are flat over their interval; the others normal with their standard deviation (half the
 * 68 % interval of a profile likelihood); without an uncertainty, a point.
 */
export function horizonLaw({ shape, positionM, sigmaM, lowM, highM }: MarkerHorizon): HorizonLaw {
  const isFlat = shape === "uniform" || shape === "sample-bounds";
  if (isFlat && highM > lowM) return { kind: "uniform", lowM, highM };
  return sigmaM > 0 && !isFlat
    ? { kind: "normal", meanM: positionM, sdM: sigmaM }
    : { kind: "point", atM: positionM };
}

/** Standard deviations beyond which a normal law is left out. */
const REACH = 9;
/** Standard deviations at which panels of a normal law end. */
const STEPS = [-6, -4, -2, 0, 2, 4, 6];
const LOG_ROOT_TWO_PI = 0.9189385332046728;

/** The heights over which a law is integrated, and where panels end. */
export function lawEdges(law: HorizonLaw): readonly number[] {
  if (law.kind === "point") return [law.atM];
  if (law.kind === "uniform") return [law.lowM, law.highM];
  return [-REACH, ...STEPS, REACH].map((z) => law.meanM + z * law.sdM);
}

/** ln of the density at a height; a point has none. */
export function logLaw(law: Exclude<HorizonLaw, { kind: "point" }>, heightM: number): number {
  if (law.kind === "uniform") {
    const isInside = heightM >= law.lowM && heightM <= law.highM;
    return isInside ? -log(law.highM - law.lowM) : Number.NEGATIVE_INFINITY;
  }
  const z = (heightM - law.meanM) / law.sdM;
  return -0.5 * z * z - LOG_ROOT_TWO_PI - log(law.sdM);
}

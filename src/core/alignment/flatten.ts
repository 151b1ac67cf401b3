import type { CommonPosition, SectionAlignment } from "./result.ts";

interface Segment {
  /** Index of the horizon below; above it lies index + 1 (equal to `index` where the section is rigid). */
  readonly index: number;
  readonly gain: number;
  readonly isRigid: boolean;
}

/**
 * A height of one section on the common scale, with its error by first-order propagation:
 * z' = R_k + u (R_{k+1} - R_k), u = (z - m_k)/(m_{k+1} - m_k), g = (R_{k+1} - R_k)/(m_{k+1} - m_k),
 * var z' = g^2 [s_z^2 + (1-u)^2 s_k^2 + u^2 s_{k+1}^2] + (1-u)^2 r_k^2 + u^2 r_{k+1}^2.
 * Outside the outermost horizons `rigid` keeps thickness (g = 1), `gain` continues the nearest interval.
 * A height exactly at two horizons of zero thickness between them maps to the interval between their targets.
 *
 * @param heightM metres of height in the section; `sigmaM` its own standard deviation in metres.
 * @returns metres on the common scale.
 *
 * Common stratigraphic practice; the error is ordinary first-order propagation.
 */
export function toCommon(
  alignment: SectionAlignment,
  heightM: number,
  { beyond, sigmaM = 0 }: { beyond: "rigid" | "gain"; sigmaM?: number },
): CommonPosition {
  const { heightsM: m, sigmasM: s, targets: R, targetSigmas: r } = alignment;
  const gap = m.findIndex((height, k) => k + 1 < m.length && height === m[k + 1] && height === heightM);
  if (gap >= 0) {
    const top = m.lastIndexOf(heightM);
    return { common: R[gap], commonHigh: R[top], sigma: Math.sqrt(sigmaM ** 2 + s[gap] ** 2 + r[gap] ** 2) };
  }
  const { index: k, gain, isRigid } = segmentAt(alignment, heightM, beyond);
  if (isRigid) {
    const sigma = Math.sqrt(sigmaM ** 2 + s[k] ** 2 + r[k] ** 2);
    return { common: R[k] + (heightM - m[k]), sigma };
  }
  const u = (heightM - m[k]) / (m[k + 1] - m[k]);
  const fromHeights = gain ** 2 * (sigmaM ** 2 + ((1 - u) * s[k]) ** 2 + (u * s[k + 1]) ** 2);
  const fromTargets = ((1 - u) * r[k]) ** 2 + (u * r[k + 1]) ** 2;
  return { common: R[k] + u * (R[k + 1] - R[k]), sigma: Math.sqrt(fromHeights + fromTargets) };
}

/**
 * Covariance of two heights of one section on the common scale: they share the errors of their horizons, so a
 * difference of two heights is better known than either.
 *
 * @returns square metres.
 */
export function commonCovariance(
  alignment: SectionAlignment,
  [a, b]: readonly [number, number],
  beyond: "rigid" | "gain",
): number {
  const left = weightsAt(alignment, a, beyond);
  const right = weightsAt(alignment, b, beyond);
  let sum = 0;
  for (const [k, w] of left) {
    const other = right.get(k);
    if (other === undefined) continue;
    sum += w.onHeight * other.onHeight * alignment.sigmasM[k] ** 2;
    sum += w.onTarget * other.onTarget * alignment.targetSigmas[k] ** 2;
  }
  return sum;
}

function weightsAt(alignment: SectionAlignment, heightM: number, beyond: "rigid" | "gain") {
  const { heightsM: m } = alignment;
  const { index: k, gain, isRigid } = segmentAt(alignment, heightM, beyond);
  const weights = new Map<number, { onHeight: number; onTarget: number }>();
  if (isRigid) return weights.set(k, { onHeight: 1, onTarget: 1 });
  const u = (heightM - m[k]) / (m[k + 1] - m[k]);
  weights.set(k, { onHeight: gain * (1 - u), onTarget: 1 - u });
  return weights.set(k + 1, { onHeight: gain * u, onTarget: u });
}

/** The interval of thickness that holds a height, or the nearest one beyond the outermost horizons. */
function segmentAt(alignment: SectionAlignment, heightM: number, beyond: "rigid" | "gain"): Segment {
  const { heightsM: m, targets: R } = alignment;
  const last = m.length - 1;
  const isBelow = heightM < m[0];
  const isOutside = isBelow || heightM > m[last];
  const outer: Segment = { index: isBelow ? 0 : last, gain: 1, isRigid: true };
  if (isOutside && beyond === "rigid") return outer;
  const thick = m.flatMap((height, k) => (k < last && m[k + 1] > height ? [k] : []));
  if (thick.length === 0) return outer;
  const holding = isBelow ? thick[0] : thick.findLast((k) => m[k] <= heightM);
  const k = holding ?? thick[0];
  return { index: k, gain: (R[k + 1] - R[k]) / (m[k + 1] - m[k]), isRigid: false };
}

import type { SectionAlignment } from "../../alignment/result.ts";
import type { MarkerHorizon } from "../../markers/result.ts";
import { exp } from "../../numeric/elementary.ts";
import { gaussHermite } from "../../numeric/gauss-hermite.ts";
import { type HorizonLaw, horizonLaw } from "../scenarios/horizon-law.ts";

/** How levels of a common scale lie in one section. */
export interface SectionMap {
  /** Weight among the maps of the section, which add to 1: a drawn alignment or a rate that may be. */
  readonly weight: number;
  /** Law of the height at which a level lies. */
  readonly lawAt: (level: number) => HorizonLaw;
  /** Level of a height, errors left out; does not decrease upward. */
  readonly toLevel: (heightM: number) => number;
  /** Levels at which the map bends. */
  readonly bends: readonly number[];
}

/** A scale on which levels of several sections are compared, younger upward. */
export interface CommonScale {
  readonly unit: "m" | "ka";
  /** Empty where a section is not on the scale. */
  readonly mapsOf: (section: string) => readonly SectionMap[];
}

/** How fast a section accumulated: metres per ka, and the standard deviation of its logarithm. */
export interface AccumulationRate {
  readonly rate: number;
  readonly spread: number;
}

const RATE_NODES = 16;

/**
 * Metres of each section from one horizon, placed with its own error: level delta lies at pick + delta + e, e of the law of
 * the pick. With rates it is time from the horizon, in ka: pick + a delta + e, with ln a normal and integrated by 16-node
 * Gauss-Hermite quadrature, independent of e.
 */
export function fromHorizon(
  picks: ReadonlyMap<string, MarkerHorizon>,
  rates?: ReadonlyMap<string, AccumulationRate>,
): CommonScale {
  const mapsOf = (section: string) => {
    const pick = picks.get(section);
    if (pick === undefined) return [];
    const law = horizonLaw(pick);
    if (rates === undefined) return [shiftedMap(law, { rate: 1, weight: 1 })];
    const rate = rates.get(section);
    return rate === undefined ? [] : likelyRates(rate).map((one) => shiftedMap(law, one));
  };
  return { unit: rates === undefined ? "m" : "ka", mapsOf };
}

interface WeightedRate {
  readonly rate: number;
  readonly weight: number;
}

function likelyRates({ rate, spread }: AccumulationRate): readonly WeightedRate[] {
  if (spread === 0) return [{ rate, weight: 1 }];
  const { nodes, weights } = gaussHermite(RATE_NODES);
  return Array.from(nodes, (x, i) => ({
    rate: rate * exp(spread * x),
    weight: weights[i],
  }));
}

function shiftedMap(law: HorizonLaw, { rate, weight }: WeightedRate): SectionMap {
  const middle = centreOf(law);
  return {
    weight,
    lawAt: (level) => shiftedLaw(law, rate * level),
    toLevel: (heightM) => (heightM - middle) / rate,
    bends: [],
  };
}

/** Middle of a law. */
export function centreOf(law: HorizonLaw): number {
  if (law.kind === "normal") return law.meanM;
  return law.kind === "point" ? law.atM : 0.5 * (law.lowM + law.highM);
}

function shiftedLaw(law: HorizonLaw, byM: number): HorizonLaw {
  if (law.kind === "normal") return { ...law, meanM: law.meanM + byM };
  if (law.kind === "point") return { kind: "point", atM: law.atM + byM };
  return { kind: "uniform", lowM: law.lowM + byM, highM: law.highM + byM };
}

/**
 * The common scale of lined-up sections. Between two shared horizons level c lies at m_k + v (m_(k+1) - m_k),
 * v = (c - R_k) / (R_(k+1) - R_k); with independent normal errors of the horizons that height is normal, with variance
 * (1 - v)^2 (s_k^2 + g^2 r_k^2) + v^2 (s_(k+1)^2 + g^2 r_(k+1)^2), g = (m_(k+1) - m_k) / (R_(k+1) - R_k).
 * Beyond the outermost horizons as the alignment says: rigid, or by the nearest interval.
 */
export function fromAlignment(sections: readonly SectionAlignment[], beyond: "rigid" | "gain"): CommonScale {
  const bySection = new Map(sections.map((section) => [section.section, section]));
  return {
    unit: "m",
    mapsOf: (section) => {
      const alignment = bySection.get(section);
      if (alignment === undefined) return [];
      return [
        {
          weight: 1,
          lawAt: (level) => alignedLaw(alignment, level, beyond),
          toLevel: (heightM) => alignedLevel(alignment, heightM, beyond),
          bends: alignment.targets,
        },
      ];
    },
  };
}

function alignedLaw(alignment: SectionAlignment, level: number, beyond: "rigid" | "gain"): HorizonLaw {
  const { heightsM: m, sigmasM: s, targets: R, targetSigmas: r } = alignment;
  const k = intervalAt(R, level);
  const outer = level < R[0] ? 0 : level > R[R.length - 1] ? R.length - 1 : undefined;
  if (R.length === 1 || (outer !== undefined && beyond === "rigid")) {
    const at = outer ?? 0;
    return lawOf(m[at] + level - R[at], s[at] ** 2 + r[at] ** 2);
  }
  const gain = (m[k + 1] - m[k]) / (R[k + 1] - R[k]);
  const v = (level - R[k]) / (R[k + 1] - R[k]);
  const below = (1 - v) ** 2 * (s[k] ** 2 + (gain * r[k]) ** 2);
  const above = v ** 2 * (s[k + 1] ** 2 + (gain * r[k + 1]) ** 2);
  return lawOf(m[k] + v * (m[k + 1] - m[k]), below + above);
}

function lawOf(meanM: number, variance: number): HorizonLaw {
  return variance > 0 ? { kind: "normal", meanM, sdM: Math.sqrt(variance) } : { kind: "point", atM: meanM };
}

function alignedLevel(
  { heightsM: m, targets: R }: SectionAlignment,
  heightM: number,
  beyond: "rigid" | "gain",
): number {
  const last = m.length - 1;
  const isOutside = heightM < m[0] || heightM > m[last];
  const k = intervalAt(m, heightM);
  if (last === 0 || (isOutside && beyond === "rigid") || m[k + 1] === m[k]) {
    const at = heightM > m[last] ? last : heightM < m[0] ? 0 : k;
    return R[at] + heightM - m[at];
  }
  return R[k] + ((heightM - m[k]) / (m[k + 1] - m[k])) * (R[k + 1] - R[k]);
}

/** Index of the lower end of the interval that holds a value, or of the nearest one. */
function intervalAt(ends: readonly number[], value: number): number {
  let k = 0;
  while (k + 2 < ends.length && ends[k + 1] <= value) k++;
  return k;
}

import { log } from "../../numeric/elementary.ts";
import { logSumExp } from "../../numeric/sums.ts";
import { endGrid, floorOf } from "../scenarios/end-grid.ts";
import type { EndLikelihood } from "../scenarios/end-likelihood.ts";
import { type HorizonLaw, lawEdges } from "../scenarios/horizon-law.ts";
import { centreOf, type SectionMap } from "./common-scale.ts";
import { type LogProfile, logMean, logProfile } from "./log-profile.ts";
import { stepMean } from "./step-likelihood.ts";

/** What one section says about a common level. */
export interface PooledSection {
  readonly section: string;
  readonly taxa: readonly EndLikelihood[];
  readonly maps: readonly SectionMap[];
  /** The likelihoods are constant between their kinks, as those of sampled horizons are. */
  readonly isStepped?: boolean;
}

/** Levels of a common scale from one to another. */
export interface LevelSpan {
  readonly low: number;
  readonly high: number;
  /** Of ln of the likelihood. */
  readonly tolerance?: number;
}

/**
 * ln L_s(c), the likelihood of common level c in one section: the integral over the heights h at which c may lie, of their
 * law, times prod_i L_i(h); a mixture over the maps of the section. With an exact pick prod_i L_i at its height.
 *
 * @param span levels between which it is wanted.
 */
export function sectionLevel({ taxa, maps, isStepped }: PooledSection, span: LevelSpan): LogProfile {
  const meanOver = isStepped ? stepMean(taxa) : smoothMean(taxa, topOf(taxa, maps, span));
  const each = maps.map((map) =>
    logProfile((level) => meanOver(map.lawAt(level)), edgesOf(taxa, map, span), span.tolerance),
  );
  const [only] = each;
  if (each.length === 1) return only;
  const logs = maps.map((map) => log(map.weight));
  return {
    edges: [...new Set(each.flatMap(({ edges }) => edges))].toSorted((a, b) => a - b),
    log: (level) => logSumExp(each.map((profile, i) => logs[i] + profile.log(level))),
  };
}

/** Levels at which the likelihood has a kink or changes its law, within the span. */
function edgesOf(taxa: readonly EndLikelihood[], map: SectionMap, span: LevelSpan): readonly number[] {
  const floorM = floorOf(taxa);
  const jumps = new Set(taxa.flatMap((taxon) => [taxon.fromM, taxon.lastM]).filter((x) => x >= floorM));
  const kinks = new Set(taxa.flatMap((taxon) => taxon.kinksM).filter((x) => x > floorM));
  const edges = [
    ...map.bends,
    ...[...jumps].flatMap((heightM) => smeared(map, heightM)),
    ...[...kinks].map(map.toLevel),
  ].filter((level) => level > span.low && level < span.high);
  return [...new Set([span.low, ...edges, span.high])].toSorted((a, b) => a - b);
}

/** ln of the mean over a law of prod_i L_i, smooth between kinks, up to a height. */
function smoothMean(taxa: readonly EndLikelihood[], topM: number): (law: HorizonLaw) => number {
  const lowM = floorOf(taxa);
  const { panels } = endGrid(taxa, { lowM, highM: topM });
  const logAt = (heightM: number) => taxa.reduce((sum, taxon) => sum + taxon.log(heightM), 0);
  const ends = logProfile(logAt, [lowM, ...panels.map((panel) => panel.highM)]);
  return (law) => logMean(ends, law);
}

/** A level may lie this high, and above the lowest possible end some way. */
function topOf(
  taxa: readonly EndLikelihood[],
  maps: readonly SectionMap[],
  { low, high }: LevelSpan,
): number {
  const floorM = floorOf(taxa);
  const reaches = maps.map(({ lawAt }) => {
    const law = lawAt(high);
    return Math.max(...lawEdges(law), floorM + 9 * widthOf(law), floorM + 9 * widthOf(lawAt(low)));
  });
  return Math.max(
    ...reaches,
    ...taxa.map((taxon) => taxon.lastM + 1e-3 * Math.max(1, Math.abs(taxon.lastM))),
  );
}

function widthOf(law: HorizonLaw): number {
  if (law.kind === "normal") return law.sdM;
  return law.kind === "point" ? 0 : law.highM - law.lowM;
}

/** Levels around which a jump at a height is spread by the law of its level. */
function smeared({ lawAt, toLevel }: SectionMap, heightM: number): readonly number[] {
  const level = toLevel(heightM);
  const law = lawAt(level);
  const middle = centreOf(law);
  return lawEdges(law).map((edgeM) => toLevel(heightM - (edgeM - middle)));
}

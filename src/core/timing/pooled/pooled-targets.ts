import type { Alignment } from "../../alignment/result.ts";
import type { MarkerHorizon, Markers } from "../../markers/result.ts";
import type { Settings } from "../../study/settings.ts";
import type { SetCase } from "../set-case.ts";
import { type CommonScale, fromAlignment, fromHorizon } from "./common-scale.ts";

/** A horizon that the common level is measured from, and the scale that it is pooled on. */
export interface PooledTarget {
  readonly horizon: string;
  readonly scale: CommonScale;
  /** Level of the horizon on the scale. */
  readonly origin: number;
}

export interface TargetInput {
  readonly markers: Markers;
  readonly alignment?: Alignment | undefined;
  readonly settings: Settings;
}

/**
 * What the level common to some sections is measured from: the main horizon first, then every other horizon placed in all
 * of them. Measured from a horizon, each has its own pool, as metres or time from its own picks; on the common scale of
 * lined-up sections all share one.
 */
export function pooledTargets(cases: readonly SetCase[], input: TargetInput): readonly PooledTarget[] {
  const { name: main } = input.markers.main;
  if (main === undefined) return [];
  if (input.settings.timing.jointScale === "common") return alignedTargets(main, input.alignment);
  const rates = input.settings.timing.jointScale === "time" ? ratesOf(input.settings) : undefined;
  const shared = sharedHorizons(cases).filter((name) => name !== main);
  return [main, ...shared].map((horizon) => ({
    horizon,
    scale: fromHorizon(picksOf(horizon, cases, input.markers), rates),
    origin: 0,
  }));
}

/** The cases whose section lies on the scale on which the main horizon is pooled. */
export function casesOnScale(cases: readonly SetCase[], input: TargetInput): readonly SetCase[] {
  const scale = pooledTargets(cases, input)[0]?.scale;
  return cases.filter(({ section }) => (scale?.mapsOf(section.name).length ?? 0) > 0);
}

function alignedTargets(main: string, alignment: Alignment | undefined): readonly PooledTarget[] {
  if (alignment === undefined) return [];
  const scale = fromAlignment(alignment.sections, alignment.beyond);
  return [main, ...alignment.horizons.filter((name) => name !== main)].flatMap((horizon) => {
    const holding = alignment.sections.find(({ horizons }) => horizons.includes(horizon));
    if (holding === undefined) return [];
    return [{ horizon, scale, origin: holding.targets[holding.horizons.indexOf(horizon)] }];
  });
}

function ratesOf({ timing }: Settings) {
  return new Map(Object.entries(timing.rates));
}

/** Names that every one of the sections has. */
function sharedHorizons(cases: readonly SetCase[]): readonly string[] {
  const [first, ...others] = cases.map(({ horizons }) => horizons.map(({ name }) => name));
  return (first ?? []).filter((name) => others.every((names) => names.includes(name)));
}

function picksOf(
  horizon: string,
  cases: readonly SetCase[],
  { main }: Markers,
): ReadonlyMap<string, MarkerHorizon> {
  const picks = new Map<string, MarkerHorizon>();
  for (const { section, horizons } of cases) {
    const pick =
      horizon === main.name
        ? main.bySection.get(section.name)
        : horizons.find(({ name }) => name === horizon)?.marker;
    if (pick !== undefined) picks.set(section.name, pick);
  }
  return picks;
}

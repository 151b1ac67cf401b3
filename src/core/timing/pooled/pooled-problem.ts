import { normalQuantile } from "../../numeric/normal.ts";
import type { LocalTaxon } from "../../study/finds-result.ts";
import type { Settings } from "../../study/settings.ts";
import type { HorizonLaw } from "../scenarios/horizon-law.ts";
import { problemOf, withSampledHorizons } from "../scenarios/problem.ts";
import type { SetCase } from "../set-case.ts";
import type { TimingWindow } from "../window.ts";
import type { SectionEnds } from "./between-sections.ts";
import { type CommonScale, centreOf, type SectionMap } from "./common-scale.ts";
import type { PooledProblem } from "./pooled-level.ts";

/** The window of end levels in each section. */
export type Windows = ReadonlyMap<string, TimingWindow>;

interface ProblemInput {
  readonly scale: CommonScale;
  readonly windows: Windows;
  readonly settings: Settings;
  /** The taxa of all sections: with them the horizons searched are asked, not the finds alone. */
  readonly searchedFor?: readonly LocalTaxon[];
}

/** With the window's top and the level of the highest last find. */
export type PlacedProblem = PooledProblem & { readonly highest: number };

/**
 * One set in several sections, all on the scale, as the question of one common level. Undefined where the horizons searched
 * are asked but the finds of some taxon lie in none.
 */
export function pooledProblem(
  cases: readonly SetCase[],
  { scale, windows, settings, searchedFor }: ProblemInput,
): PlacedProblem | undefined {
  const each = cases.flatMap((setCase) => {
    const window = windows.get(setCase.section.name);
    if (window === undefined) return [];
    const own = problemOf(setCase, window, undefined);
    const found = searchedFor === undefined ? own : withSampledHorizons(own, setCase, searchedFor);
    if (found === undefined) return [];
    const { taxa, lowM, highM } = found;
    const maps = scale.mapsOf(setCase.section.name);
    const { toLevel } = heaviest(maps);
    const lastM = Math.max(...taxa.map((taxon) => taxon.lastM));
    return [
      {
        section: { section: setCase.section.name, taxa, maps, isStepped: searchedFor !== undefined },
        low: toLevel(lowM),
        high: toLevel(highM),
        highest: toLevel(lastM),
      },
    ];
  });
  if (each.length < cases.length) return undefined;
  const highest = Math.max(...each.map((one) => one.highest));
  const top = Math.max(...each.map((one) => one.high));
  const reach = Math.max(0, top - highest);
  return {
    sections: each.map(({ section }) => section),
    low: Math.min(...each.map((one) => one.low)),
    tops: [top, top - reach / 2, top + reach],
    sharedSd: settings.timing.sharedError,
    highest,
  };
}

/** Sections as the test between them sees them: each placed anywhere within the interval of its pick. */
export function endsOnScale(
  cases: readonly SetCase[],
  scale: CommonScale,
  confidence: number,
): readonly SectionEnds[] {
  return cases.map(({ section, set, coordinate }) => {
    const { lawAt, toLevel } = heaviest(scale.mapsOf(section.name));
    const heightOf = (level: number) => centreOf(lawAt(level));
    return {
      ranges: set.ranges,
      levelsOf: (heightM) => {
        const error = halfWidth(lawAt(toLevel(heightM)), confidence);
        return { low: toLevel(heightM - error), high: toLevel(heightM + error) };
      },
      toEffective: (level, placed) =>
        coordinate.toEffective(placed.heightM + heightOf(level) - heightOf(placed.level)),
    };
  });
}

/** Half the interval of a law at a level of confidence; all of a flat one. */
function halfWidth(law: HorizonLaw, confidence: number): number {
  if (law.kind === "point") return 0;
  return law.kind === "uniform"
    ? 0.5 * (law.highM - law.lowM)
    : normalQuantile(0.5 * (1 + confidence)) * law.sdM;
}

/** True where every section is placed on the scale without error. */
export function isExact(cases: readonly SetCase[], scale: CommonScale): boolean {
  return cases.every(({ section }) => {
    const maps = scale.mapsOf(section.name);
    return maps.length === 1 && maps[0].lawAt(0).kind === "point";
  });
}

/** The map of largest weight. */
function heaviest(maps: readonly SectionMap[]): SectionMap {
  return maps.reduce((best, map) => (map.weight > best.weight ? map : best));
}

import { chiSquareUpperTail } from "../../numeric/chi-square.ts";
import { type EffectiveRange, isUninformative } from "../../ranges/pivot.ts";
import { endStatistic } from "../common-end.ts";

/** A range with the height of its highest find. */
export interface PlacedRange extends EffectiveRange {
  readonly lastM: number;
}

/** The ranges of one section, and how its heights lie on the common scale. */
export interface SectionEnds {
  readonly ranges: readonly PlacedRange[];
  /** Levels at which a height may lie: both the same where the section is placed without error. */
  readonly levelsOf: (heightM: number) => { readonly low: number; readonly high: number };
  /** Effective metres of a level, where a height lies at another level. */
  readonly toEffective: (
    level: number,
    placed: { readonly heightM: number; readonly level: number },
  ) => number;
}

export interface BetweenSections {
  /** 2 sum over sections and their ranges of m ln((M - b) / (M_s - b)). */
  readonly statistic: number;
  /** 2 (S - 1). */
  readonly df: number;
  readonly p: number;
  /** Sections that entered: those with an informative range. */
  readonly sections: number;
}

/**
 * Test that the ends of several sections, one level in each, are one level of a common scale: each section is one taxon of
 * the test of a common end. Given one level, the pooled pivot of a section, prod_i ((M_s - b_i) / (M - b_i))^m_i with M_s
 * its own highest find and M the highest of all, is uniform on (0, 1) in every section but the one that has M, so that
 * -2 ln of their product is chi-square with 2 (S - 1) degrees of freedom.
 *
 * Exact where sections are placed without error. Else the p is the largest over where each may be placed: with the highest
 * find of the section that reaches highest as low as it may lie, and all others as near below it as they may.
 *
 * Assumes uniform recovery in each coordinate, and one end of all taxa in each section. Undefined with fewer than two
 * sections. After R. V. Hogg 1956, Annals of Mathematical Statistics 27:529-532; A. R. Solow 1996, Paleobiology 22:406-410.
 */
export function betweenSections(sections: readonly SectionEnds[]): BetweenSections | undefined {
  const kept = sections.flatMap(({ ranges, levelsOf, toEffective }) => {
    const informative = ranges.filter((range) => !isUninformative(range));
    if (informative.length === 0) return [];
    const heightM = Math.max(...informative.map((range) => range.lastM));
    return [{ ranges: informative, heightM, levels: levelsOf(heightM), toEffective }];
  });
  if (kept.length < 2) return undefined;
  const highest = Math.max(...kept.map(({ levels }) => levels.low));
  let statistic = 0;
  for (const { ranges, heightM, levels, toEffective } of kept) {
    if (levels.high >= highest) continue;
    const last = Math.max(...ranges.map((range) => range.last));
    const ended = ranges.map((range) => ({ ...range, last }));
    statistic += endStatistic(ended, Math.max(last, toEffective(highest, { heightM, level: levels.high })));
  }
  const df = 2 * (kept.length - 1);
  return { statistic, df, p: chiSquareUpperTail(statistic, df), sections: kept.length };
}

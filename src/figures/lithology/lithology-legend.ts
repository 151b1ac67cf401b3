import type { LegendEntry } from "../legend.tsx";
import { lithologyOf, plainLetters } from "./lithology.ts";
import { PATTERN_TILES, type PatternId } from "./pattern-tiles.ts";

/** What the rock patterns of a log stand for; words outside the table with the letter that stands in their beds. */
export function lithologyLegend(
  terms: readonly string[],
  hidden: readonly PatternId[] = [],
): readonly LegendEntry[] {
  const rocks = terms.map((term) => lithologyOf(term).pattern).filter((pattern) => pattern !== undefined);
  const known = [...new Set([...rocks, ...hidden])];
  return [
    ...known.map(
      (pattern): LegendEntry => ({ sign: { kind: "rock", pattern }, label: PATTERN_TILES[pattern].name }),
    ),
    ...[...plainLetters(terms)].map(
      ([term, letter]): LegendEntry => ({ sign: { kind: "plain-rock", letter }, label: term }),
    ),
  ];
}

/** The credit that a plate with rock patterns carries. */
export const PATTERN_CREDIT =
  "Rock patterns drawn after FGDC-STD-013-2006, section 37 (U.S. Geological Survey).";

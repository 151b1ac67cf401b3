import { type DecliningPosterior, decliningPosterior } from "./declining.ts";
import { type Estimate, estimatedEnd } from "./estimate-row.ts";
import { note, type RangeCase, reasonWithoutFinds, wordsOf } from "./range-case.ts";
import { fewNote, heightWords, round } from "./uniform-end.ts";

/** Standard deviation of the slope beforehand: the default, and what the note compares it with. */
const SPREAD = 2;
const OTHER_SPREADS = [1, 3];

/** The row of method `declining`: bound, median and chance above H; its note tells the slope and what s changes. */
export const decliningEnd = estimatedEnd({
  method: "declining",
  reason: reasonWithoutFinds,
  estimate: (rangeCase) => estimateBy(rangeCase, spreadWords(rangeCase)),
});

/** The same row at a third of the cost: its note does not tell what s changes. */
export const decliningPlainEnd = estimatedEnd({
  method: "declining",
  reason: reasonWithoutFinds,
  estimate: (rangeCase) => estimateBy(rangeCase),
});

function estimateBy(rangeCase: RangeCase, sensitivity?: string): Estimate {
  const { range, confidence } = rangeCase;
  const length = range.last - range.base;
  const posterior = posteriorOf(rangeCase, SPREAD);
  return {
    bound: range.last + length * posterior.extension(confidence),
    point: range.last + length * posterior.extension(0.5),
    chanceAt: (level) => posterior.chanceBeyond((level - range.last) / length),
    notes: [slopeWords(rangeCase, posterior), sensitivity, fewNote(range.horizons)],
  };
}

/** The bound with another width of the prior of the slope, in effective metres. */
function boundWith(rangeCase: RangeCase, spread: number): number {
  const { range, confidence } = rangeCase;
  const extension = posteriorOf(rangeCase, spread).extension(confidence);
  return range.last + (range.last - range.base) * extension;
}

function posteriorOf({ levels, range }: RangeCase, spread: number): DecliningPosterior {
  const counted = range.mode === "first" ? levels.slice(1) : levels;
  const length = range.last - range.base;
  const shares = counted.map((level) => Math.min(1, Math.max(0, (level - range.base) / length)));
  return decliningPosterior({ shares, spread });
}

function slopeWords(rangeCase: RangeCase, { falling, evidenceRatio, slope }: DecliningPosterior): string {
  const { upward } = wordsOf(rangeCase);
  return note(
    `recovery falls ${upward} with chance ${round(falling)}`,
    evidenceRatio !== undefined && `evidence for falling over rising ${round(evidenceRatio)}`,
    `mean slope ${round(slope)}`,
  );
}

/** The bounds with other widths of the prior of the slope. */
function spreadWords(rangeCase: RangeCase): string {
  const bounds = OTHER_SPREADS.map(
    (spread) => `${heightWords(rangeCase, boundWith(rangeCase, spread))} for ${spread}`,
  );
  return `prior width of the slope ${SPREAD}; bound ${bounds.join(", ")}`;
}

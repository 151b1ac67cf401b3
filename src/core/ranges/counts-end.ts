import { countsChance, countsLikelihood, countsShape, POISSON_SHAPE } from "./counts.ts";
import { type CountedRange, countedRange } from "./counts-range.ts";
import { commonFields, levelWords, note, type RangeCase, wordsOf } from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import { atHorizon, horizonBound } from "./sampled-end.ts";
import { furthestOfChances } from "./sampled-odds.ts";
import { endPosterior, endQuantile } from "./sampled-posterior.ts";
import type { Survival } from "./survival.ts";
import { cutOffNote } from "./uniform-end.ts";

/**
 * The row of method `counts`: the bound is the first barren sample above those that may still lie inside the range given
 * the specimens counted, kappa at its largest likelihood; the point is the median of the posterior over kappa.
 */
export function countsEnd(rangeCase: RangeCase): RangeEnd {
  const common = { ...commonFields(rangeCase), method: "counts" as const };
  const counted = countedRange(rangeCase);
  if (typeof counted === "string") return { ...common, outcome: "not-applicable", note: counted };
  const { range } = rangeCase;
  const total = counted.counts.reduce((sum, count) => sum + count, 0);
  const fields = { ...common, exponent: rangeCase.sampled?.count.finds ?? 0, lowM: range.lastM };
  if (total === 0)
    return { ...fields, outcome: "undefined", note: "one counted find, base unknown: no bound" };
  if (rangeCase.reachesTop || counted.above.length === 0)
    return { ...fields, outcome: "leaves-section", note: cutOffNote(rangeCase) };
  const shape = countsShape(counted);
  if (shape === undefined)
    return { ...fields, outcome: "undefined", note: "too few counts to tell how specimens clump" };
  const chances = countsChances(counted, shape);
  const bound = horizonBound(rangeCase, furthestOfChances(chances, rangeCase.confidence), counted.barrenM);
  const { words, ...posterior } = posteriorFields(rangeCase, counted);
  return {
    ...fields,
    ...atHorizon(rangeCase, counted.barrenM, chances),
    ...posterior,
    ...bound,
    note: note(bound.note, shapeWords(total, shape), effortWords[counted.effort], words),
  };
}

/** Steps down at each barren sample, kappa at its largest likelihood. */
export function countsSurvival(rangeCase: RangeCase): Survival | undefined {
  const counted = countedRange(rangeCase);
  const shape = typeof counted === "string" ? undefined : countsShape(counted);
  if (typeof counted === "string" || shape === undefined) return undefined;
  return { kind: "steps", barrenM: counted.barrenM, chances: countsChances(counted, shape) };
}

/** p(j) for j = 0..M_b at one kappa. */
function countsChances({ counts, efforts, above }: CountedRange, shape: number): Float64Array {
  const total = counts.reduce((sum, count) => sum + count, 0);
  const inside = efforts.reduce((sum, effort) => sum + effort, 0);
  const chances = [1];
  let further = 0;
  for (const effort of above) {
    further += effort;
    chances.push(countsChance({ total, inside, further }, shape));
  }
  return Float64Array.from(chances);
}

function shapeWords(total: number, shape: number): string {
  const clumping =
    shape === POISSON_SHAPE ? "varying no more than Poisson counts" : `kappa ${Number(shape.toPrecision(3))}`;
  return `${total} specimens beside those of the first sample, ${clumping}`;
}

const effortWords: Readonly<Record<CountedRange["effort"], string | undefined>> = {
  "counted to": "effort taken as the number counted to",
  effort: "effort as given",
  equal: undefined,
};

function posteriorFields(
  rangeCase: RangeCase,
  counted: CountedRange,
): Pick<RangeEnd, "pointM"> & { readonly words?: string } {
  const { range, topM, confidence } = rangeCase;
  const edgesM = [range.lastM, ...counted.barrenM, topM].map((heightM) => Math.max(heightM, range.lastM));
  const posterior = endPosterior(countsLikelihood(counted, counted.above), edgesM, "height");
  if (posterior === undefined) return {};
  const { sectionEnd } = wordsOf(rangeCase);
  return {
    pointM: endQuantile(posterior, 0.5),
    words: `posterior bound ${levelWords(rangeCase, endQuantile(posterior, confidence))} with kappa from 1/16 to 16 and a prior flat in height up to the ${sectionEnd}`,
  };
}

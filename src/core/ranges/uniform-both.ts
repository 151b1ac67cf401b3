import { commonFields, metres, note, type RangeCase } from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import { twoEndedFactor } from "./uniform.ts";
import { cutOffNote, fewNote } from "./uniform-end.ts";

/**
 * The row `both` of method `uniform`: the observed range R extended by aR at each end, so that base and top both lie
 * inside with the level together. Neither end is taken as known.
 */
export function uniformBoth(rangeCase: RangeCase): RangeEnd {
  const { confidence, range, constant } = rangeCase;
  return bothEnds({ ...rangeCase, ...constant }, "uniform", {
    factor: range.horizons < 2 ? undefined : twoEndedFactor(confidence, range.horizons),
    exponent: range.horizons - 1,
  });
}

interface Extension {
  /** a: each end lies up to a times the observed range beyond the finds; undefined where nothing bounds it. */
  readonly factor: number | undefined;
  readonly exponent: number;
}

/** The interval of both ends, extended equally in the coordinate and mapped back end by end. */
export function bothEnds(
  rangeCase: RangeCase,
  method: RangeEnd["method"],
  { factor, exponent }: Extension,
): RangeEnd {
  const { taxon, range, coordinate, topM, bottomM } = rangeCase;
  const { horizon: _horizon, ...common } = commonFields(rangeCase);
  const fields = { ...common, method, end: "both" as const, exponent };
  const first = coordinate.toEffective(taxon.heightsM[0]);
  const length = range.last - first;
  if (factor === undefined || !(length > 0))
    return {
      ...fields,
      outcome: "undefined",
      note: "too few horizons, or a range without length: no bounds",
    };
  if (rangeCase.reachesTop || rangeCase.reachesBottom)
    return { ...fields, outcome: "leaves-section", note: cutOffWords(rangeCase) };
  const low = first - factor * length;
  const high = range.last + factor * length;
  const lowM = coordinate.toHeight(low, "lower");
  const highM = coordinate.toHeight(high, "upper");
  if (lowM === undefined || highM === undefined)
    return { ...fields, outcome: "open", note: "a bound lies beyond the declared recovery" };
  const gaps = [coordinate.gapAt(low), coordinate.gapAt(high)].filter((gap) => gap !== undefined);
  const words = gaps.map((gap) => `a bound falls in a gap from ${metres(gap.baseM)} to ${metres(gap.topM)}`);
  const isInside = lowM >= bottomM && highM <= topM;
  return {
    ...fields,
    lowM,
    highM,
    outcome: isInside ? (gaps.length > 0 ? "in-hiatus" : "closed") : "leaves-section",
    note: note(...words, fewNote(range.horizons)),
  };
}

function cutOffWords(rangeCase: RangeCase): string {
  const { reachesTop, reachesBottom } = rangeCase;
  return note(
    reachesTop && cutOffNote(rangeCase),
    reachesBottom && cutOffNote({ ...rangeCase, end: "base" }),
  );
}

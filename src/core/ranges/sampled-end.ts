import { commonFields, note, type RangeCase, wordsOf } from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import { barrenChances, furthestBarren } from "./sampled.ts";
import type { SampledRange } from "./sampled-horizons.ts";
import { cutOffNote } from "./uniform-end.ts";

/** The row of method `sampled`: the bound is a sampled horizon, or open where the end may lie above all of them. */
export function sampledEnd(rangeCase: RangeCase): RangeEnd {
  const { taxon, sampled, range, confidence } = rangeCase;
  const { above, highest } = wordsOf(rangeCase);
  const common = { ...commonFields(rangeCase), method: "sampled" as const };
  if (sampled === undefined)
    return { ...common, outcome: "undefined", note: "no find in a sample searched for the group" };
  const { count, barrenM, unsampledFinds } = sampled;
  const counted = {
    ...common,
    horizons: taxon.heightsM.length - unsampledFinds,
    exponent: count.finds,
    lowM: range.lastM,
  };
  const notes = [unsampledFinds > 0 && `${unsampledFinds} finds outside searched samples do not count here`];
  if (count.finds === 0)
    return {
      ...counted,
      outcome: "undefined",
      note: note(`one sampled find, ${rangeCase.end === "top" ? "base" : "top"} unknown: no bound`, ...notes),
    };
  if (rangeCase.reachesTop || count.barrenAbove === 0)
    return { ...counted, outcome: "leaves-section", note: note(cutOffNote(rangeCase), ...notes) };
  const fields = { ...counted, ...atHorizon(rangeCase, sampled) };
  const furthest = furthestBarren(count, confidence);
  if (furthest === count.barrenAbove)
    return {
      ...fields,
      outcome: "open",
      note: note(`all ${count.barrenAbove} barren horizons ${above} may lie inside the range`, ...notes),
    };
  const highM = barrenM[furthest];
  if (highM < range.lastM)
    return {
      ...fields,
      outcome: "empty",
      note: note(`the ${highest} find, outside searched samples, lies ${above} the bound`, ...notes),
    };
  return {
    ...fields,
    highM,
    outcome: "closed",
    note: note(
      `${furthest} of ${count.barrenAbove} barren horizons ${above} may lie inside the range`,
      ...notes,
    ),
  };
}

/** Chance of so many barren horizons up to H, and the level at which the interval reaches H. */
function atHorizon(
  { range, horizon }: RangeCase,
  { count, barrenM }: SampledRange,
): Pick<RangeEnd, "p" | "reachLevel"> {
  if (horizon === undefined || horizon.positionM < range.lastM) return {};
  const below = barrenM.filter((heightM) => heightM <= horizon.positionM).length;
  const p = barrenChances(count)[below];
  return { p, reachLevel: 1 - p };
}

import type { InCoordinate } from "./in-coordinate.ts";
import { commonFields, levelWords, note, type RangeCase, reasonWithoutBound } from "./range-case.ts";
import { recoveryFit } from "./recovery-fit.ts";
import type { RangeEnd } from "./result.ts";
import { missingRockNotes } from "./rock-breaks.ts";
import { pivotSurvival, type Survival } from "./survival.ts";
import { uniformBound, uniformPoint } from "./uniform.ts";
import { boundFields, cutOffNote, fewNote, reachFields } from "./uniform-end.ts";

/**
 * The row of method `recovery`: the bound and point of `uniform`, in the coordinate of a recovery that is not constant;
 * how well the finds fit it, and where the bound would lie were recovery constant, and were its contrasts squared.
 */
export function recoveryEnd(given: RangeCase): RangeEnd {
  const { weighing } = given;
  if (weighing.kind === "unavailable")
    return {
      ...commonFields(given),
      method: "recovery",
      outcome: "not-applicable",
      note: `no recovery to weigh by (${weighing.reason})`,
    };
  const rangeCase = { ...given, ...weighing.weighed };
  const common = { ...commonFields(rangeCase), method: "recovery" as const };
  const reason = reasonWithoutBound(rangeCase);
  const source = `recovery from ${weighing.source}`;
  if (reason !== undefined) return { ...common, outcome: "undefined", note: note(source, reason) };
  const { range, coordinate, confidence } = rangeCase;
  const fields = { ...common, lowM: range.lastM, ...reachFields(rangeCase) };
  if (rangeCase.reachesTop)
    return { ...fields, outcome: "leaves-section", note: note(source, cutOffNote(rangeCase)) };
  const bound = uniformBound(range, confidence);
  const point = uniformPoint(range);
  const pointM = point === undefined ? undefined : coordinate.toHeight(point, "upper");
  return {
    ...fields,
    ...(pointM === undefined ? {} : { pointM }),
    ...boundFields(rangeCase, bound, [
      source,
      fitWords(rangeCase.levels),
      `bound with recovery constant ${boundWords(given, given.constant)}, with its contrasts squared ${boundWords(given, weighing.squared)}`,
      ...missingRockNotes(rangeCase),
      fewNote(range.horizons),
    ]),
  };
}

export function recoverySurvival(rangeCase: RangeCase): Survival | undefined {
  const { weighing } = rangeCase;
  return weighing.kind === "known" ? pivotSurvival(rangeCase, weighing.weighed) : undefined;
}

function fitWords(levels: readonly number[]): string | undefined {
  const fit = recoveryFit([levels]);
  if (fit === undefined) return undefined;
  return `fit of ${fit.finds} finds between first and last p = ${Math.round(fit.p * 1000) / 1000}`;
}

function boundWords(rangeCase: RangeCase, { range, coordinate }: InCoordinate): string {
  const bound = uniformBound(range, rangeCase.confidence);
  const heightM = bound === undefined ? undefined : coordinate.toHeight(bound, "upper");
  return heightM === undefined ? "open" : levelWords(rangeCase, heightM);
}

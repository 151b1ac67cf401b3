import { metres, note } from "../ranges/range-case.ts";
import { informative } from "./common-end.ts";
import { type DurationBox, durationBox, durationLowerBound } from "./duration.ts";
import type { TaxonRange } from "./range-data.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase } from "./set-case.ts";

export interface BoxTaxa {
  readonly ranges: readonly TaxonRange[];
  /** False where fewer than two taxa have the horizons asked for: then all are used. */
  readonly isSelected: boolean;
}

/** The taxa of the box: those with at least `timing.durationHorizons` horizons, a rule set before any result. */
export function boxTaxa({ set, durationHorizons }: SetCase): BoxTaxa {
  const rich = set.ranges.filter((range) => range.horizons >= durationHorizons);
  const isSelected = informative(rich).length >= 2;
  return { ranges: isSelected ? rich : set.ranges, isSelected };
}

/** `how-gradual`: the least duration of all taxa, the box of the taxa with many horizons, and that of all beside it. */
export function durationAnswers(setCase: SetCase): TimingAnswer[] {
  const { set } = setCase;
  const chosen = boxTaxa(setCase);
  const answers = [lowerAnswer(setCase), boxAnswer(setCase, chosen.ranges)];
  if (chosen.ranges.length < set.ranges.length) answers.push(boxAnswer(setCase, set.ranges));
  return answers;
}

/** Index, among the informative of them, of the taxon that decides the upper limit of the box. */
export function widestTaxon(setCase: SetCase): TaxonRange | undefined {
  const { ranges } = boxTaxa(setCase);
  const box = durationBox(ranges, setCase.coordinate, setCase.confidence);
  if (box?.widest === undefined) return undefined;
  const kept = ranges.filter((range) => range.exponent >= 1 && range.last > range.base);
  return kept[box.widest];
}

function lowerAnswer(setCase: SetCase): TimingAnswer {
  const { set, coordinate, confidence } = setCase;
  const fields = {
    ...commonFields(setCase, informative(set.ranges).length),
    question: "how-gradual",
    method: "duration-lower",
    level: confidence,
    unit: "m",
  } as const;
  const low = durationLowerBound(set.ranges, coordinate, confidence);
  if (low === undefined) return { ...fields, outcome: "undefined", note: tooFewNote };
  return { ...fields, low, outcome: "closed", note: low === 0 ? "one level is not excluded" : "" };
}

const tooFewNote = "fewer than two taxa with an informative range";

function boxAnswer(setCase: SetCase, ranges: readonly TaxonRange[]): TimingAnswer {
  const { set, coordinate, confidence } = setCase;
  const used = informative(ranges).length;
  const fields = {
    ...commonFields(setCase, used),
    question: "how-gradual",
    method: "duration-box",
    level: confidence,
    unit: "m",
  } as const;
  const box = durationBox(ranges, coordinate, confidence);
  if (box === undefined) return { ...fields, outcome: "undefined", note: tooFewNote };
  const words = `${used} of ${set.ranges.length} taxa used`;
  if (box.highM === undefined)
    return {
      ...fields,
      low: box.lowM,
      outcome: "open",
      note: note(words, "a bound lies beyond known recovery"),
    };
  return {
    ...fields,
    low: box.lowM,
    high: box.highM,
    outcome: "closed",
    note: note(words, topNote(setCase, box)),
  };
}

function topNote({ section }: SetCase, { boundsM }: DurationBox): string | undefined {
  const above = boundsM.filter((bound) => bound !== undefined && bound > section.topM).length;
  return above === 0
    ? undefined
    : `${above} bounds lie above the section's top (${metres(section.topM)}), recovery continued there`;
}

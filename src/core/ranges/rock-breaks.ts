import type { Section } from "../study/model.ts";
import { levelWords, metres, type RangeCase } from "./range-case.ts";
import { breakShares } from "./recovery-hiatus.ts";

/** A level at which rock is missing: a declared hiatus, or a cut by a fault with the thickness that it may hide. */
export interface RockBreak {
  readonly name: string;
  readonly heightM: number;
  readonly missingM?: readonly [low: number, high: number];
}

export function rockBreaks(section: Section): readonly RockBreak[] {
  const hiatuses = section.horizons
    .filter(({ kind }) => kind === "hiatus")
    .map(({ name, heightM }): RockBreak => ({ name: `hiatus ${name}`, heightM }));
  const cuts = section.intervals
    .filter(({ kind }) => kind === "fault-cut")
    .map(({ baseM, topM, thicknessLowM, thicknessHighM }): RockBreak => {
      const least = thicknessLowM ?? (thicknessHighM === undefined ? undefined : 0);
      return {
        name: "fault",
        heightM: 0.5 * (baseM + topM),
        ...(least === undefined ? {} : { missingM: [least, thicknessHighM ?? least] }),
      };
    });
  return [...hiatuses, ...cuts].toSorted((a, b) => a.heightM - b.heightM);
}

/**
 * What an interval says of missing rock that it passes: confidence is the same all through it, because nothing could be
 * found there, so an interval of higher level holds all of it.
 *
 * @param reachAt confidence at which the interval reaches a level, in effective metres; undefined: not known.
 */
export function breakNotes(
  rangeCase: RangeCase,
  bound: number,
  reachAt: (level: number) => number | undefined,
): string[] {
  return passedBreaks(rangeCase, bound).map(({ name, heightM }) => {
    const reached = reachAt(rangeCase.coordinate.toEffective(heightM));
    const words = `all of the ${name} at ${levelWords(rangeCase, heightM)} lies inside`;
    return reached === undefined
      ? words
      : `${words}, as for every level above ${Math.round(reached * 10000) / 10000}`;
  });
}

/** The chance that the end lies in the rock that a fault hides, where its thickness is given; prior flat in thickness. */
export function missingRockNotes(rangeCase: RangeCase): string[] {
  const { range, coordinate, topM, breaks } = rangeCase;
  return breaks.flatMap(({ name, heightM, missingM }) => {
    if (missingM === undefined || heightM < range.lastM || heightM > topM) return [];
    const at = coordinate.toEffective(heightM);
    const [low, high] = missingM.map((missing) =>
      breakShares({
        length: range.last - range.base,
        exponent: range.exponent,
        below: at - range.last,
        above: coordinate.toEffective(topM) - at,
        missing,
      }),
    );
    const chances = `${Math.round(100 * low.within)} to ${Math.round(100 * high.within)} %`;
    const thickness = `${metres(missingM[0])} to ${metres(missingM[1])}`;
    return [
      `the ${name} at ${levelWords(rangeCase, heightM)} hides ${thickness} of rock, and the end lies there with a chance of ${chances}`,
    ];
  });
}

function passedBreaks({ breaks, range, coordinate }: RangeCase, bound: number): readonly RockBreak[] {
  return breaks.filter(({ heightM }) => heightM >= range.lastM && bound > coordinate.toEffective(heightM));
}

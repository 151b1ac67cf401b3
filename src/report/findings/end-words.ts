import type { RangeEnd } from "../../core/ranges/result.ts";
import type { Section } from "../../core/study/model.ts";
import { position } from "../wordings/numbers.ts";

/** Where an end stands against the main horizon, by one method at its level. */
export type EndStanding = "reaches" | "open" | "short" | "untold";

/** A top by one row: its interval reaches the main horizon, ends below it, has no bound inside the section, or is not told. */
export function standingOf({ outcome, highM, lastM }: RangeEnd, mainM: number): EndStanding {
  switch (outcome) {
    case "leaves-section":
    case "open":
      return "open";
    case "closed":
    case "in-hiatus":
      return Math.max(highM ?? lastM, lastM) >= mainM ? "reaches" : "short";
    case "empty":
    case "undefined":
    case "not-applicable":
      return "untold";
    default:
      return outcome satisfies never;
  }
}

/** What a row says of its end: `up to 30.18 m`, `goes beyond the section's top`. */
export function endWords(section: Section, { end, outcome, highM, lowM }: RangeEnd): string {
  const isTop = end !== "base";
  const boundM = isTop ? highM : lowM;
  switch (outcome) {
    case "closed":
      return boundM === undefined ? "no bound" : `${isTop ? "up" : "down"} to ${position(section, boundM)}`;
    case "in-hiatus":
      return boundM === undefined
        ? "ends in missing rock"
        : `into missing rock at ${position(section, boundM)}`;
    case "leaves-section":
      return `beyond the section's ${isTop ? "top" : "base"}`;
    case "open":
      return "nothing bounds it";
    case "empty":
      return "no level fits";
    case "undefined":
      return "cannot be told";
    case "not-applicable":
      return "does not apply";
    default:
      return outcome satisfies never;
  }
}

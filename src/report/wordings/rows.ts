import type { Candidate } from "../../core/study/finds-result.ts";
import { heightToGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";

/** A height in the section's own axis and unit. */
export const given = (section: Section | undefined, heightM: number): number | undefined =>
  section === undefined ? undefined : heightToGiven(heightM, section);

/** The rule behind a role in words, with the heights it compared. */
export function roleReason({ reason, findsBelowCeiling }: Candidate): string {
  const { rule, value, limit } = reason;
  const aside =
    findsBelowCeiling > 0 ? `; ${findsBelowCeiling} finds above it within reach of mixing set aside` : "";
  switch (rule) {
    case "first-above-horizon":
      return `lowest find ${value} m above the main horizon ${limit} m`;
    case "first-above-base-of-smear":
      return `lowest find ${value} m above the base of the smear ${limit} m`;
    case "last-above-interval":
      return `highest in-place find ${value} m above the main horizon's interval, up to ${limit} m`;
    case "last-above-ceiling":
      return `highest in-place find ${value} m above its reworking ceiling ${limit} m`;
    case "first-above-start":
      return `lowest find ${value} m above timing.startBelow, ${limit} m`;
    case "horizons-under-minimum":
      return `${value} horizons, fewer than taxa.minimumHorizons ${limit}`;
    case "ends-in-question":
      return `highest find ${value} m, not above the main horizon's interval, up to ${limit} m${aside}`;
    case "no-horizon-here":
      return `${value} horizons, and the main horizon is not placed here`;
    default:
      return rule satisfies never;
  }
}

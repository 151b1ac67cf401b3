import { roundedWords } from "./rounded-words.ts";
import type { SectionFrame } from "./section-frame.ts";

/** Says that a band is drawn magnified, and how much. */
export function lensNotes({ lens }: SectionFrame): readonly string[] {
  if (lens === undefined) return [];
  const thickness = roundedWords(lens.topM - lens.baseM);
  return [
    `Between the two breaks ${thickness} m are drawn ${roundedWords(lens.magnification)} times magnified.`,
  ];
}

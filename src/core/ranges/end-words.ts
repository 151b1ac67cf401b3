/** Words of notes for the end asked about: a base is looked for downward. */
export interface EndWords {
  readonly highest: string;
  readonly above: string;
  readonly higher: string;
  readonly upward: string;
  /** The end of the section that lies beyond: `section's top`. */
  readonly sectionEnd: string;
}

export const endWords: Readonly<Record<"top" | "base", EndWords>> = {
  top: {
    highest: "highest",
    above: "above",
    higher: "higher",
    upward: "upward",
    sectionEnd: "section's top",
  },
  base: {
    highest: "lowest",
    above: "below",
    higher: "lower",
    upward: "downward",
    sectionEnd: "section's base",
  },
};

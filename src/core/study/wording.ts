import type { Problem } from "./problem.ts";

/** Where a problem stands and what its sentence needs. */
export interface ProblemPlace {
  readonly file: string;
  readonly row?: number;
  readonly column?: string;
  readonly found: string;
  /** The name, list or limit that the wording of this code speaks of. */
  readonly detail?: string;
  /** The nearest known name, where there is one. */
  readonly nearest?: string;
  /** What the cell must have been meant to hold, where that is one thing alone. */
  readonly now?: string;
}

type Words = Pick<Problem, "severity" | "expected" | "mend">;
export type Wording = (place: ProblemPlace) => Words;

export const error = (expected: string, mend: string): Words => ({ severity: "error", expected, mend });
export const caution = (expected: string, mend: string): Words => ({ severity: "caution", expected, mend });
export const nearest = (place: ProblemPlace) =>
  place.nearest === undefined ? "" : ` Did you mean ${place.nearest}?`;

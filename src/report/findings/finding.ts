import type { Basis } from "../../core/basis.ts";
import type { Words } from "../wordings/words.ts";

export type Station = "tables" | "markers" | "fence" | "ranges" | "timing";

/** A line of numbers beside a plate. */
export interface NumberLine {
  readonly label: string;
  readonly value: string;
  readonly note?: string;
  /** The heading that lines of one kind stand under; default Numbers. */
  readonly group?: string;
  /** From 0 to 1, for a bar beside it. */
  readonly share?: number;
  /** Folded away until asked for. */
  readonly isMore?: boolean;
}

export interface Weakness {
  /** The caution's code; absent for a flag. */
  readonly code?: string;
  readonly severity: "warning" | "note";
  readonly words: Words;
}

/** What a plate shows, in the order of an argument: the finding, its numbers, what weakens it, how it was got. */
export interface Finding {
  readonly station: Station;
  /** Absent where the finding speaks of the whole study. */
  readonly section?: string;
  readonly set?: string;
  readonly sentence: Words;
  readonly numbers: readonly NumberLine[];
  readonly weaknesses: readonly Weakness[];
  readonly methods: readonly Basis[];
}

import type { Basis, Caution } from "../basis.ts";

/** How one section maps to the common scale: piecewise linear through its shared horizons. */
export interface SectionAlignment {
  readonly section: string;
  readonly horizons: readonly string[];
  readonly heightsM: readonly number[];
  readonly sigmasM: readonly number[];
  readonly targets: readonly number[];
  readonly targetSigmas: readonly number[];
}

export interface Tie {
  readonly section: string;
  readonly horizon: string;
  readonly positionM: number;
  readonly common: number;
  readonly residual: number;
}

/** Sections on one scale in metres from the datum (the main horizon at 0). */
export interface Alignment {
  readonly datum?: string;
  readonly horizons: readonly string[];
  readonly beyond: "rigid" | "gain";
  readonly sections: readonly SectionAlignment[];
  readonly ties: readonly Tie[];
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}

/** A height on the common scale, with one standard deviation. */
export interface CommonPosition {
  readonly common: number;
  readonly sigma: number;
  /** At a horizon where the gap between two levels has no rock here: the far end of the gap. */
  readonly commonHigh?: number;
}

import type { LevelPosterior } from "../scenarios/level-posterior.ts";
import type { BetweenSections } from "./between-sections.ts";
import type { PooledLevel } from "./pooled-level.ts";
import type { PooledSet } from "./pooled-sets.ts";
import type { PooledTarget } from "./pooled-targets.ts";

/** One set in several sections, answered. */
export interface JointSet {
  readonly set: PooledSet;
  readonly target: PooledTarget;
  readonly level: PooledLevel;
  /** Of the common level from the horizons searched; absent where they are not listed. */
  readonly sampled?: LevelPosterior;
  /** Level of the highest last find, and top of the window. */
  readonly highest: number;
  readonly top: number;
  readonly confidence: number;
  /** Every section is placed on the scale without error. */
  readonly isExact: boolean;
  readonly between: BetweenSections | undefined;
}

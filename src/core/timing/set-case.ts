import type { MarkerHorizon } from "../markers/result.ts";
import type { Coordinate } from "../ranges/coordinate.ts";
import type { Section } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
import type { Simulation } from "./pulses-bootstrap.ts";
import type { TimingAnswer } from "./result.ts";
import type { SetOfRanges } from "./sets.ts";

/** One set of taxa in one section, with all that its questions are answered from. */
export interface SetCase {
  readonly section: Section;
  readonly coordinate: Coordinate;
  readonly set: SetOfRanges;
  /** Every horizon placed in the section, with the name it goes by. */
  readonly horizons: readonly PlacedHorizon[];
  readonly confidence: number;
  readonly durationHorizons: number;
  readonly settings: Settings;
  /** Height that metres in the settings are counted from: the main horizon's, else 0. */
  readonly originM: number;
}

/** Share of `replicates` that each of the many simulations of an analysis draws: their p comes with its own error. */
const SHARE_OF_REPLICATES = 0.1;

export function simulationOf({ seed, replicates }: Settings): Simulation {
  return { seed, replicates: Math.ceil(SHARE_OF_REPLICATES * replicates) };
}

export interface PlacedHorizon {
  readonly name: string;
  readonly marker: MarkerHorizon;
}

/** What every answer about a set shares. */
export function commonFields({ section, set }: SetCase, taxa: number) {
  return {
    section: section.name,
    set: set.set,
    ...(set.group === undefined ? {} : { group: set.group }),
    taxa,
    taxaOfSet: set.taxa.length,
  } as const satisfies Partial<TimingAnswer>;
}

import type { Membership, Offset, Scenario, ScenarioDensity } from "../result.ts";
import type { PlacedHorizon } from "../set-case.ts";
import type { ScenarioEvidence } from "./evidence.ts";
import { horizonLaw } from "./horizon-law.ts";
import type { LevelPosterior } from "./level-posterior.ts";
import { offsetFrom } from "./offset.ts";
import { pulsesScenario } from "./variants.ts";
import type { SetName } from "./weights.ts";

/** The posterior of one level of a scenario. */
export interface ScenarioLevel {
  readonly scenario: Scenario;
  /** Rank from below; absent where the scenario has one level. */
  readonly pulse?: number;
  readonly posterior: LevelPosterior;
}

export function levelsOf({ single, pulses }: ScenarioEvidence): readonly ScenarioLevel[] {
  return [
    ...(single.posterior === undefined ? [] : [{ scenario: "single" as const, posterior: single.posterior }]),
    ...pulses.flatMap(({ pulses: count, posterior }) =>
      (posterior?.levels ?? []).map((level, g) => ({
        scenario: pulsesScenario(count),
        pulse: g + 1,
        posterior: level,
      })),
    ),
  ];
}

export function offsetsOf(
  place: SetName,
  levels: readonly ScenarioLevel[],
  { horizons, confidence }: { readonly horizons: readonly PlacedHorizon[]; readonly confidence: number },
): Offset[] {
  return levels.flatMap(({ posterior, ...level }) =>
    horizons.map(
      ({ name, marker }): Offset => ({
        ...place,
        ...level,
        horizon: name,
        ...offsetFrom(posterior, horizonLaw(marker), confidence),
        level: confidence,
        unit: "m",
      }),
    ),
  );
}

export function membershipOf(
  place: SetName,
  { pulses }: ScenarioEvidence,
  taxa: readonly string[],
): Membership[] {
  return pulses.flatMap(({ pulses: count, posterior }) =>
    (posterior?.membership ?? []).flatMap((chances, g) =>
      taxa.map((taxon, i) => ({
        ...place,
        scenario: pulsesScenario(count),
        taxon,
        pulse: g + 1,
        probability: Math.min(1, Math.max(0, chances[i])),
      })),
    ),
  );
}

/** Even steps of a drawn density, and the tails left out of it. */
const STEPS = 80;
const TAIL = 5e-4;

export function densitiesOf(place: SetName, levels: readonly ScenarioLevel[]): ScenarioDensity[] {
  return levels.map(({ posterior, ...level }) => {
    const lowM = posterior.quantile(TAIL);
    const highM = posterior.quantile(1 - TAIL);
    const even = Array.from({ length: STEPS + 1 }, (_, i) => lowM + ((highM - lowM) * i) / STEPS);
    const edges = posterior.edgesM.filter((edgeM) => edgeM > lowM && edgeM < highM);
    const heightsM = [...new Set([...even, ...edges])].toSorted((a, b) => a - b);
    return { ...place, ...level, heightsM, density: heightsM.map(posterior.density) };
  });
}

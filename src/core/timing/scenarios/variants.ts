import type { Evidence, ScenarioEvidence } from "./evidence.ts";
import { DOUBLED, HALVED, OWN } from "./evidence.ts";

/** The same list of scenarios under one set of priors and forms; without a name, the declared ones. */
export interface Variant {
  readonly name?: string;
  readonly evidences: readonly Evidence[];
}

interface Choice {
  readonly name?: string;
  readonly top?: number;
  readonly longest?: number;
  readonly isEqual?: boolean;
  readonly isConfined?: boolean;
}

/** Changes of priors and forms that are always worked out beside the declared ones. */
const choices: readonly Choice[] = [
  {},
  { name: "equal", isEqual: true },
  { name: "confined", isConfined: true },
  { name: "window-halved", top: HALVED },
  { name: "window-doubled", top: DOUBLED },
  { name: "longest-halved", longest: HALVED },
  { name: "longest-doubled", longest: DOUBLED },
];

export function variantsOf(evidence: ScenarioEvidence): readonly Variant[] {
  const kept = evidence.pulses.length > 0 ? choices : choices.filter((choice) => choice.isEqual !== true);
  return kept.map((choice) => ({
    ...(choice.name === undefined ? {} : { name: choice.name }),
    evidences: listed(evidence, choice),
  }));
}

/** The declared priors and forms alone. */
export function ownVariant(name: string, evidence: ScenarioEvidence): Variant {
  return { name, evidences: listed(evidence, {}) };
}

function listed(evidence: ScenarioEvidence, choice: Choice): readonly Evidence[] {
  const { single, pulses, gradual, atHorizons, independent } = evidence;
  const { top = OWN, longest = OWN, isEqual = false, isConfined = false } = choice;
  return [
    { scenario: "single", log: single.logEvidence[top] },
    ...pulses.map((found): Evidence => {
      const error = found.errors?.[top];
      return {
        scenario: pulsesScenario(found.pulses),
        log: (isEqual ? found.logEvidenceEqual : found.logEvidence)[top],
        ...(error === undefined ? {} : { error }),
      };
    }),
    {
      scenario: "gradual",
      log: isConfined ? gradual.logEvidenceConfined[top] : gradual.logEvidence[longest][top],
    },
    ...atHorizons,
    { scenario: "independent", log: independent[top] },
  ];
}

export function pulsesScenario(pulses: number): "pulses-2" | "pulses-3" | "pulses-4" {
  return pulses === 2 ? "pulses-2" : pulses === 3 ? "pulses-3" : "pulses-4";
}

import type { TimingAnswer } from "../result.ts";
import { commonFields, type SetCase } from "../set-case.ts";
import type { ScenarioEvidence } from "./evidence.ts";
import { weightedQuantiles } from "./weighted.ts";
import type { Weighed } from "./weights.ts";

/** `how-gradual: duration-posterior`: how long the disappearance lasted if it was gradual. */
export function durationAnswer(setCase: SetCase, { gradual }: ScenarioEvidence): TimingAnswer[] {
  const { confidence, set, settings } = setCase;
  const fields = {
    ...commonFields(setCase, set.ranges.length),
    question: "how-gradual",
    method: "duration-posterior",
    level: confidence,
    unit: "m",
  } as const;
  if (gradual.durations === undefined)
    return [{ ...fields, outcome: "undefined", note: "no gradual end inside the window fits" }];
  const tail = 0.5 * (1 - confidence);
  const [low, estimate, high] = weightedQuantiles(gradual.durations, [tail, 0.5, 1 - tail]);
  const note = `given a gradual end; durations up to ${settings.timing.longestDuration} m equally likely beforehand`;
  return [{ ...fields, estimate, low, high, outcome: "closed", note }];
}

/** `how-many: pulses-posterior`: the probability of each number of levels; a gradual end has none. */
export function pulsesAnswers(setCase: SetCase, weighed: readonly Weighed[]): TimingAnswer[] {
  const sums = new Map<number, number>();
  for (const { scenario, probability } of weighed) {
    const levels = levelCounts[scenario];
    if (levels !== undefined && probability !== undefined)
      sums.set(levels, (sums.get(levels) ?? 0) + probability);
  }
  return [...sums].map(([part, estimate]) => ({
    ...commonFields(setCase, setCase.set.ranges.length),
    question: "how-many",
    method: "pulses-posterior",
    part,
    estimate: Math.min(1, estimate),
    outcome: "closed",
    note:
      part === 1
        ? "one level anywhere or at a horizon; gradual ends hold the rest"
        : "gradual ends hold the rest",
  }));
}

/** Levels of the scenarios that have a number of them. */
const levelCounts: Readonly<Partial<Record<Weighed["scenario"], number>>> = {
  single: 1,
  "at-horizon": 1,
  "pulses-2": 2,
  "pulses-3": 3,
  "pulses-4": 4,
};

import type { ScenarioWeight } from "../../core/timing/result.ts";

const titles: Readonly<Record<ScenarioWeight["scenario"], string>> = {
  single: "One level, anywhere",
  "pulses-2": "Two pulses",
  "pulses-3": "Three pulses",
  "pulses-4": "Four pulses",
  gradual: "Gradual",
  "at-horizon": "One level at a horizon",
  "among-horizons": "One level at any horizon",
  independent: "Each at its own level",
};

/** A scenario as a line of numbers calls it. */
export const scenarioTitle = ({ scenario, horizon }: Pick<ScenarioWeight, "scenario" | "horizon">): string =>
  horizon === undefined ? titles[scenario] : `One level at ${horizon}`;

const phrases: Readonly<Record<string, string>> = {
  "one-level": "one level",
  single: "one level",
  "pulses-2": "two pulses",
  "pulses-3": "three pulses",
  "pulses-4": "four pulses",
  gradual: "a gradual end",
  independent: "ends each at its own level",
};

/** A scenario inside a sentence. */
export const scenarioPhrase = (kind: string): string =>
  phrases[kind] ?? kind.replace("at-horizon ", "one level at ");

const variants: Readonly<Record<string, string>> = {
  equal: "taxa shared evenly among pulses",
  confined: "a gradual end inside the window",
  "window-halved": "half the window",
  "window-doubled": "twice the window",
  "longest-halved": "half the longest duration",
  "longest-doubled": "twice the longest duration",
  "constant-recovery": "constant recovery",
  sampled: "horizons searched alone",
  continuous: "finds that could lie anywhere",
};

/** A change of priors or forms as a person reads it. */
export const variantWords = (variant: string): string => variants[variant] ?? variant;

const ordinals: Readonly<Record<number, readonly string[]>> = {
  2: ["earlier", "later"],
  3: ["first", "second", "third"],
  4: ["first", "second", "third", "fourth"],
};

/** The pulse of a rank from below: `earlier`, `second`. */
export const pulseWords = (scenario: ScenarioWeight["scenario"], pulse: number): string =>
  ordinals[Number(scenario.slice(-1))]?.[pulse - 1] ?? `number ${pulse}`;

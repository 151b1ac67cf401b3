import type { Settings } from "../../study/settings.ts";
import type { CandidateHorizon, Evidence } from "./evidence.ts";

/** How one level at a named horizon is called in `timing.priors`. */
const horizonKey = (name: string) => `at-horizon:${name}`;

/**
 * Prior probabilities of the compared scenarios, adding to 1. Every idea has weight 1 where `timing.priors` names none: one
 * level anywhere (`single`), one level at one of the marker horizons (shared among them by `timing.horizonWeights`, or
 * equally), two, three, four pulses, gradual; independent ends 0. So one level at a horizon is one idea however many
 * horizons are placed. `at-horizon` names the weight of that idea, `at-horizon:<name>` that of one horizon. Absent where all
 * weights are 0.
 */
export function priorsOf(
  evidences: readonly Evidence[],
  horizons: readonly CandidateHorizon[],
  { priors }: Settings["timing"],
): readonly number[] | undefined {
  const family = priors["at-horizon"] ?? priors["among-horizons"] ?? 1;
  const weights = evidences.map(({ scenario, horizon }) => {
    if (horizon === undefined) return priors[scenario] ?? (scenario === "independent" ? 0 : 1);
    const share = horizons.find(({ name }) => name === horizon)?.share ?? 0;
    return priors[horizonKey(horizon)] ?? family * share;
  });
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return total > 0 ? weights.map((weight) => weight / total) : undefined;
}

/** Shares of the candidate horizons by `timing.horizonWeights`; equal where it names none of them. */
export function horizonShares(
  names: readonly string[],
  { horizonWeights }: Settings["timing"],
): readonly number[] {
  const weights = names.map((name) => horizonWeights[name] ?? 0);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return names.map((_, j) => (total > 0 ? weights[j] / total : 1 / names.length));
}

import type { EndLikelihood } from "./end-likelihood.ts";
import type { EndWindow } from "./end-window.ts";
import { exactlyFromAtMost, exactlyFromAtMostEqual } from "./from-at-most.ts";
import { pulsesSummary } from "./pulses-summary.ts";
import { type SampledPulses, type Step, sampledPulses } from "./sampled-pulses.ts";
import { MOST_PARTITION_TAXA, pulsesByPartitions } from "./set-partitions.ts";
import type { EvidenceByTop } from "./single-level.ts";
import { threePulses } from "./three-pulses.ts";
import { type PulsesPosterior, twoPulses } from "./two-pulses.ts";

/** Evidence of exactly K pulses, every one holding a taxon. */
export interface PulsesEvidence {
  readonly pulses: number;
  readonly logEvidence: EvidenceByTop;
  readonly logEvidenceEqual: EvidenceByTop;
  /** Monte Carlo standard errors, where it was simulated. */
  readonly errors?: readonly number[];
  readonly posterior?: PulsesPosterior;
}

export interface PulsesOptions {
  /** Of one level, in the same windows. */
  readonly single: EvidenceByTop;
  readonly most: number;
  readonly seed: number;
  readonly step?: Step;
}

/** Three pulses are integrated up to this many taxa; with more the work is simulated. */
const MOST_QUADRATURE_TAXA = 20;
const DRAWS = { 3: 4096, 4: 1024 };

/**
 * Exactly two to `most` pulses. Two by quadrature. Three and four: by partitions of the taxa up to 14 of them, three by
 * quadrature up to 20, else by importance sampling with its error; heights and memberships of three and four always come
 * from those draws.
 */
export function pulsesUpTo(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  options: PulsesOptions,
): readonly PulsesEvidence[] {
  const found: PulsesEvidence[] = [];
  if (options.most >= 2 && taxa.length >= 2) found.push({ pulses: 2, ...twoPulses(taxa, window) });
  for (const pulses of [3, 4] as const) {
    if (options.most < pulses || taxa.length < pulses) break;
    found.push(morePulses(taxa, window, { ...options, pulses, fewer: found }));
  }
  return found;
}

interface More extends PulsesOptions {
  readonly pulses: 3 | 4;
  readonly fewer: readonly PulsesEvidence[];
}

function morePulses(taxa: readonly EndLikelihood[], window: EndWindow, more: More): PulsesEvidence {
  const { pulses, seed, step } = more;
  const options = { pulses, seed, draws: DRAWS[pulses], ...(step === undefined ? {} : { step }) };
  const sampled = sampledPulses(taxa, window, options);
  const posterior = sampled === undefined ? undefined : pulsesSummary(sampled.grid, sampled.drawn, pulses);
  return {
    pulses,
    ...evidenceOf(taxa, window, { ...more, sampled }),
    ...(posterior === undefined ? {} : { posterior }),
  };
}

type Evidences = Omit<PulsesEvidence, "pulses" | "posterior">;

function evidenceOf(
  taxa: readonly EndLikelihood[],
  window: EndWindow,
  more: More & { readonly sampled: SampledPulses | undefined },
): Evidences {
  const { pulses, sampled, step } = more;
  if (taxa.length <= MOST_PARTITION_TAXA) return pulsesByPartitions(taxa, window, pulses);
  if (pulses === 3 && taxa.length <= MOST_QUADRATURE_TAXA)
    return fromAtMost(taxa, threePulses(taxa, window, step), more);
  const none = window.topsM.map(() => Number.NEGATIVE_INFINITY);
  if (sampled === undefined) return { logEvidence: none, logEvidenceEqual: none };
  const { logEvidence, logEvidenceEqual, errors } = sampled;
  return { logEvidence, logEvidenceEqual, errors };
}

function fromAtMost(
  taxa: readonly EndLikelihood[],
  { atMost, atMostEqual }: ReturnType<typeof threePulses>,
  { single, fewer }: More,
): Evidences {
  const fewerAt = (t: number) => [single[t], ...fewer.map((f) => f.logEvidence[t])];
  const fewerEqualAt = (t: number) => [single[t], ...fewer.map((f) => f.logEvidenceEqual[t])];
  return {
    logEvidence: atMost.map((z, t) => exactlyFromAtMost(z, fewerAt(t), taxa.length)),
    logEvidenceEqual: atMostEqual.map((z, t) => exactlyFromAtMostEqual(z, fewerEqualAt(t), taxa.length)),
  };
}

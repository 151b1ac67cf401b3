import type { TrueTaxon, Truth } from "./truth.ts";

/** What a variant changes in the written truth; what it does not name stays. */
export interface TruthChange {
  readonly seed?: number;
  /** The sections kept, by name. */
  readonly sections?: readonly string[];
  readonly earlyStepKa?: number;
  readonly eventStepKa?: number;
  /** Every taxon that ended early or at the event ends alone, evenly spread from this moment to the event. */
  readonly gradualFromKa?: number;
  readonly recoveryByKa?: Truth["recoveryByKa"];
  readonly isReworked?: boolean;
}

/** Other truths under which the same sections could have been searched. */
export const truthChanges = {
  written: {},
  "one level": { earlyStepKa: 0 },
  gradual: { gradualFromKa: -200 },
  "later marker": { earlyStepKa: 88, eventStepKa: 88 },
  "recovery declines": {
    earlyStepKa: 0,
    recoveryByKa: [
      [-250, 1.8],
      [0, 0.05],
      [0.001, 1],
    ],
  },
} as const satisfies Readonly<Record<string, TruthChange>>;

/** Steps through a list that meet every place once and leave neighbours far apart: rate and group then tell nothing of the end. */
const STRIDE = 17;

function spread(taxa: readonly TrueTaxon[], fromKa: number): TrueTaxon[] {
  const ending = taxa.filter(({ end }) => end === "early" || end === "event");
  const rank = new Map(ending.map(({ name }, place) => [name, (place * STRIDE) % ending.length]));
  return taxa.map((taxon): TrueTaxon => {
    const place = rank.get(taxon.name);
    return place === undefined
      ? taxon
      : { ...taxon, end: "alone", lastKa: fromKa * (1 - (place + 0.5) / ending.length) };
  });
}

/** The truth with a change made to it. */
export function changedTruth(truth: Truth, change: TruthChange): Truth {
  const { seed, sections, earlyStepKa, eventStepKa, gradualFromKa, recoveryByKa, isReworked = true } = change;
  return {
    ...truth,
    seed: seed ?? truth.seed,
    earlyStepKa: earlyStepKa ?? truth.earlyStepKa,
    eventStepKa: eventStepKa ?? truth.eventStepKa,
    recoveryByKa: recoveryByKa ?? truth.recoveryByKa,
    reworked: isReworked ? truth.reworked : [],
    taxa: gradualFromKa === undefined ? truth.taxa : spread(truth.taxa, gradualFromKa),
    sections: truth.sections.filter(({ section }) => sections === undefined || sections.includes(section)),
  };
}

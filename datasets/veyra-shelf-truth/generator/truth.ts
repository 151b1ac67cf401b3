import * as v from "valibot";

const pair = v.tuple([v.number(), v.number()]);
const notes = v.optional(v.string(), "");

const taxon = v.strictObject({
  name: v.string(),
  group: v.string(),
  /** `alone`: at its own `lastKa`, with no other taxon. */
  end: v.picklist(["early", "event", "survivor", "aftermath", "alone"]),
  firstKa: v.optional(v.number()),
  lastKa: v.optional(v.number()),
  /** Expected chances of presence in a sample of standard effort. */
  rate: v.number(),
  meanCount: v.number(),
  guild: v.string(),
  feeding: v.string(),
  synonym: v.optional(v.string()),
});

const group = v.strictObject({
  group: v.string(),
  search: v.picklist(["bulk", "hand", "thin-section"]),
  mixingLengthM: v.optional(v.number()),
  effort: pair,
  standardEffort: v.number(),
  effortStep: v.number(),
  effortUnit: v.string(),
  counting: v.picklist(["count", "presence"]),
});

const section = v.strictObject({
  section: v.string(),
  name: v.string(),
  code: v.string(),
  axis: v.picklist(["height", "depth"]),
  unit: v.picklist(["m", "cm", "ft"]),
  datum: v.string(),
  bottomM: v.number(),
  topM: v.number(),
  eventSurfaceM: v.number(),
  mixingLengthM: v.number(),
  fluenceNgCm2: v.number(),
  rateBelowMPerKa: v.number(),
  rateAboveMPerKa: v.number(),
  hiatus: v.optional(v.strictObject({ missingM: v.number(), notes: v.string() })),
  iridium: v.strictObject({
    background: v.number(),
    lnSd: v.number(),
    unit: v.picklist(["ppb", "ng/g", "pg/g"]),
    errorKind: v.picklist(["1s", "2s", "1s%", "2s%"]),
    detectionLimits: v.array(v.number()),
    relativeError: v.number(),
  }),
  legs: v.array(v.strictObject({ leg: v.string(), readings: v.array(pair) })),
  intervals: v.array(
    v.strictObject({
      kind: v.picklist(["covered", "core-loss", "not-searched"]),
      base: v.number(),
      top: v.number(),
      notes,
    }),
  ),
  bulk: v.strictObject({
    spacingBelow: v.number(),
    spacingAbove: v.number(),
    thickness: v.number(),
    form: v.picklist(["thickness", "base-top", "point"]),
  }),
  slabs: v.array(v.strictObject({ base: v.number(), thickness: v.number(), number: v.number() })),
  hand: v.strictObject({ spacing: v.number(), thickness: pair }),
  recovery: v.number(),
  step: v.number(),
  contact: v.picklist(["sharp", "burrowed", "erosive"]),
  contactRefersTo: v.picklist(["event-surface", "base-of-smear"]),
  ashes: v.array(v.string()),
  givenHorizon: v.optional(
    v.strictObject({
      position: v.number(),
      below: v.number(),
      above: v.number(),
      shape: v.picklist(["normal", "uniform"]),
      notes,
    }),
  ),
});

const truth = v.strictObject({
  about: v.string(),
  seed: v.number(),
  horizon: v.string(),
  eventAgeMa: v.number(),
  earlyStepKa: v.number(),
  /** When the taxa of the event end: with it, unless a variant of the truth says otherwise. */
  eventStepKa: v.optional(v.number(), 0),
  /** Recovery against its usual value by moment, linear between the moments and constant beyond them; none: constant. */
  recoveryByKa: v.optional(v.array(pair), []),
  reversalKa: v.number(),
  ashes: v.array(v.strictObject({ horizon: v.string(), bed: v.string(), ka: v.number() })),
  carbon: v.strictObject({ beforePerMil: v.number(), stepPerMil: v.number(), recoveryKa: v.number() }),
  mercury: v.strictObject({ fromKa: v.number(), toKa: v.number(), factor: v.number() }),
  iridiumToNickelPpmPerNgG: v.number(),
  peak: v.strictObject({ shockedQuartzShare: v.number(), spherulesPerGram: v.number() }),
  barrenShare: v.number(),
  groups: v.array(group),
  taxa: v.array(taxon),
  reworked: v.array(
    v.strictObject({
      section: v.string(),
      taxon: v.string(),
      aboveEventM: v.number(),
      mark: v.picklist(["", "suspected", "yes"]),
    }),
  ),
  sections: v.array(section),
});

export type Truth = v.InferOutput<typeof truth>;
export type TrueSection = v.InferOutput<typeof section>;
export type TrueTaxon = v.InferOutput<typeof taxon>;
export type TrueGroup = v.InferOutput<typeof group>;

/** The written truth, checked. Throws where it does not say what the generator needs. */
export const readTruth = (text: string): Truth => v.parse(truth, JSON.parse(text));

import { beforeAll, describe, expect, it } from "vitest";
import { trueLevels } from "../../datasets/veyra-shelf-truth/generator/study.ts";
import { changedTruth, truthChanges } from "../../datasets/veyra-shelf-truth/generator/variants.ts";
import { isFull } from "./core/ranges/simulated-finds.ts";
import { overclaims } from "./example-overclaims.ts";
import { covers, type Drawn, type Told, tell, writtenTruth } from "./example-variants.ts";

/**
 * The example made anew under other truths. How often each claim holds was counted in 8 to 11 sections of other seeds and
 * rounded down; a count here fails where it is improbable at that rate. The rates are this design's, as the sections were
 * sampled, not a property of the methods.
 */
const SEEDS = 100;
const FIRST_SEED = 401;
/** A loaded machine may take this long to draw and answer the sections of one truth. */
const HOOK_MS = 3_600_000;
/** Chance that a count this low is met at the stated rate: fails below. */
const IMPROBABLE = 0.01;

interface Claim {
  readonly says: string;
  /** Share of sections in which it holds, at least. */
  readonly rate: number;
  /** Undefined where it cannot be asked. */
  readonly holds: (told: Told) => boolean | undefined;
}

interface Truth extends Pick<Drawn, "section" | "change" | "against"> {
  readonly name: string;
  readonly claims: readonly Claim[];
}

const earlyM = trueLevels(writtenTruth).find(
  ({ section, end }) => section === "orskel-ledge" && end === "early",
)?.lastM;
const eventM = writtenTruth.sections.find(({ section }) => section === "orskel-ledge")?.eventSurfaceM ?? 0;
const stepM = (earlyM ?? 0) - eventM;

const leads =
  (kind: Told["lead"]) =>
  ({ lead }: Told): boolean =>
    lead === kind;
/** The likelier of the two markers: the event or the upper ash. */
const favours = (horizon: string, other: string) => (told: Told) =>
  (told.horizonWeights.get(horizon) ?? 0) > (told.horizonWeights.get(other) ?? 0);

const truths: readonly Truth[] = [
  {
    name: "two levels, as written",
    section: "orskel-ledge",
    change: truthChanges.written,
    against: "veyra-impact",
    claims: [
      { says: "two pulses lead", rate: 0.85, holds: leads("pulses-2") },
      {
        says: "the later pulse's interval covers the event",
        rate: 0.7,
        holds: (t) => covers(t, "pulses-2", { offsetM: 0, pulse: 2 }),
      },
      {
        says: "the earlier pulse's interval covers the early step",
        rate: 0.7,
        holds: (t) => covers(t, "pulses-2", { offsetM: stepM, pulse: 1 }),
      },
      {
        says: "mixing is said to lift the earlier pulse",
        rate: 0.85,
        holds: (t) => t.codes.includes("scenario-level-mixed"),
      },
    ],
  },
  {
    name: "two levels, nothing reworked",
    section: "orskel-ledge",
    change: { ...truthChanges.written, isReworked: false },
    against: "veyra-impact",
    claims: [{ says: "two pulses lead", rate: 0.85, holds: leads("pulses-2") }],
  },
  ...["orskel-ledge", "vs-2"].map(
    (section): Truth => ({
      name: `one level at the event, ${section}`,
      section,
      change: truthChanges["one level"],
      against: "veyra-impact",
      claims: [
        { says: "one level leads", rate: 0.85, holds: leads("one-level") },
        { says: "the event is the likelier marker", rate: 0.9, holds: favours("veyra-impact", "ash-upper") },
        {
          says: "the interval covers the event",
          rate: 0.7,
          holds: (t) => covers(t, "single", { offsetM: 0 }),
        },
        { says: "no decline is told", rate: 0.7, holds: (t) => !t.isDistrusted },
      ],
    }),
  ),
  {
    name: "ends spread over 16 m",
    section: "orskel-ledge",
    change: truthChanges.gradual,
    against: "veyra-impact",
    claims: [
      { says: "a gradual end leads", rate: 0.85, holds: leads("gradual") },
      { says: "one level is rejected", rate: 0.9, holds: (t) => t.sentence.includes("rejected") },
    ],
  },
  ...["orskel-ledge", "vs-2"].map(
    (section): Truth => ({
      name: `one level at the later marker, judged against it, ${section}`,
      section,
      change: truthChanges["later marker"],
      against: "ash-upper",
      claims: [
        { says: "one level leads", rate: 0.7, holds: leads("one-level") },
        {
          says: "the later marker is the likelier one",
          rate: 0.9,
          holds: favours("ash-upper", "veyra-impact"),
        },
        {
          says: "the interval covers the later marker",
          rate: 0.7,
          holds: (t) => covers(t, "single", { offsetM: 0 }),
        },
      ],
    }),
  ),
  {
    name: "one level at the later marker, judged against the event",
    section: "orskel-ledge",
    change: truthChanges["later marker"],
    against: "veyra-impact",
    claims: [
      {
        says: "most taxa are said first to live on",
        rate: 0.9,
        holds: (t) => /^Most taxa live on|too few/.test(t.sentence),
      },
    ],
  },
  {
    name: "recovery that declines to a twentieth",
    section: "orskel-ledge",
    change: truthChanges["recovery declines"],
    against: "veyra-impact",
    claims: [
      {
        says: "the decline is told first",
        rate: 0.9,
        holds: (t) => t.sentence.startsWith("Finds of these taxa thin out upward"),
      },
      {
        says: "the comparison is said to lean on recovery",
        rate: 0.9,
        holds: (t) => t.codes.includes("scenario-leans-on-recovery"),
      },
    ],
  },
];

/** Chance of at most `hits` in `trials` at a rate. */
function chanceOfAtMost(hits: number, trials: number, rate: number): number {
  let [term, sum] = [(1 - rate) ** trials, 0];
  for (let k = 0; k <= hits; k++) {
    sum += term;
    term *= ((trials - k) / (k + 1)) * (rate / (1 - rate));
  }
  return sum;
}

// Each truth takes minutes: they are asked at full size only; the example as committed is held in unit/datasets.
describe.runIf(isFull).each(truths)("$name", ({ section, change, against, claims }) => {
  let told: readonly Told[] = [];
  beforeAll(() => {
    const seeds = Array.from({ length: SEEDS }, (_, i) => FIRST_SEED + i);
    told = seeds.flatMap((seed) => tell({ section, change, seed, against }) ?? []);
  }, HOOK_MS);

  it("is asked of the layer of the event in nearly every section", () => {
    expect(chanceOfAtMost(told.length, SEEDS, 0.75)).toBeGreaterThan(IMPROBABLE);
  });

  it.each(claims)("$says, in $rate of the sections or more", ({ rate, holds }) => {
    const answers = told.map(holds).filter((answer) => answer !== undefined);
    const hits = answers.filter((answer) => answer).length;
    expect(answers.length).toBeGreaterThan(0);
    expect(chanceOfAtMost(hits, answers.length, rate), `${hits} of ${answers.length}`).toBeGreaterThan(
      IMPROBABLE,
    );
  });

  it("is told no firmer than the numbers", () => {
    expect(told.flatMap(overclaims)).toEqual([]);
  });
});

it("keeps every other word of the truth as written", () => {
  const changed = changedTruth(writtenTruth, truthChanges.gradual);
  expect(changed.taxa.filter(({ end }) => end === "alone")).toHaveLength(40);
  expect(changedTruth(writtenTruth, truthChanges.written)).toEqual(writtenTruth);
});

import { pow } from "../numeric/elementary.ts";
import type { Section } from "../study/model.ts";
import { type AnomalyTest, anomalyTest } from "./anomaly-test.ts";
import { type BackgroundFit, background, clippingWidth, ln10, type NoBackground } from "./background.ts";
import type { ElementProfile } from "./element-profile.ts";
import { excessOf } from "./enrichment.ts";
import { benjaminiHochberg, falseThreeSigmaChance } from "./false-discovery.ts";
import { productLimit, productLimitQuantile } from "./kaplan-meier.ts";
import type { Background, ProfileSample } from "./result.ts";
import { flaggedRuns, type Run } from "./runs.ts";

/** An element's profile with its background settled, before samples are flagged. */
export interface TestedProfile {
  readonly section: Section;
  readonly profile: ElementProfile;
  readonly fit: BackgroundFit | NoBackground;
  readonly tests: readonly AnomalyTest[];
}

/** A profile whose samples are flagged, with the runs of flagged samples. */
export interface JudgedProfile extends TestedProfile {
  readonly samples: readonly ProfileSample[];
  readonly runs: readonly Run[];
  readonly family: number;
  readonly falseThreeSigmaChance: number;
}

const discoveryRate = 0.05;
/** Above this share of cells below detection the product-limit quartiles are not reported. */
const mostCensored = 0.5;

export function testProfile(section: Section, profile: ElementProfile): TestedProfile {
  const fit = background(profile.samples);
  return { section, profile, fit, tests: fit.kind === "background" ? anomalyTest(profile.samples, fit) : [] };
}

/** Flags samples over one family of tests: false discoveries are controlled over all profiles given together. */
export function judgeProfiles(profiles: readonly TestedProfile[]): readonly JudgedProfile[] {
  const p = profiles.flatMap(({ tests }) => tests.map((test) => test.p));
  const { isFlagged, adjusted } = benjaminiHochberg(p, discoveryRate);
  let offset = 0;
  return profiles.map((tested) => {
    const from = offset;
    offset += tested.tests.length;
    return judge(tested, {
      isFlagged: isFlagged.slice(from, offset),
      q: adjusted.slice(from, offset),
      family: p.length,
    });
  });
}

interface Verdict {
  readonly isFlagged: readonly boolean[];
  readonly q: readonly number[];
  readonly family: number;
}

function judge(tested: TestedProfile, { isFlagged, q, family }: Verdict): JudgedProfile {
  const { profile, fit, tests } = tested;
  const samples = profile.samples.map((sample, i): ProfileSample => {
    const { sample: name, baseM, topM, heightM, value, censored, sigma, density } = sample;
    const plain = { sample: name, baseM, topM, heightM, value, censored, sigma, densityGCm3: density.value };
    if (fit.kind !== "background") return { ...plain, flagged: false };
    const excess = censored === "left" ? {} : { excess: excessOf(sample, fit).excess };
    return { ...plain, ...excess, p: tests[i].p, q: q[i], flagged: isFlagged[i] };
  });
  const judged = samples.map((s) => ({ ...s, p: s.p ?? 1 }));
  return {
    ...tested,
    samples,
    runs: fit.kind === "background" ? flaggedRuns(judged, ceilingOf(fit)) : [],
    family,
    falseThreeSigmaChance: falseThreeSigmaChance(samples.length),
  };
}

/** The 3 s ceiling of single background samples, in the unit of the concentrations. */
export function ceilingOf({ logMedian, logSd }: BackgroundFit): number {
  return pow(10, logMedian + clippingWidth * logSd);
}

/** The lognormal law of the background on the natural-log scale. */
export function naturalLaw({ logMedian, logSd }: BackgroundFit): { mean: number; sd: number } {
  return { mean: logMedian * ln10, sd: logSd * ln10 };
}

export function reportedBackground(fit: BackgroundFit, profile: ElementProfile): Background {
  const kept = profile.samples.filter((_, i) => fit.isKept[i]);
  const steps = productLimit(
    kept.map((s) => s.value),
    kept.map((s) => s.censored === "left"),
  );
  const isTold = fit.censoredKept < mostCensored * fit.kept;
  const lowerQuartile = isTold ? productLimitQuantile(steps, 0.25) : undefined;
  const upperQuartile = isTold ? productLimitQuantile(steps, 0.75) : undefined;
  return {
    median: fit.median,
    mean: fit.mean,
    logSd: fit.logSd,
    kept: fit.kept,
    censored: fit.censoredKept,
    threshold: ceilingOf(fit),
    ...(lowerQuartile === undefined ? {} : { lowerQuartile }),
    ...(upperQuartile === undefined ? {} : { upperQuartile }),
  };
}

import type { Section } from "../study/model.ts";
import { centimetresPerMetre, type JudgedAnomaly } from "./anomalies.ts";
import { bedAt } from "./densities.ts";
import { excessOf } from "./enrichment.ts";
import { effectiveWidths } from "./fluence.ts";
import type { JudgedProfile } from "./judged-profile.ts";
import { acceptanceDelta } from "./mixing-fit.ts";
import type { Flag, MarkerHorizon } from "./result.ts";

type Numbers = Readonly<Record<string, number>>;

/** What each flag means for the result: facts with the numbers that raised them, not scores. */
const consequences = {
  ASSUMED_DENSITY: "default density used; the fluence interval is wider for it",
  ASSUMED_SIGMA: "measurement errors were assumed",
  BACKGROUND_ABOVE: "background rests on one side: too few samples above",
  BACKGROUND_BELOW: "background rests on one side: too few samples below",
  BACKGROUND_UNSETTLED: "no fixed set of background samples after 20 passes; the last was used",
  BASE_EROSIVE: "a contact in the interval is erosive, hardground or karst: rock may be missing here",
  CENSORED_HEAVY: "background lies below detection; no sample was tested",
  CENSORED_MANY: "most of the background lies below detection; its level rests on few values",
  COARSE_SAMPLING: "sampling too coarse: mixing length and event surface are known as limits only",
  CONDENSED: "slow sedimentation: the marker is not instantaneous at this resolution",
  GAPPY: "less than 90 % of the window was sampled; the fluence is a bound",
  LITHOLOGY_CHANGE: "the peak lies in another lithology than most of the background",
  MIXING_UNRESOLVED: "a thin layer and box mixing cannot be told apart; both positions are given",
  MULTIPLE_PEAKS: "two peaks: redeposition or two events; no single mixing length",
  NO_TAIL: "no tail above the layer though burrowing would make one: hiatus, truncation, or burrowers died",
  REWORKED_THICK: "mixing length above 25 cm: not a primary layer",
  SINGLE_SAMPLE: "one sample carries more than 80 % of the fluence: no tail seen, sub-layers may hide",
} as const;

export type FlagCode = keyof typeof consequences;

const fewestBackgroundSamples = 5;
const manyCensored = 0.5;
const singleSampleShare = 0.8;
const fewestClearSamples = 3;
const gappyCoverage = 0.9;
const thickMixingM = 0.25;
const slowestRateMPerMa = 1;
/** Normal cosmic rain of iridium, ng/cm2 per million years (Kyte & Wasson 1986, doi:10.1126/science.232.4755.1225). */
const cosmicRain = 9;
const fineSampleCm = 1;
const rounding = 1e-7;
const strongBioturbation = 3;

/** Flags of a whole profile: its background, errors and densities. `horizon` names the element. */
export function profileFlags({ section, profile, fit }: JudgedProfile): readonly Flag[] {
  const raise = raiser(section.name, profile.analyte);
  const sigmas = profile.samples.filter((s) => s.isSigmaAssumed).length;
  if (fit.kind === "no-background") {
    if (fit.reason !== "censored-heavy") return [];
    const { samples, detects, censoredShare } = fit;
    return [raise("CENSORED_HEAVY", { samples, detects, censoredShare })];
  }
  const censoredShare = fit.censoredKept / fit.kept;
  return [
    ...(censoredShare >= manyCensored
      ? [raise("CENSORED_MANY", { kept: fit.kept, censored: fit.censoredKept, censoredShare })]
      : []),
    ...(fit.isUnsettled ? [raise("BACKGROUND_UNSETTLED", { passes: fit.passes, kept: fit.kept })] : []),
    ...(sigmas > 0 ? [raise("ASSUMED_SIGMA", { samples: sigmas, of: profile.samples.length })] : []),
  ];
}

/** Flags of one found horizon. */
export function horizonFlags(
  judged: JudgedProfile,
  found: JudgedAnomaly,
  horizon: MarkerHorizon,
): readonly Flag[] {
  const raise = raiser(horizon.section, horizon.name);
  const checks: readonly (readonly [FlagCode, Numbers | undefined])[] = [
    ["COARSE_SAMPLING", coarseSampling(judged, found)],
    ["SINGLE_SAMPLE", singleSample(found)],
    ["BACKGROUND_BELOW", backgroundSide(judged, (i) => i < found.run.first)],
    ["BACKGROUND_ABOVE", backgroundSide(judged, (i) => i > found.run.last)],
    ["MULTIPLE_PEAKS", multiplePeaks(judged, found)],
    ["NO_TAIL", noTail(judged, found, horizon)],
    ["BASE_EROSIVE", erosiveContact(judged.section, horizon)],
    ["CONDENSED", condensed(judged.section, found, horizon)],
    ["GAPPY", gappy(found)],
    ["LITHOLOGY_CHANGE", lithologyChange(judged, found)],
    ["MIXING_UNRESOLVED", mixingUnresolved(found)],
    ["REWORKED_THICK", reworkedThick(horizon)],
    ["ASSUMED_DENSITY", assumedDensity(judged, found)],
  ];
  return checks.flatMap(([flag, numbers]) => (numbers === undefined ? [] : [raise(flag, numbers)]));
}

function raiser(section: string, horizon: string) {
  return (flag: FlagCode, numbers: Numbers): Flag => ({
    section,
    horizon,
    flag,
    numbers,
    consequence: consequences[flag],
  });
}

function coarseSampling(
  judged: JudgedProfile,
  { mixing, mixingWindow, run, datumM }: JudgedAnomaly,
): Numbers | undefined {
  const { samples } = judged.profile;
  if (mixing.accepted !== "M2") {
    const clear = samples.slice(run.first, run.last + 1).filter((sample) => {
      if (sample.censored === "left" || judged.fit.kind !== "background") return false;
      const { excess, sigma } = excessOf(sample, judged.fit);
      return excess > 2 * sigma;
    }).length;
    return clear < fewestClearSamples ? { clearSamples: clear, needed: fewestClearSamples } : undefined;
  }
  const { baseCm, lengthCm } = mixing.reported;
  const [low, high] = [baseCm, baseCm + 3 * lengthCm].map((cm) => datumM + cm / centimetresPerMetre);
  let thickest = 0;
  for (let i = mixingWindow.first; i <= mixingWindow.last; i++) {
    const reach = i < samples.length - 1 ? Math.max(samples[i].topM, samples[i + 1].baseM) : samples[i].topM;
    if (samples[i].baseM <= high && reach >= low)
      thickest = Math.max(thickest, (reach - samples[i].baseM) * centimetresPerMetre);
  }
  return thickest > lengthCm ? { thickestCm: thickest, lengthCm } : undefined;
}

function singleSample({ fluence, anomaly }: JudgedAnomaly) {
  const total = anomaly.fluence?.value ?? 0;
  if (!(total > 0)) return undefined;
  const widths = effectiveWidths(fluence.cells);
  const shares = fluence.cells.map(
    (cell, i) => ((cell.value - fluence.background.mean) * cell.density * widths[i]) / total,
  );
  const share = Math.max(...shares);
  return share > singleSampleShare ? { share } : undefined;
}

function backgroundSide({ samples }: JudgedProfile, isOnSide: (index: number) => boolean) {
  const unflagged = samples.filter((sample, i) => isOnSide(i) && !sample.flagged).length;
  return unflagged < fewestBackgroundSamples
    ? { samples: unflagged, needed: fewestBackgroundSamples }
    : undefined;
}

/** Two local maxima of a run with a valley at or under half the lesser one's excess, deeper than 3 sigma. */
function multiplePeaks({ profile, fit }: JudgedProfile, { run }: JudgedAnomaly) {
  if (fit.kind !== "background") return undefined;
  const cells = profile.samples.slice(run.first, run.last + 1);
  const excess = cells.map((cell) => cell.value - fit.median);
  const top = excess.indexOf(Math.max(...excess));
  for (let i = 0; i < cells.length; i++) {
    if (Math.abs(i - top) < 2) continue;
    const between = cells.map((_, k) => k).filter((k) => k > Math.min(i, top) && k < Math.max(i, top));
    const valley = between.reduce((a, k) => (excess[k] < excess[a] ? k : a), between[0]);
    const scatter = Math.sqrt(cells[i].sigma ** 2 + cells[valley].sigma ** 2);
    const z = (excess[i] - excess[valley]) / scatter;
    if (excess[valley] <= 0.5 * excess[i] && z > 3)
      return {
        lesserM: cells[i].heightM,
        largerM: cells[top].heightM,
        lesser: excess[i],
        valley: excess[valley],
        z,
      };
  }
  return undefined;
}

function noTail({ section, profile }: JudgedProfile, { mixing, run }: JudgedAnomaly, horizon: MarkerHorizon) {
  const upper = mixing.length.isOpenHigh ? undefined : mixing.length.high;
  if (upper === undefined || upper >= fineSampleCm) return undefined;
  const near = profile.samples.slice(Math.max(0, run.first - 1), run.last + 2);
  const thickestCm = Math.max(...near.map((s) => (s.topM - s.baseM) * centimetresPerMetre));
  const above = section.beds.find((bed) => bed.topM > horizon.positionM && bed.bioturbation !== undefined);
  const bioturbation = above?.bioturbation ?? 0;
  return thickestCm <= fineSampleCm + rounding && bioturbation >= strongBioturbation
    ? { lengthHighCm: upper, thickestCm, bioturbation }
    : undefined;
}

function erosiveContact(section: Section, { lowM, highM }: MarkerHorizon) {
  const bed = section.beds.find(
    ({ baseM, baseContact }) =>
      baseM >= lowM &&
      baseM <= highM &&
      (baseContact === "erosive" || baseContact === "hardground" || baseContact === "karst"),
  );
  return bed === undefined ? undefined : { contactM: bed.baseM };
}

/** Between the nearest dated horizons: under 0.1 cm/kyr, or cosmic rain alone could explain the layer. */
function condensed(section: Section, { anomaly }: JudgedAnomaly, { positionM }: MarkerHorizon) {
  const dated = section.horizons.flatMap(({ heightM, ageMa }) =>
    ageMa === undefined ? [] : [{ heightM, ageMa }],
  );
  const below = dated.filter((d) => d.heightM < positionM).toSorted((a, b) => b.heightM - a.heightM)[0];
  const above = dated.filter((d) => d.heightM > positionM).toSorted((a, b) => a.heightM - b.heightM)[0];
  if (below === undefined || above === undefined || !(below.ageMa > above.ageMa)) return undefined;
  const rateMPerMa = (above.heightM - below.heightM) / (below.ageMa - above.ageMa);
  const durationMa = (anomaly.windowTopM - anomaly.windowBaseM) / rateMPerMa;
  const rainMa = (anomaly.fluence?.value ?? Number.POSITIVE_INFINITY) / cosmicRain;
  return rateMPerMa < slowestRateMPerMa || rainMa <= 3 * durationMa
    ? { rateCmPerKa: rateMPerMa / 10, durationMa, rainMa }
    : undefined;
}

function gappy({ anomaly }: JudgedAnomaly) {
  const coverage = anomaly.fluence?.coverage ?? 1;
  return coverage < gappyCoverage ? { coverage } : undefined;
}

function lithologyChange({ section, profile, fit }: JudgedProfile, { peak }: JudgedAnomaly) {
  if (fit.kind !== "background") return undefined;
  const at = profile.samples.map((sample) => bedAt(section.beds, sample.heightM)?.lithology);
  const kept = at.filter((lithology, i) => fit.isKept[i] && lithology !== undefined);
  const here = at[peak];
  if (here === undefined || kept.length === 0) return undefined;
  const same = kept.filter((lithology) => lithology === here).length;
  return 2 * same < kept.length ? { sameLithology: same, background: kept.length } : undefined;
}

function mixingUnresolved({ mixing }: JudgedAnomaly): Numbers | undefined {
  if (mixing.deltaAicc === undefined) return { samples: mixing.cells };
  return mixing.deltaAicc < acceptanceDelta
    ? { deltaAicc: mixing.deltaAicc, samples: mixing.cells }
    : undefined;
}

function reworkedThick({ mixing }: MarkerHorizon) {
  return mixing !== undefined && mixing.lengthM > thickMixingM ? { lengthM: mixing.lengthM } : undefined;
}

function assumedDensity({ profile }: JudgedProfile, { fluenceWindow }: JudgedAnomaly) {
  const window = profile.samples.slice(fluenceWindow.first, fluenceWindow.last + 1);
  const assumed = window.filter((sample) => sample.density.isAssumed);
  if (assumed.length === 0) return undefined;
  const mean = assumed.reduce((sum, s) => sum + s.density.value, 0) / assumed.length;
  const sigma = assumed.reduce((sum, s) => sum + s.density.sigma, 0) / assumed.length;
  return { samples: assumed.length, of: window.length, densityGCm3: mean, sigma };
}

import { exp } from "../numeric/elementary.ts";
import type { BackgroundFit } from "./background.ts";
import { meanBelowLimit, sdBelowLimit } from "./censored-normal.ts";
import type { ElementSample } from "./element-profile.ts";
import { backgroundSigma, enrichmentFactor } from "./enrichment.ts";
import { type FluenceCell, type FluenceInput, integratedExcess } from "./fluence.ts";
import { type SimulatedFluence, simulateFluence } from "./fluence-simulation.ts";
import { type JudgedProfile, naturalLaw } from "./judged-profile.ts";
import { fitMixing, type MixingFit } from "./mixing-fit.ts";
import type { MixingCell } from "./mixing-likelihood.ts";
import { reportedModels } from "./reported-models.ts";
import type { Anomaly, Fluence, ProfileSample, SimulatedSpread } from "./result.ts";
import type { Run } from "./runs.ts";
import { fitErrorModel } from "./sigmas.ts";

/** An anomaly with the fit behind it; `datumM` is the zero of the fit's centimetres. */
export interface JudgedAnomaly {
  readonly anomaly: Anomaly;
  readonly run: Run;
  /** Index of the largest value of the run. */
  readonly peak: number;
  readonly fluenceWindow: Run;
  readonly fluence: FluenceInput;
  readonly mixing: MixingFit;
  readonly mixingWindow: Run;
  readonly datumM: number;
}

export interface AnomalyOptions {
  readonly level: number;
  readonly replicates: number;
  readonly seed: number;
}

export const centimetresPerMetre = 100;
/** Samples on each side of a run that the mixing models see; more background adds only time. */
const mixingMargin = 10;

/** The anomalies of a judged profile from below upward, named `<analyte>-1`, `-2`, each with fluence and mixing. */
export function anomaliesOf(
  judged: JudgedProfile,
  fit: BackgroundFit,
  options: AnomalyOptions,
): readonly JudgedAnomaly[] {
  const all = judged.runs.map((run, i) => {
    const neighbours = { below: judged.runs[i - 1], above: judged.runs[i + 1] };
    return anomalyOf(judged, { fit, run, neighbours, options });
  });
  let count = 0;
  return all.map((judgedAnomaly) => {
    const { anomaly } = judgedAnomaly;
    if (anomaly.accepted !== "M0") count++;
    const name = anomaly.accepted === "M0" ? "" : `${judged.profile.analyte}-${count}`;
    return { ...judgedAnomaly, anomaly: { ...anomaly, name } };
  });
}

interface RunContext {
  readonly fit: BackgroundFit;
  readonly run: Run;
  readonly neighbours: { readonly below?: Run; readonly above?: Run };
  readonly options: AnomalyOptions;
}

function anomalyOf(judged: JudgedProfile, { fit, run, neighbours, options }: RunContext): JudgedAnomaly {
  const { samples } = judged.profile;
  const last = samples.length - 1;
  const datumM = samples[run.first].baseM;
  const fluenceWindow = { first: Math.max(0, run.first - 1), last: Math.min(last, run.last + 1) };
  const mixingWindow = {
    first: Math.max(neighbours.below === undefined ? 0 : neighbours.below.last + 1, run.first - mixingMargin),
    last: Math.min(
      neighbours.above === undefined ? last : neighbours.above.first - 1,
      run.last + mixingMargin,
    ),
  };
  const peak = peakOf(judged.samples, run);
  const fluenceInput = fluenceInputOf(
    samples.slice(fluenceWindow.first, fluenceWindow.last + 1),
    fit,
    datumM,
  );
  const mixing = mixingOf(judged, { fit, run, mixingWindow, datumM, level: options.level });
  const flagged = judged.samples.slice(fluenceWindow.first, fluenceWindow.last + 1).map((s) => s.flagged);
  const fluence = fluenceOf(fluenceInput, flagged, { ...options, mixing });
  return {
    anomaly: {
      name: "",
      firstSample: run.first,
      lastSample: run.last,
      windowBaseM: samples[fluenceWindow.first].baseM,
      windowTopM: samples[fluenceWindow.last].topM,
      enrichment: enrichmentFactor(samples[peak], fit).factor,
      fluence,
      models: reportedModels(mixing, { cells: mixingCells(samples, mixingWindow, datumM), datumM }),
      accepted: mixing.accepted,
    },
    run,
    peak,
    fluenceWindow,
    fluence: fluenceInput,
    mixing,
    mixingWindow,
    datumM,
  };
}

function peakOf(samples: readonly ProfileSample[], run: Run): number {
  let peak = run.first;
  for (let i = run.first; i <= run.last; i++)
    if (samples[i].flagged && samples[i].value > samples[peak].value) peak = i;
  return peak;
}

function fluenceInputOf(samples: readonly ElementSample[], fit: BackgroundFit, datumM: number): FluenceInput {
  const law = naturalLaw(fit);
  const cells = samples.map((sample): FluenceCell => {
    const isBelow = sample.censored === "left";
    return {
      baseCm: (sample.baseM - datumM) * centimetresPerMetre,
      topCm: (sample.topM - datumM) * centimetresPerMetre,
      value: isBelow ? meanBelowLimit(sample.value, law) : sample.value,
      sigma: isBelow ? sdBelowLimit(sample.value, law) : sample.sigma,
      ...(isBelow ? { limit: sample.value } : {}),
      density: sample.density.value,
      densitySigma: 0,
      densityCommonSigma: sample.density.sigma,
      boundarySigmaCm: sample.positionSigmaM * centimetresPerMetre,
    };
  });
  return { cells, background: { mean: fit.mean, sigma: backgroundSigma(fit.mean, fit) }, calibration: 0 };
}

function fluenceOf(
  input: FluenceInput,
  flagged: readonly boolean[],
  { level, replicates, seed, mixing }: AnomalyOptions & { readonly mixing: MixingFit },
): Fluence {
  const integrated = integratedExcess(input);
  const simulation = simulateFluence(input, { level, replicates, seed });
  const { low, high } = simulation;
  const { zeroFill, nearestFill, coverage, lowCensored, highCensored, value, sigma, variance } = integrated;
  const isBoundOnly = input.cells.some(
    (cell, i) => cell.limit !== undefined && (flagged[i - 1] || flagged[i + 1]),
  );
  const top = input.cells[input.cells.length - 1].topCm;
  const { baseCm, lengthCm, fluence: total } = mixing.reported;
  const tail = mixing.accepted === "M2" ? { tail: total * exp(-Math.max(0, top - baseCm) / lengthCm) } : {};
  return {
    value,
    sigma,
    low: isBoundOnly ? low - (value - lowCensored) : low,
    high: isBoundOnly ? high + (highCensored - value) : high,
    level,
    coverage,
    zeroFill,
    nearestFill,
    lowCensored,
    highCensored,
    ...tail,
    simulated: spreadOf(simulation),
    variance: { ...variance },
  };
}

function spreadOf(simulated: SimulatedFluence): SimulatedSpread {
  const { median, sd, low68, high68, low95, high95, replicates, seed } = simulated;
  return { median, sd, low68, high68, low95, high95, replicates, seed };
}

interface MixingContext {
  readonly fit: BackgroundFit;
  readonly run: Run;
  readonly mixingWindow: Run;
  readonly datumM: number;
  readonly level: number;
}

function mixingOf(
  judged: JudgedProfile,
  { fit, run, mixingWindow, datumM, level }: MixingContext,
): MixingFit {
  const { samples } = judged.profile;
  const measured = samples.filter((s) => s.censored !== "left");
  return fitMixing({
    cells: mixingCells(samples, mixingWindow, datumM),
    run: { first: run.first - mixingWindow.first, last: run.last - mixingWindow.first },
    background: fit,
    errors: fitErrorModel(
      measured.map((s) => s.value),
      measured.map((s) => s.sigma),
    ),
    level,
  });
}

function mixingCells(samples: readonly ElementSample[], window: Run, datumM: number): readonly MixingCell[] {
  return samples.slice(window.first, window.last + 1).map((sample) => ({
    baseCm: (sample.baseM - datumM) * centimetresPerMetre,
    topCm: (sample.topM - datumM) * centimetresPerMetre,
    value: sample.value,
    isCensored: sample.censored === "left",
    sigma: sample.sigma,
    density: sample.density.value,
  }));
}

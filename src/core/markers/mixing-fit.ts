import type { Basis } from "../basis.ts";
import { chiSquareQuantile, chiSquareUpperTail } from "../numeric/chi-square.ts";
import { exp } from "../numeric/elementary.ts";
import { ln10 } from "./background.ts";
import { effectiveWidths } from "./fluence.ts";
import { boxSlabMean } from "./mixing.ts";
import { type ProfileInterval, profileInterval } from "./mixing-intervals.ts";
import { type Likelihood, type LinearFit, likelihoodOf, type MixingCell } from "./mixing-likelihood.ts";
import {
  type BoxFit,
  fitBackgroundOnly,
  fitBox,
  fitThinLayer,
  type SearchRange,
  searchRange,
  type ThinLayerFit,
} from "./mixing-models.ts";
import { type ErrorModel, sigmaAt } from "./sigmas.ts";

export interface MixingInput {
  /** From below upward; positions in cm from any datum. */
  readonly cells: readonly MixingCell[];
  /** First and last flagged cell. */
  readonly run: { readonly first: number; readonly last: number };
  readonly background: { readonly median: number; readonly logSd: number };
  /** How a cell's measurement error changes with its concentration. */
  readonly errors: ErrorModel;
  readonly level: number;
}

export interface ComparedModel {
  readonly logLikelihood: number;
  readonly parameters: number;
  /** Undefined where n <= k + 1. */
  readonly aicc?: number;
  readonly weight?: number;
}

export interface MixingFit {
  readonly cells: number;
  readonly m0: ComparedModel & LinearFit;
  readonly m1: ComparedModel & ThinLayerFit;
  readonly m2: ComparedModel & BoxFit;
  /** M2 with the errors of its own fitted values: what is reported. */
  readonly reported: BoxFit;
  readonly length: ProfileInterval;
  readonly base: ProfileInterval;
  readonly surface: ProfileInterval;
  /** 68 % interval of the event surface. */
  readonly surface68: ProfileInterval;
  /** Misfit of the reported M2: chi-square and its upper-tail p; intervals are widened by `inflation`. */
  readonly chiSquare: number;
  readonly misfitP: number;
  readonly inflation: number;
  readonly accepted: "M0" | "M1" | "M2" | "unresolved";
  /** AICc(M1) - AICc(M2). */
  readonly deltaAicc?: number;
}

/** Mixing is preferred over a thin layer only beyond this difference of AICc. */
export const acceptanceDelta = 6;
const refits = 3;
/** The layer's fluence is at most this many times the excess seen. */
const largestHiddenShare = 20;
/** Below this p of the chi-square misfit the model is taken to be too simple and its intervals are widened. */
const misfitLevel = 0.01;

export const mixingBasis: Basis = {
  method: "box-mixing",
  statement:
    "Background only, a thin layer inside one sample, and box mixing are fitted to the samples about the anomaly by maximum likelihood and compared by AICc; base of the smear, mixing length and event surface have profile-likelihood intervals.",
  assumptions: [
    "the layer was laid at one moment and mixed by a constant top layer while sediment accumulated at a constant rate",
    "the marker moves with the fossils' size fraction; nothing was lost",
    "no more than 20 times the excess seen hides in unsampled rock",
    "where the box does not fit (p < 0.01) its intervals are widened by the misfit",
  ],
  sources: [
    {
      authors: "Berger, W.H., Heath, G.R.",
      year: 1968,
      title: "Vertical mixing in pelagic sediments",
      place: "Journal of Marine Research 26:134-143",
    },
    {
      authors: "Hurvich, C.M., Tsai, C.-L.",
      year: 1989,
      title: "Regression and time series model selection in small samples",
      place: "Biometrika 76:297-307",
      doi: "10.1093/biomet/76.2.297",
    },
  ],
  after: true,
};

/**
 * Compares M0 (background, k = 1), M1 (thin layer inside one sample, k = 3) and M2 (box mixing, k = 4).
 *
 * `s_i^2 = sigma_i^2 + (s ln10 B)^2` with the measured C in the first pass, which all models share for AICc; M2 is
 * then refitted 3 times with C (and B) replaced by its own fitted values, which takes away the bias of weighting by
 * observed values. `accepted`: M2 where AICc(M1) - AICc(M2) > 6; M0 where neither layer beats the background; M1 where
 * M1 has the smaller AICc and the upper limit of L lies within the layer's sample; else `unresolved`.
 * Cost: a few thousand likelihoods of n cells.
 */
export function fitMixing(input: MixingInput): MixingFit {
  const { cells, run, background, level } = input;
  const range = searchRange(cells, run);
  const scatter = background.logSd * ln10 * background.median;
  const first = likelihoodOf(
    cells,
    cells.map((cell) => Math.sqrt(cell.sigma ** 2 + scatter ** 2)),
    mostFluence(input),
  );
  const m0 = fitBackgroundOnly(first);
  const m1 = fitThinLayer(first);
  const m2 = fitBox(first, range);
  const { likelihood, best } = refit(input, range, m2);
  const { chiSquare, misfitP, inflation } = misfitOf(likelihood, best);
  const drop = (chiSquareQuantile(1 - level, 1) / 2) * inflation;
  const profiled = { likelihood, range, best };
  const length = profileInterval("length", profiled, drop);
  const [c0, c1, c2] = compare(cells.length, [m0.logLikelihood, m1.logLikelihood, m2.logLikelihood]);
  const layer = cells[m1.at];
  const isShort = length.high <= Math.max(layer.topCm - layer.baseCm, range.finest);
  return {
    cells: cells.length,
    m0: { ...m0, ...c0 },
    m1: { ...m1, ...c1 },
    m2: { ...m2, ...c2 },
    reported: best,
    length,
    base: profileInterval("base", profiled, drop),
    surface: profileInterval("surface", profiled, drop),
    surface68: profileInterval("surface", profiled, 0.5 * inflation),
    chiSquare,
    misfitP,
    inflation,
    accepted: accept([c0, c1, c2], isShort),
    ...(c1.aicc === undefined || c2.aicc === undefined ? {} : { deltaAicc: c1.aicc - c2.aicc }),
  };
}

/** Else a layer of any size could hide in a gap, with a thin slice of it in the sample beside. */
function mostFluence({ cells, background }: MixingInput): number {
  const widths = effectiveWidths(cells);
  const observed = cells.reduce((sum, cell, i) => {
    const excess = cell.isCensored ? 0 : Math.max(0, cell.value - background.median);
    return sum + excess * cell.density * widths[i];
  }, 0);
  return largestHiddenShare * observed;
}

function refit(
  input: MixingInput,
  range: SearchRange,
  first: BoxFit,
): { likelihood: Likelihood; best: BoxFit } {
  const { cells, background, errors } = input;
  let best = first;
  const most = mostFluence(input);
  let likelihood = likelihoodOf(cells, [], most);
  for (let pass = 0; pass < refits; pass++) {
    const level = best.background > 0 ? best.background : background.median;
    const scatter = background.logSd * ln10 * level;
    const sds = cells.map((cell) => {
      const modelled = modelledValue(cell, best);
      const ratio = sigmaAt(errors, modelled) / sigmaAt(errors, cell.value);
      return Math.sqrt((cell.sigma * ratio) ** 2 + scatter ** 2);
    });
    likelihood = likelihoodOf(cells, sds, most);
    best = fitBox(likelihood, range, best);
  }
  return { likelihood, best };
}

/** Concentration that box mixing gives a cell, ng/g. */
export function modelledValue(cell: MixingCell, fit: BoxFit): number {
  return fit.background + (fit.fluence * boxSlabMean(cell, fit)) / cell.density;
}

function misfitOf({ cells, sds }: Likelihood, best: BoxFit) {
  const measured = cells.filter((cell) => !cell.isCensored).length;
  const chiSquare = cells.reduce((sum, cell, i) => {
    return cell.isCensored ? sum : sum + ((cell.value - modelledValue(cell, best)) / sds[i]) ** 2;
  }, 0);
  const degrees = measured - 4;
  if (degrees < 1) return { chiSquare, misfitP: 1, inflation: 1 };
  const misfitP = chiSquareUpperTail(chiSquare, degrees);
  return { chiSquare, misfitP, inflation: misfitP < misfitLevel ? Math.max(1, chiSquare / degrees) : 1 };
}

const parameters = [1, 3, 4];

/** `AICc = -2 lnL + 2k + 2k(k+1)/(n-k-1)` and weights `exp(-Delta/2)/sum` over the models that have one. */
function compare(n: number, logLikelihoods: readonly number[]): readonly ComparedModel[] {
  const scored = logLikelihoods.map((logLikelihood, i) => {
    const k = parameters[i];
    const aicc = n > k + 1 ? -2 * logLikelihood + 2 * k + (2 * k * (k + 1)) / (n - k - 1) : undefined;
    return { logLikelihood, parameters: k, aicc };
  });
  const known = scored.flatMap(({ aicc }) => (aicc === undefined ? [] : [aicc]));
  const least = Math.min(...known);
  const total = known.reduce((sum, aicc) => sum + exp(-(aicc - least) / 2), 0);
  return scored.map(({ logLikelihood, parameters: k, aicc }) =>
    aicc === undefined
      ? { logLikelihood, parameters: k }
      : { logLikelihood, parameters: k, aicc, weight: exp(-(aicc - least) / 2) / total },
  );
}

function accept([c0, c1, c2]: readonly ComparedModel[], isShort: boolean): MixingFit["accepted"] {
  if (c0.aicc === undefined || c1.aicc === undefined) return "unresolved";
  if (c0.aicc <= Math.min(c1.aicc, c2.aicc ?? c1.aicc)) return "M0";
  if (c2.aicc === undefined) return "unresolved";
  if (c1.aicc - c2.aicc > acceptanceDelta) return "M2";
  return c1.aicc <= c2.aicc && isShort ? "M1" : "unresolved";
}

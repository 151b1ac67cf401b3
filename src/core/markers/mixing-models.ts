import { exp, log } from "../numeric/elementary.ts";
import { NotConverged } from "../numeric/not-converged.ts";
import { nelderMead } from "../numeric/optimise.ts";
import { effectiveWidths } from "./fluence.ts";
import { boxSlabMean } from "./mixing.ts";
import type { Likelihood, LinearFit, MixingCell } from "./mixing-likelihood.ts";

/** Where a search may go, cm: bases of the smear and mixing lengths. */
export interface SearchRange {
  readonly lowestBase: number;
  readonly highestBase: number;
  readonly shortest: number;
  readonly longest: number;
  /** Thinnest sample (closest spacing of points) in the window. */
  readonly finest: number;
}

export interface ThinLayerFit extends LinearFit {
  /** Index of the sample that holds the layer. */
  readonly at: number;
}

export interface BoxFit extends LinearFit {
  readonly baseCm: number;
  readonly lengthCm: number;
}

/** Mixing lengths at which the search for the best one starts, cm. */
const startingLengths = [0.1, 0.25, 0.5, 1, 2, 3, 4, 6, 8, 12, 20, 40];
const gridShareOfFinest = 0.25;
const mostGridSteps = 160;
const startsRefined = 3;
/** A pull to the start too weak to matter, so that a search along a flat ridge comes to rest. */
const flatness = 1e-6;

export function searchRange(
  cells: readonly MixingCell[],
  { first, last }: { first: number; last: number },
): SearchRange {
  const lowest = cells[Math.max(0, first - 1)].baseCm;
  const window = cells[cells.length - 1].topCm - cells[0].baseCm;
  const widths = effectiveWidths(cells).map((width, i) => {
    const thickness = cells[i].topCm - cells[i].baseCm;
    return thickness > 0 ? thickness : width;
  });
  const finest = Math.min(...widths.filter((width) => width > 0));
  return {
    lowestBase: lowest,
    highestBase: cells[last].topCm,
    shortest: 0.02 * finest,
    longest: 2 * window,
    finest,
  };
}

/** M0: background only. */
export function fitBackgroundOnly(likelihood: Likelihood): LinearFit {
  return likelihood.fit(new Float64Array(likelihood.cells.length));
}

/** M1: the whole layer inside one sample, without mixing; the sample with the highest likelihood. */
export function fitThinLayer(likelihood: Likelihood): ThinLayerFit {
  const { cells } = likelihood;
  const widths = effectiveWidths(cells);
  const fits = cells.flatMap((cell, at) => {
    const thickness = cell.topCm > cell.baseCm ? cell.topCm - cell.baseCm : widths[at];
    if (cell.isCensored || !(thickness > 0)) return [];
    const response = new Float64Array(cells.length);
    response[at] = 1 / (cell.density * thickness);
    return [{ ...likelihood.fit(response), at }];
  });
  if (fits.length === 0) throw new RangeError("fitThinLayer: expected a measured sample, got none");
  return fits.reduce((a, b) => (b.logLikelihood > a.logLikelihood ? b : a));
}

/** The likelihood of box mixing at one base and length, fluence and background at their best. */
export function boxFitAt(likelihood: Likelihood, baseCm: number, lengthCm: number): BoxFit {
  const { cells, fit } = likelihood;
  const response = new Float64Array(cells.length);
  const mixing = { baseCm, lengthCm };
  for (let i = 0; i < cells.length; i++) response[i] = boxSlabMean(cells[i], mixing) / cells[i].density;
  const { logLikelihood, fluence, background } = fit(response);
  return { logLikelihood, fluence, background, baseCm, lengthCm };
}

/**
 * M2: box mixing, by a grid over base (a quarter of the finest sample) and length, then Nelder-Mead on (hb, ln L) from
 * the best starts, or from `start` alone.
 */
export function fitBox(likelihood: Likelihood, range: SearchRange, start?: BoxFit): BoxFit {
  const starts = start === undefined ? gridStarts(likelihood, range) : [start];
  const within = ([base, logLength]: readonly number[]): BoxFit =>
    boxFitAt(
      likelihood,
      Math.min(Math.max(base, range.lowestBase), range.highestBase),
      Math.min(Math.max(exp(logLength), range.shortest), range.longest),
    );
  const refined = starts.map(({ baseCm, lengthCm }) => {
    const objective = (point: readonly number[]) => {
      const fit = within(point);
      const outside = Math.abs(point[0] - fit.baseCm) / range.finest + Math.abs(point[1] - log(fit.lengthCm));
      const away = ((point[0] - baseCm) / range.finest) ** 2 + (point[1] - log(lengthCm)) ** 2;
      return outside * outside + flatness * away - fit.logLikelihood;
    };
    const steps = [range.finest / 4, lengthCm < range.longest / 2 ? 0.2 : -0.2];
    return within(lowestPoint(objective, [baseCm, log(lengthCm)], steps));
  });
  return refined.reduce((a, b) => (b.logLikelihood > a.logLikelihood ? b : a));
}

/** The lowest point near a start; the start itself where the simplex does not come to rest on a flat ridge. */
function lowestPoint(
  objective: (point: readonly number[]) => number,
  start: readonly number[],
  steps: readonly number[],
): readonly number[] {
  try {
    return nelderMead(objective, start, {
      steps,
      xTolerance: 1e-4,
      fTolerance: 1e-9,
      maximumIterations: 20000,
    }).point;
  } catch (error) {
    if (error instanceof NotConverged) return start;
    throw error;
  }
}

function gridStarts(likelihood: Likelihood, range: SearchRange): readonly BoxFit[] {
  const span = range.highestBase - range.lowestBase;
  const count = Math.max(1, Math.min(mostGridSteps, Math.ceil(span / (gridShareOfFinest * range.finest))));
  const lengths = startingLengths.filter((l) => l >= range.shortest && l <= range.longest);
  const tried = lengths.length > 0 ? lengths : [Math.sqrt(range.shortest * range.longest)];
  const best = tried.map((length) => {
    let found = boxFitAt(likelihood, range.lowestBase, length);
    for (let i = 1; i < count; i++) {
      const next = boxFitAt(likelihood, range.lowestBase + (span * i) / count, length);
      if (next.logLikelihood > found.logLikelihood) found = next;
    }
    return found;
  });
  return best.toSorted((a, b) => b.logLikelihood - a.logLikelihood).slice(0, startsRefined);
}

import { exp, log } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { type HorizonLaw, lawEdges, logLaw } from "../scenarios/horizon-law.ts";

/** ln of a function of one level: a Legendre series in each panel; -Infinity outside them. */
export interface LogProfile {
  /** Where panels end, from below upward. */
  readonly edges: readonly number[];
  readonly log: (level: number) => number;
}

const NODES = 16;
/** A panel is good where its last two coefficients are below the tolerance, in ln. */
const FINE = 1e-7;
/** For a likelihood of many steps, each smoothed by the error of its place. */
export const COARSE = 1e-4;
/** Panels are halved at most this often: what is left is a corner that weighs nothing. */
const DEEPEST = 12;

/**
 * Interpolates ln of a positive function between edges, which hold its jumps and kinks; a panel that its series does not
 * follow is halved. Where the function is 0 at a node the panel counts as 0.
 *
 * @param logAt ln of the function; -Infinity where it is 0.
 * @param tolerance of ln, for a function of size 1.
 */
export function logProfile(
  logAt: (level: number) => number,
  edges: readonly number[],
  tolerance: number = FINE,
): LogProfile {
  const ends: number[] = [edges[0]];
  const series: (Float64Array | undefined)[] = [];
  const visit = (low: number, high: number, depth: number): void => {
    const values = valuesIn(logAt, low, high);
    const zeros = values.filter((value) => value === Number.NEGATIVE_INFINITY).length;
    const found = zeros === 0 ? seriesOf(values) : undefined;
    const isGood = found === undefined ? zeros === NODES : isFollowed(found, tolerance);
    if (depth < DEEPEST && !isGood) {
      const middle = 0.5 * (low + high);
      visit(low, middle, depth + 1);
      visit(middle, high, depth + 1);
      return;
    }
    ends.push(high);
    series.push(found);
  };
  for (let i = 1; i < edges.length; i++) visit(edges[i - 1], edges[i], 0);
  return {
    edges: ends,
    log: (level) => {
      if (!(level >= ends[0] && level <= ends[ends.length - 1])) return Number.NEGATIVE_INFINITY;
      const panel = panelAt(ends, level);
      const found = series[panel];
      if (found === undefined) return Number.NEGATIVE_INFINITY;
      return valueOf(found, (2 * (level - ends[panel])) / (ends[panel + 1] - ends[panel]) - 1);
    },
  };
}

function valuesIn(logAt: (level: number) => number, low: number, high: number): Float64Array {
  const half = 0.5 * (high - low);
  return gaussLegendre(NODES).nodes.map((node) => logAt(low + half * (1 + node)));
}

/** Coefficients of the Legendre series through the values at the nodes. */
function seriesOf(values: Float64Array): Float64Array {
  const { nodes, weights } = gaussLegendre(NODES);
  const series = new Float64Array(NODES);
  for (let n = 0; n < NODES; n++) {
    let before = 0;
    let legendre = 1;
    for (let l = 0; l < NODES; l++) {
      series[l] += (l + 0.5) * weights[n] * values[n] * legendre;
      [before, legendre] = [legendre, ((2 * l + 1) * nodes[n] * legendre - l * before) / (l + 1)];
    }
  }
  return series;
}

const isFollowed = (series: Float64Array, tolerance: number) =>
  Math.abs(series[NODES - 1]) + Math.abs(series[NODES - 2]) < tolerance * Math.max(1, Math.abs(series[0]));

function valueOf(series: Float64Array, z: number): number {
  let before = 0;
  let legendre = 1;
  let sum = 0;
  for (let l = 0; l < NODES; l++) {
    sum += series[l] * legendre;
    [before, legendre] = [legendre, ((2 * l + 1) * z * legendre - l * before) / (l + 1)];
  }
  return sum;
}

/** Index of the panel that holds a level between the first and the last end. */
function panelAt(ends: readonly number[], level: number): number {
  let low = 0;
  let high = ends.length - 2;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (ends[middle] <= level) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Parts of the integral this far in ln below the largest are left out. */
const NEGLIGIBLE = 42;
/** ln of the integrand changes by at most this across a part. */
const LARGEST_FALL = 5;
const MOST_PARTS = 64;
const PART_NODES = 10;

/**
 * ln of the mean of a function over a law: ln of the integral of law(x) f(x); at a point ln f there. What the law has
 * where f is 0 counts as 0: it is not renormalised. A normal law goes on beyond its 9 standard deviations where f begins
 * only there.
 */
export function logMean(profile: LogProfile, law: HorizonLaw): number {
  if (law.kind === "point") return profile.log(law.atM);
  const bounds = boundsOf(profile, law);
  const pieces: { low: number; high: number; bound: number; fall: number }[] = [];
  let best = Number.NEGATIVE_INFINITY;
  for (let i = 1; i < bounds.length; i++) {
    const [low, high] = [bounds[i - 1], bounds[i]];
    const inset = 1e-9 * (high - low);
    const atLow = profile.log(low + inset);
    const atHigh = profile.log(high - inset);
    if (atLow === Number.NEGATIVE_INFINITY || atHigh === Number.NEGATIVE_INFINITY) continue;
    const lawLow = logLaw(law, low + inset);
    const lawHigh = logLaw(law, high - inset);
    const width = log(high - low);
    pieces.push({
      low,
      high,
      bound: Math.max(atLow, atHigh) + Math.max(lawLow, lawHigh) + width,
      fall: Math.max(Math.abs(atLow - atHigh), Math.abs(lawLow - lawHigh)),
    });
    best = Math.max(best, width + Math.max(atLow + lawLow, atHigh + lawHigh));
  }
  let sum = 0;
  for (const piece of pieces)
    if (piece.bound > best - NEGLIGIBLE) sum += partsOf(profile, law, { ...piece, scale: best });
  return sum > 0 ? best + log(sum) : Number.NEGATIVE_INFINITY;
}

function partsOf(
  profile: LogProfile,
  law: Exclude<HorizonLaw, { kind: "point" }>,
  piece: { readonly low: number; readonly high: number; readonly fall: number; readonly scale: number },
): number {
  const { nodes, weights } = gaussLegendre(PART_NODES);
  const parts = Math.min(MOST_PARTS, Math.max(1, Math.ceil(piece.fall / LARGEST_FALL)));
  const half = (piece.high - piece.low) / (2 * parts);
  let sum = 0;
  for (let part = 0; part < parts; part++)
    for (let n = 0; n < PART_NODES; n++) {
      const level = piece.low + half * (2 * part + 1 + nodes[n]);
      sum += half * weights[n] * exp(profile.log(level) + logLaw(law, level) - piece.scale);
    }
  return sum;
}

/** Ends of the pieces: the panels of the function and the edges of the law, where both reach. */
function boundsOf({ edges }: LogProfile, law: Exclude<HorizonLaw, { kind: "point" }>): readonly number[] {
  const ofLaw = lawEdges(law);
  const low = Math.max(edges[0], ofLaw[0]);
  const end = ofLaw[ofLaw.length - 1];
  const beyond = law.kind === "normal" ? tailEdges(law, low) : [];
  const high = Math.min(edges[edges.length - 1], Math.max(end, ...beyond));
  if (!(low < high)) return [];
  const inside = [...edges, ...ofLaw, ...beyond].filter((x) => x > low && x < high);
  return [...new Set([low, ...inside, high])].toSorted((a, b) => a - b);
}

/** Far above its mean a normal law falls by e within sd^2 / (distance from the mean). */
function tailEdges({ meanM, sdM }: Extract<HorizonLaw, { kind: "normal" }>, low: number): readonly number[] {
  if (low < meanM + 4 * sdM) return [];
  const scale = (sdM * sdM) / (low - meanM);
  return [1, 2, 4, 8, 16, 32, 48].map((times) => low + times * scale);
}

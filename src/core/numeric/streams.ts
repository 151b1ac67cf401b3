import { log } from "./elementary.ts";
import { normalQuantile } from "./normal.ts";
import { type FourWords, philox4x32 } from "./philox.ts";
import { discard, type Sfc64, type Sfc64State, sfc64 } from "./sfc64.ts";

/** Each purpose draws from a stream of its own, so that no two ever share numbers. */
export const streams = {
  annealing: 0,
  initialOrder: 1,
  bootstrap: 2,
  ageSampler: 3,
  alignmentSampler: 4,
  permutation: 5,
  parametricBootstrap: 6,
  markerMonteCarlo: 7,
  extinctionTiming: 8,
  orderCalibration: 9,
  sampling: 10,
  example: 11,
} as const;

export type StreamName = keyof typeof streams;

/** Replicates run in blocks of this size, one generator each: any number of workers gives the same bits. */
export const BLOCK_SIZE = 1024;

/** Outputs of a newly seeded generator that are thrown away. */
export const DROPPED_OUTPUTS = 12;
const TWO_32 = 4294967296;

export interface Generator {
  /** Uniform in (0, 1), ends never drawn. */
  uniform(): number;
  /** Standard normal, by the inverse distribution function: one uniform a draw. */
  normal(): number;
  /** Standard exponential, mean 1: −log of one uniform. */
  exponential(): number;
  /** Uniform integer in [0, n), without bias. */
  integer(n: number): number;
}

export interface PhiloxPlace {
  readonly stream: StreamName;
  /** Annealing chain or block of replicates. */
  readonly chain: number;
  readonly step: number;
}

function wordsOf(value: number, name: string): [low: number, high: number] {
  if (!Number.isSafeInteger(value) || value < 0) {
    throw new RangeError(`streams: expected ${name} as a whole number from 0 to 2^53 − 1, got ${value}`);
  }
  return [value % TWO_32, Math.floor(value / TWO_32)];
}

/**
 * Four random words as a pure function of (seed, stream, chain, step): random access, nothing carried over.
 * Counter = (step low, step high, chain, stream), key = (seed low, seed high).
 * @throws RangeError unless seed and step are whole numbers in [0, 2^53) and chain in [0, 2^32).
 */
export function philoxAt(seed: number, { stream, chain, step }: PhiloxPlace): FourWords {
  const [stepLow, stepHigh] = wordsOf(step, "step");
  const [chainWord, chainRest] = wordsOf(chain, "chain");
  if (chainRest !== 0) throw new RangeError(`streams: expected chain below 2^32, got ${chain}`);
  return philox4x32([stepLow, stepHigh, chainWord, streams[stream]], wordsOf(seed, "seed"));
}

/** Two words as a double in [0, 1) with 53 bits: ((w0 ≫ 5)·2^26 + (w1 ≫ 6)) / 2^53. */
export function doubleOfWords(first: number, second: number): number {
  return ((first >>> 5) * 67108864 + (second >>> 6)) / 9007199254740992;
}

/** State of the fast generator of one block, before its first outputs are dropped. */
export function seededState(seed: number, stream: StreamName, block: number): Sfc64State {
  const first = philoxAt(seed, { stream, chain: block, step: 0 });
  const second = philoxAt(seed, { stream, chain: block, step: 1 });
  return {
    a: { low: first[0], high: first[1] },
    b: { low: first[2], high: first[3] },
    c: { low: second[0], high: second[1] },
    counter: { low: 1, high: 0 },
  };
}

/** The fast generator of one block, ready to draw. */
export function seededSfc64(seed: number, stream: StreamName, block: number): Sfc64 {
  const generator = sfc64(seededState(seed, stream, block));
  discard(generator, DROPPED_OUTPUTS);
  return generator;
}

/** Whole multiples of n below 2^32 are kept, the rest is drawn again: no value is favoured. */
function drawInteger(source: Sfc64, n: number): number {
  if (!Number.isInteger(n) || n < 1 || n > TWO_32) {
    throw new RangeError(`integer: expected n as a whole number from 1 to 2^32, got ${n}`);
  }
  const limit = TWO_32 - (TWO_32 % n);
  do source.step();
  while (source.high >= limit);
  return source.high % n;
}

/**
 * The generator of one block of replicates, a pure function of (seed, stream, block): sfc64 whose state comes from
 * Philox4x32-10 at chain = block (a, b = words 0–1, 2–3 of step 0, low word first; c = words 0–1 of step 1;
 * counter 1; 12 outputs dropped).
 * @throws RangeError unless seed is a whole number in [0, 2^53) and block in [0, 2^32).
 */
export function blockGenerator(seed: number, stream: StreamName, block: number): Generator {
  const source = seededSfc64(seed, stream, block);
  const uniform = () => source.nextOpenDouble();
  return {
    uniform,
    normal: () => normalQuantile(uniform()),
    exponential: () => -log(uniform()),
    integer: (n) => drawInteger(source, n),
  };
}

/** How many blocks hold the replicates; the last may be partly filled. */
export function blockCount(replicates: number): number {
  return Math.ceil(replicates / BLOCK_SIZE);
}

/** Runs replicates 0 … replicates − 1 in order, each with the generator of its block. */
export function forEachReplicate(
  replicates: number,
  { seed, stream }: { readonly seed: number; readonly stream: StreamName },
  run: (replicate: number, generator: Generator) => void,
): void {
  for (let block = 0; block < blockCount(replicates); block++) {
    const generator = blockGenerator(seed, stream, block);
    const end = Math.min(replicates, (block + 1) * BLOCK_SIZE);
    for (let replicate = block * BLOCK_SIZE; replicate < end; replicate++) run(replicate, generator);
  }
}

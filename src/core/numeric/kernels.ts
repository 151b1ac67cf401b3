import { kernels as bytes } from "virtual:kernels";
import type { Word64 } from "./sfc64.ts";
import {
  BLOCK_SIZE,
  blockCount,
  DROPPED_OUTPUTS,
  type StreamName,
  seededSfc64,
  seededState,
} from "./streams.ts";
import { drawExponential, LAYERS, ziggurat } from "./ziggurat.ts";

/** One block of replicates of one purpose. */
export interface BlockPlace {
  readonly seed: number;
  readonly stream: StreamName;
  readonly block: number;
}

/** The hot loops, compiled; each has a twin in plain TypeScript that gives the same bits. */
export interface Kernels {
  /** Standard exponentials. */
  exponentials(place: BlockPlace, count: number): Float64Array;
  /**
   * Half the common-end statistic of each replicate when all taxa end at one level, by -ln V = E and the least E / m:
   * sum of E less sum of m times min(E / m). Twice it is chi-square with 2 (k - 1) degrees of freedom.
   *
   * @param exponents m of each taxon, at least 1.
   */
  commonEndStatistics(place: BlockPlace, exponents: Float64Array, replicates: number): Float64Array;
}

/** The same draws in plain TypeScript. */
export const twins: Kernels = {
  exponentials({ seed, stream, block }, count) {
    const source = seededSfc64(seed, stream, block);
    return Float64Array.from({ length: count }, () => drawExponential(source));
  },
  commonEndStatistics({ seed, stream, block }, exponents, replicates) {
    const source = seededSfc64(seed, stream, block);
    const inverse = exponents.map((m) => 1 / m);
    const total = exponents.reduce((sum, m) => sum + m, 0);
    return Float64Array.from({ length: replicates }, () => {
      let sum = 0;
      let least = Number.POSITIVE_INFINITY;
      for (const one of inverse) {
        const drawn = drawExponential(source);
        sum += drawn;
        least = drawn * one < least ? drawn * one : least;
      }
      return sum - least * total;
    });
  },
};

/** Simulations of one purpose, each of the same number of exponentials. */
export interface SimulationPlan {
  readonly seed: number;
  readonly stream: StreamName;
  readonly replicates: number;
  readonly draws: number;
}

/** Runs replicates 0 ... replicates - 1 in order with the exponentials of its block each; `true` stops. */
export function forEachSimulation(
  { seed, stream, replicates, draws }: SimulationPlan,
  run: (exponentials: Float64Array, replicate: number) => boolean | void,
): void {
  for (let block = 0; block < blockCount(replicates); block++) {
    const drawn = kernels.exponentials({ seed, stream, block }, draws * BLOCK_SIZE);
    const first = block * BLOCK_SIZE;
    for (let at = 0; at < BLOCK_SIZE && first + at < replicates; at++)
      if (run(drawn.subarray(at * draws, (at + 1) * draws), first + at) === true) return;
  }
}

/** What src/kernels exports. */
interface Exports {
  readonly memory: WebAssembly.Memory;
  seed(a: bigint, b: bigint, c: bigint, counter: bigint): void;
  discard(count: number): void;
  exponentials(out: number, count: number): void;
  spreads(inverse: number, taxa: number, total: number, out: number, replicates: number): void;
}

/** As src/kernels/ziggurat.ts lays them out: bound and width of each layer, edges, heights. */
const TABLES_AT = 1024;
const FREE_AT = 65536;
const DOUBLE = 8;
const PAGE = 65536;

/** The compiled kernels, or the twins where WebAssembly is not to be had: the same bits. */
export const kernels: Kernels = compiled() ?? twins;

function compiled(): Kernels | undefined {
  let exports: Exports;
  try {
    exports = new WebAssembly.Instance<Exports>(new WebAssembly.Module(bytes), {}).exports;
  } catch {
    return undefined;
  }
  writeTables(exports.memory);
  return {
    exponentials(place, count) {
      seed(exports, place);
      makeRoom(exports.memory, count);
      exports.exponentials(FREE_AT, count);
      return new Float64Array(exports.memory.buffer, FREE_AT, count).slice();
    },
    commonEndStatistics(place, exponents, replicates) {
      const taxa = exponents.length;
      const out = FREE_AT + taxa * DOUBLE;
      seed(exports, place);
      makeRoom(exports.memory, taxa + replicates);
      new Float64Array(exports.memory.buffer, FREE_AT, taxa).set(exponents.map((m) => 1 / m));
      const total = exponents.reduce((sum, m) => sum + m, 0);
      exports.spreads(FREE_AT, taxa, total, out, replicates);
      return new Float64Array(exports.memory.buffer, out, replicates).slice();
    },
  };
}

/** As src/kernels/ziggurat.ts reads them: bound and width of each layer, then edges, then heights. */
function writeTables(memory: WebAssembly.Memory): void {
  const { edges, heights, widths, bounds } = ziggurat;
  const edgesAt = TABLES_AT + LAYERS * 2 * DOUBLE;
  const view = new DataView(memory.buffer);
  bounds.forEach((bound, layer) => view.setBigUint64(TABLES_AT + layer * 2 * DOUBLE, BigInt(bound), true));
  for (let layer = 0; layer < LAYERS; layer++)
    view.setFloat64(TABLES_AT + (layer * 2 + 1) * DOUBLE, widths[layer], true);
  [edges, heights].forEach((table, at) =>
    table.forEach((value, layer) =>
      view.setFloat64(edgesAt + (at * (LAYERS + 1) + layer) * DOUBLE, value, true),
    ),
  );
}

function seed(exports: Exports, { seed, stream, block }: BlockPlace): void {
  const { a, b, c, counter } = seededState(seed, stream, block);
  exports.seed(word(a), word(b), word(c), word(counter));
  exports.discard(DROPPED_OUTPUTS);
}

const word = ({ high, low }: Word64): bigint => (BigInt(high) << 32n) | BigInt(low);

function makeRoom(memory: WebAssembly.Memory, doubles: number): void {
  const lacking = FREE_AT + doubles * DOUBLE - memory.buffer.byteLength;
  if (lacking > 0) memory.grow(Math.ceil(lacking / PAGE));
}

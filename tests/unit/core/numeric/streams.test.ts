import { describe, expect, it } from "vitest";
import {
  BLOCK_SIZE,
  blockCount,
  blockGenerator,
  forEachReplicate,
  philoxAt,
  streams,
} from "../../../../src/core/numeric/streams.ts";

const MASK = (1n << 64n) - 1n;

/** sfc64 once more, in big integers and straight from its definition. */
function* bigSfc64(a: bigint, b: bigint, c: bigint, counter: bigint): Generator<bigint> {
  for (;;) {
    const drawn = (a + b + counter) & MASK;
    counter = (counter + 1n) & MASK;
    a = b ^ (b >> 11n);
    b = (c + (c << 3n)) & MASK;
    c = ((((c << 24n) | (c >> 40n)) & MASK) + drawn) & MASK;
    yield drawn;
  }
}

function bigBlock(seed: number, chain: number): Generator<bigint> {
  const [w0, w1, w2, w3] = philoxAt(seed, { stream: "bootstrap", chain, step: 0 }).map(BigInt);
  const [v0, v1] = philoxAt(seed, { stream: "bootstrap", chain, step: 1 }).map(BigInt);
  const words = bigSfc64((w1 << 32n) | w0, (w3 << 32n) | w2, (v1 << 32n) | v0, 1n);
  for (let dropped = 0; dropped < 12; dropped++) words.next();
  return words;
}

function uniforms(seed: number, block: number, count: number): number[] {
  const generator = blockGenerator(seed, "bootstrap", block);
  return Array.from({ length: count }, () => generator.uniform());
}

const drawAll = (replicates: number) => {
  const drawn: number[] = [];
  forEachReplicate(replicates, { seed: 9, stream: "bootstrap" }, (replicate, generator) => {
    drawn[replicate] = generator.uniform();
  });
  return drawn;
};

describe("random streams", () => {
  it("draw the words of the definition, 12 dropped, as the centres of 2^52 cells", () => {
    for (const [seed, block] of [
      [42, 0],
      [2 ** 53 - 1, 7],
      [5_000_000_000, 2 ** 32 - 1],
    ] as const) {
      const words = bigBlock(seed, block);
      const expected = Array.from(
        { length: 2000 },
        () => (Number(BigInt(words.next().value) >> 12n) + 0.5) / 2 ** 52,
      );
      expect(uniforms(seed, block, 2000)).toEqual(expected);
    }
  });

  it("differ between seeds, blocks and purposes", () => {
    const first = uniforms(1, 0, 3);
    expect(uniforms(1, 0, 3)).toEqual(first);
    expect(uniforms(1 + 2 ** 32, 0, 3)).not.toEqual(first);
    expect(uniforms(1, 1, 3)).not.toEqual(first);
    expect(blockGenerator(1, "permutation", 0).uniform()).not.toBe(first[0]);
    expect(new Set(Object.values(streams)).size).toBe(Object.keys(streams).length);
  });

  it("gives every replicate the generator of its block, whatever the number asked for", () => {
    const many = drawAll(2 * BLOCK_SIZE + 5);
    expect(many).toHaveLength(2 * BLOCK_SIZE + 5);
    expect(many.slice(BLOCK_SIZE, BLOCK_SIZE + 3)).toEqual(uniforms(9, 1, 3));
    expect(drawAll(BLOCK_SIZE + 1)).toEqual(many.slice(0, BLOCK_SIZE + 1));
    expect([0, 1, BLOCK_SIZE, BLOCK_SIZE + 1].map(blockCount)).toEqual([0, 1, 1, 2]);
  });

  it("draws normals, exponentials and integers with the right moments", () => {
    const generator = blockGenerator(3, "sampling", 0);
    const count = 100_000;
    const meanOf = (draw: () => number) =>
      Array.from({ length: count }, draw).reduce((a, b) => a + b, 0) / count;
    // Five standard errors each.
    expect(Math.abs(meanOf(() => generator.normal()))).toBeLessThan(5 / Math.sqrt(count));
    expect(Math.abs(meanOf(() => generator.normal() ** 2) - 1)).toBeLessThan(5 * Math.sqrt(2 / count));
    expect(Math.abs(meanOf(() => generator.exponential()) - 1)).toBeLessThan(5 / Math.sqrt(count));
    expect(Math.abs(meanOf(() => generator.integer(7)) - 3)).toBeLessThan(10 / Math.sqrt(count));
  });

  it("draws integers up to 2^32 without bias towards the low ones", () => {
    const generator = blockGenerator(4, "sampling", 0);
    const n = 3 * 2 ** 30;
    let low = 0;
    for (let i = 0; i < 10_000; i++) if (generator.integer(n) < 2 ** 30) low++;
    // A third is right; a plain remainder of 32 bits would give a half.
    expect(Math.abs(low / 10_000 - 1 / 3)).toBeLessThan(0.025);
  });

  it("refuses a seed, block or bound that it cannot honour", () => {
    expect(() => blockGenerator(0.5, "example", 0)).toThrow(/seed/);
    expect(() => blockGenerator(2 ** 53, "example", 0)).toThrow(/seed/);
    expect(() => blockGenerator(1, "example", 2 ** 32)).toThrow(/chain/);
    expect(() => blockGenerator(1, "example", 0).integer(0)).toThrow(/whole number/);
  });
});

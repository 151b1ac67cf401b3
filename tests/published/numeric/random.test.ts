import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { type FourWords, philox4x32, type TwoWords } from "../../../src/core/numeric/philox.ts";
import { sfc64, type Word64 } from "../../../src/core/numeric/sfc64.ts";
import { doubleOfWords, philoxAt } from "../../../src/core/numeric/streams.ts";

interface Fixture {
  readonly sfc64: readonly { readonly state: readonly string[]; readonly words: readonly string[] }[];
}

const fixture: Fixture = JSON.parse(readFileSync(new URL("random.json", import.meta.url), "utf8"));
const hex = (word: number) => word.toString(16).padStart(8, "0");

function wordOf(text: string): Word64 {
  return { high: Number.parseInt(text.slice(0, 8), 16), low: Number.parseInt(text.slice(8), 16) };
}

// Known-answer vectors distributed with Salmon, Moraes, Dror & Shaw 2011, doi 10.1145/2063384.2063405.
const knownAnswers: readonly (readonly [FourWords, TwoWords, string])[] = [
  [[0, 0, 0, 0], [0, 0], "6627e8d5 e169c58d bc57ac4c 9b00dbd8"],
  [
    [0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff],
    [0xffffffff, 0xffffffff],
    "408f276d 41c83b0e a20bc7c6 6d5451fd",
  ],
  [
    [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
    [0xa4093822, 0x299f31d0],
    "d16cfe09 94fdcceb 5001e420 24126ea1",
  ],
];

describe("random words against published and independent values", () => {
  it("Philox4x32-10 gives the published known answers", () => {
    for (const [counter, key, words] of knownAnswers) {
      expect(philox4x32(counter, key).map(hex).join(" ")).toBe(words);
    }
  });

  // Computed once by a separate Philox4x32-10 in Python from the same counter layout.
  it("a counter draw splits seed and step into low and high words", () => {
    const first = philoxAt(42, { stream: "annealing", chain: 0, step: 0 });
    expect(first.map(hex).join(" ")).toBe("9ceaf053 77f5493b 12bf50ad 5742b3d7");
    expect(doubleOfWords(first[0], first[1])).toBe(0.6129598801477738);
    const far = philoxAt(1099511627781, { stream: "ageSampler", chain: 7, step: 4294967296 });
    expect(far.map(hex).join(" ")).toBe("79d06b68 3eb1051a a8972186 a27cf74d");
    expect(doubleOfWords(far[0], far[1])).toBe(0.47583647999829504);
  });

  it("sfc64 draws the words of numpy 2.4.6, carries and counter overflow included", () => {
    for (const { state, words } of fixture.sfc64) {
      const [a, b, c, counter] = state.map(wordOf);
      const generator = sfc64({ a: a, b: b, c: c, counter: counter });
      const drawn = words.map(() => {
        generator.step();
        return hex(generator.high) + hex(generator.low);
      });
      expect(drawn).toEqual(words);
    }
  });
});

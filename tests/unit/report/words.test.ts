import { describe, expect, it } from "vitest";
import { flagWords } from "../../../src/report/wordings/cautions.ts";
import {
  metres,
  offset,
  offsetInterval,
  position,
  positionInterval,
  probability,
  pValue,
} from "../../../src/report/wordings/numbers.ts";
import { list, name, plain, plural, say, strong } from "../../../src/report/wordings/words.ts";
import { sectionWith } from "../core/study/sections.ts";

describe("words", () => {
  it("a sentence keeps its stresses and names", () => {
    const words = say`${strong("2")} finds of ${name("Orvella tenuis")} in ${3} samples`;
    expect(words).toEqual([
      { strong: "2" },
      " finds of ",
      { name: "Orvella tenuis" },
      " in ",
      "3",
      " samples",
    ]);
    expect(plain(words)).toBe("2 finds of Orvella tenuis in 3 samples");
  });

  it("lists and counts as a person would", () => {
    expect(list(["a"])).toBe("a");
    expect(list(["a", "b", "c"])).toBe("a, b and c");
    expect(list(["a", "b", "c", "d", "e"], 3)).toBe("a, b and 3 more");
    expect(plural(1, "taxon", "taxa")).toBe("1 taxon");
    expect(plural(1200, "find")).toBe("1,200 finds");
  });
});

describe("numbers", () => {
  const core = sectionWith({ axis: "depth", unit: "ft" });

  it("a position keeps the section's own axis and unit", () => {
    expect(position(sectionWith({}), 12.7712)).toBe("12.77\u00a0m");
    expect(position(core, -125.687)).toBe("depth\u00a0412.36\u00a0ft");
  });

  it("an interval has the stratigraphically lower end first and shows its width", () => {
    expect(positionInterval(core, -126, -125)).toBe("413.39 to 410.10\u00a0ft");
    expect(positionInterval(sectionWith({}), 28.8562, 28.8634)).toBe("28.856 to 28.863\u00a0m");
  });

  it("offsets carry their sign and probabilities their size", () => {
    expect(offset(0.624)).toBe("+0.62");
    expect(offset(-1.3)).toBe("\u22121.30");
    expect(offsetInterval(-0.0132, 0.144)).toBe("\u22120.013 to +0.144\u00a0m");
    expect(metres(0.0128)).toBe("0.013");
    expect(probability(0.0000012)).toBe("<\u00a00.001");
    expect(pValue(0.4599)).toBe("p\u00a0=\u00a00.46");
    expect(pValue(0.0104)).toBe("p\u00a0=\u00a00.010");
  });
});

describe("flags", () => {
  it("tell their quantities in words with units", () => {
    const flag = {
      section: "orskel-ledge",
      horizon: "iridium-1",
      flag: "COARSE_SAMPLING",
      numbers: { thickestCm: 12.3456, sameLithology: 24, densityGCm3: 2.3 },
      consequence: "sampling too coarse",
    };
    expect(plain(flagWords(flag))).toBe(
      "iridium-1, coarse sampling: sampling too coarse (thickest 12.3 cm, same lithology 24, density 2.3 g/cm\u00b3).",
    );
  });
});

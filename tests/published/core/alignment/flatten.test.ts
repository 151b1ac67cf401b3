import { describe, expect, it } from "vitest";
import { consensusPositions } from "../../../../src/core/alignment/consensus.ts";
import { commonCovariance, toCommon } from "../../../../src/core/alignment/flatten.ts";
import type { SectionAlignment } from "../../../../src/core/alignment/result.ts";
import cases from "./flatten.json" with { type: "json" };

const section: SectionAlignment = {
  section: "worked",
  horizons: ["a", "b", "c"],
  heightsM: [2, 5, 11],
  sigmasM: [0.05, 0.1, 0.2],
  targets: [0, 4, 10],
  targetSigmas: [0, 0, 0],
};

describe("flattening agrees with an independent script, to 1e-12", () => {
  it.each(cases.positions)("height $height, $beyond", ({ height, beyond, common, sigma }) => {
    const got = toCommon(section, height, {
      beyond: beyond === "gain" ? "gain" : "rigid",
      sigmaM: cases.pickSigma,
    });
    expect(got.common).toBeCloseTo(common, 12);
    expect(got.sigma).toBeCloseTo(sigma, 12);
  });

  it("one marker alone shifts the section", () => {
    const single = {
      ...section,
      horizons: ["a"],
      heightsM: [4.1],
      sigmasM: [0.06],
      targets: [0],
      targetSigmas: [0],
    };
    const got = toCommon(single, 7.3, { beyond: "rigid", sigmaM: 0.03 });
    expect(got.common).toBeCloseTo(3.2, 12);
    expect(got.sigma).toBeCloseTo(0.0670820393249937, 12);
  });

  it("consensus positions are the least squares of consecutive thicknesses", () => {
    const observed = [
      { from: 0, to: 1, thicknessM: 2 },
      { from: 1, to: 2, thicknessM: 6 },
      { from: 0, to: 2, thicknessM: 6 },
      { from: 0, to: 1, thicknessM: 3 },
      { from: 1, to: 2, thicknessM: 3 },
    ];
    const [first, second, third] = consensusPositions(3, observed);
    expect(first).toBe(0);
    expect(second).toBeCloseTo(2.2499999999999996, 9);
    expect(third).toBeCloseTo(6.500000000000003, 9);
  });
});

describe("covariance of two heights", () => {
  it("is the variance where the two are one, less the error of reading the height", () => {
    const at = toCommon(section, 3.5, { beyond: "rigid" });
    expect(commonCovariance(section, [3.5, 3.5], "rigid")).toBeCloseTo(at.sigma ** 2, 15);
  });

  it("agrees with a simulation of shifted markers", () => {
    const pair: readonly [number, number] = [3, 7];
    const step = 1e-4;
    let expected = 0;
    for (const k of [0, 1, 2]) {
      const moved = { ...section, heightsM: section.heightsM.map((h, i) => (i === k ? h + step : h)) };
      const slope = pair.map(
        (h) =>
          (toCommon(moved, h, { beyond: "rigid" }).common -
            toCommon(section, h, { beyond: "rigid" }).common) /
          step,
      );
      expected += slope[0] * slope[1] * section.sigmasM[k] ** 2;
    }
    expect(commonCovariance(section, pair, "rigid")).toBeCloseTo(expected, 5);
  });
});

import { describe, expect, it } from "vitest";
import { oneSigma } from "../../../../src/core/study/errors.ts";
import { readPolarityCell, readValueCell, scaleReading } from "../../../../src/core/study/readings.ts";

const reading = (text: string, limit?: number) => {
  const cell = readValueCell(text, limit);
  return cell.kind === "reading" ? cell.reading : cell.kind === "problem" ? cell.code : cell.kind;
};

describe("value cells", () => {
  it.each([
    ["<0.05", { kind: "below", limit: 0.05 }],
    ["< 0.05", { kind: "below", limit: 0.05 }],
    ["≤0.05", { kind: "below", limit: 0.05 }],
    ["0.05 U", { kind: "below", limit: 0.05 }],
    ["0.05u", { kind: "below", limit: 0.05 }],
    [">5", { kind: "above", limit: 5 }],
    ["0.02..0.05", { kind: "between", low: 0.02, high: 0.05 }],
    ["-1..-0.5", { kind: "between", low: -1, high: -0.5 }],
    ["-2.3", { kind: "value", value: -2.3 }],
    ["\u22122.3", { kind: "value", value: -2.3 }],
    ["1.2e-3", { kind: "value", value: 0.0012 }],
    ["0", { kind: "value", value: 0 }],
    ["", "missing"],
    ["na", "missing"],
    ["NA", "missing"],
    ["nd", "nd-ambiguous"],
    ["N.D.", "nd-ambiguous"],
    ["--", "nd-ambiguous"],
    ["tr", "trace-limits"],
    ["trace", "trace-limits"],
    ["0.05..0.02", "interval-reversed"],
    ["NaN", "not-finite"],
    ["1e400", "not-finite"],
    ["about 3", "not-a-reading"],
    ["0,05", "not-a-reading"],
  ])("reads %s", (text, expected) => {
    expect(reading(text)).toEqual(expected);
  });

  it("reads bdl as below the row's own detection limit, and asks for one where there is none", () => {
    expect(reading("bdl", 0.03)).toEqual({ kind: "below", limit: 0.03 });
    expect(reading("BDL")).toBe("no-detection-limit");
  });

  it("reads normal and reversed polarity", () => {
    expect(readPolarityCell("N")).toEqual({ kind: "reading", reading: { kind: "value", value: 1 } });
    expect(readPolarityCell("reversed")).toEqual({ kind: "reading", reading: { kind: "value", value: -1 } });
    expect(readPolarityCell("0.4")).toMatchObject({ kind: "problem", code: "not-a-polarity" });
  });

  it("scales every kind of reading", () => {
    expect(scaleReading({ kind: "between", low: 1, high: 2 }, 1000)).toEqual({
      kind: "between",
      low: 1000,
      high: 2000,
    });
    expect(scaleReading({ kind: "below", limit: 0.5 }, 1000)).toEqual({ kind: "below", limit: 500 });
  });
});

describe("one standard deviation", () => {
  it.each([
    ["1s", 0.4, 0.4],
    ["2s", 0.4, 0.2],
    ["1s%", 5, 1],
    ["2s%", 5, 0.5],
    ["95%", 1.959963984540054, 1],
    ["se", 0.4, 0.4],
  ] as const)("of an error given as %s", (kind, error, sigma) => {
    expect(oneSigma(error, kind, -20)).toBeCloseTo(sigma, 14);
  });
});

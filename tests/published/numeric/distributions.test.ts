import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { logBeta, regularisedBeta } from "../../../src/core/numeric/beta.ts";
import { binomialUpperTail } from "../../../src/core/numeric/binomial.ts";
import { chiSquareQuantile, chiSquareUpperTail } from "../../../src/core/numeric/chi-square.ts";
import {
  logGamma,
  logGammaDifference,
  regularisedGammaP,
  regularisedGammaQ,
} from "../../../src/core/numeric/gamma.ts";
import { irwinHallMeanCdf } from "../../../src/core/numeric/irwin-hall.ts";
import { kolmogorovUpperTail } from "../../../src/core/numeric/kolmogorov.ts";
import { erfc, logNormalCdf, normalQuantile, normalSurvival } from "../../../src/core/numeric/normal.ts";
import { studentQuantile, studentUpperTail } from "../../../src/core/numeric/student.ts";
import { relativeError } from "./ulp.ts";

// mpmath 1.3.0 with 60 digits (300 for Kolmogorov), exact rationals for binomial and Irwin–Hall: make-distributions.py.
const table: Readonly<Record<string, readonly (readonly number[])[]>> = JSON.parse(
  readFileSync(new URL("distributions.json", import.meta.url), "utf8"),
);

type Check = readonly [name: string, f: (a: number, b: number, c: number) => number, tolerance: number];

const checks: readonly Check[] = [
  ["erfc", erfc, 1e-15],
  ["normalSurvival", normalSurvival, 2e-15],
  ["logNormalCdf", logNormalCdf, 1e-14],
  ["normalQuantile", normalQuantile, 2e-15],
  ["logGamma", logGamma, 1e-14],
  ["logGammaDifference", logGammaDifference, 1e-14],
  ["logBeta", logBeta, 1e-14],
  ["regularisedGammaP", regularisedGammaP, 2e-13],
  ["regularisedGammaQ", regularisedGammaQ, 2e-13],
  ["regularisedBeta", regularisedBeta, 2e-13],
  ["studentUpperTail", studentUpperTail, 2e-13],
  ["studentQuantile", studentQuantile, 2e-13],
  ["chiSquareUpperTail", chiSquareUpperTail, 2e-13],
  ["chiSquareQuantile", chiSquareQuantile, 1e-12],
  ["binomialUpperTail", binomialUpperTail, 2e-13],
  ["irwinHallMeanCdf", irwinHallMeanCdf, 1e-14],
  ["kolmogorovUpperTail", kolmogorovUpperTail, 1e-10],
];

describe("distribution functions against values of high precision, far into the tails", () => {
  it.each(checks)("%s", (name, f, tolerance) => {
    const rows = table[name];
    const failures = rows
      .map((row) => ({ row, got: f(row[0], row[1], row[2]) }))
      .map(({ row, got }) => ({ row, got, error: relativeError(got, row.at(-1)!) }))
      .filter(({ error }) => !(error <= tolerance));
    expect(rows.length).toBeGreaterThan(4);
    expect(failures).toEqual([]);
  });
});

import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { cos, exp, expm1, log, log1p, log10, pow, sin } from "../../../src/core/numeric/elementary.ts";
import { ulpsBetween } from "./ulp.ts";

type Rows = readonly (readonly number[])[];
type Table = Readonly<Record<"exp" | "expm1" | "log" | "log10" | "log1p" | "sin" | "cos" | "pow", Rows>>;

// mpmath 1.3.0 at 1300 digits, rounded once to a double: make-elementary.py.
const table: Table = JSON.parse(readFileSync(new URL("elementary.json", import.meta.url), "utf8"));
const functions = { exp, expm1, log, log10, log1p, sin, cos };

function worst(rows: Rows, f: (...row: number[]) => number): number {
  return Math.max(...rows.map((row) => ulpsBetween(f(...row), row.at(-1)!)));
}

describe("elementary functions against correctly rounded values", () => {
  for (const name of ["exp", "expm1", "log", "log10", "log1p", "sin", "cos"] as const) {
    it(`${name} stays within 1 ulp, from the smallest subnormal to the largest double`, () => {
      expect(table[name].length).toBeGreaterThan(250);
      expect(worst(table[name], (x) => functions[name](x))).toBeLessThanOrEqual(1);
    });
  }
  it("pow stays within 1 ulp, for bases near 1 with huge exponents and for results near the ends", () => {
    expect(table.pow).toHaveLength(500);
    expect(worst(table.pow, (x, y) => pow(x, y))).toBeLessThanOrEqual(1);
  });
});

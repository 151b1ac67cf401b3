import { describe, expect, it } from "vitest";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

function measured(header: string, amount: string) {
  const text = `section,analyte,value,unit,height (m),${header}\nTarn Cut,spherules,4,count,1,${amount}\nTarn Cut,spherules,2,count,2,${amount}\n`;
  const study = readStudy(new Map([["measurements.csv", new TextEncoder().encode(text)]]));
  const told = study.problems.filter(({ code }) => code === "amount-without-unit");
  return { told, units: study.sections.flatMap((s) => s.measurements.map((m) => [m.amount, m.amountUnit])) };
}

describe("an amount of rock", () => {
  it("without a unit is told once, and kept", () => {
    const { told, units } = measured("amount", "10");
    expect(told).toMatchObject([
      {
        severity: "caution",
        file: "measurements.csv",
        row: 2,
        column: "amount",
        found: "10 (and 1 more row)",
      },
    ]);
    expect(units).toEqual([
      [10, undefined],
      [10, undefined],
    ]);
  });

  it.each([
    ["amount (g)", "10", "g"],
    ["amount,amount_unit", "10,kg", "kg"],
  ])("has the unit of its header or of the column beside it: %s", (header, amount, unit) => {
    const { told, units } = measured(header, amount);
    expect(told).toEqual([]);
    expect(units).toEqual([
      [10, unit],
      [10, unit],
    ]);
  });
});

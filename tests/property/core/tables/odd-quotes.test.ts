import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const HEADER = "section,taxon,height (m)";

const heightsIn = (text: string) => {
  const study = readStudy(new Map([["occurrences.csv", new TextEncoder().encode(text)]]));
  const errors = study.problems.filter(({ severity }) => severity === "error");
  return {
    study,
    errors,
    heights: study.sections.flatMap((s) => Array.from(s.occurrences, (o) => o.heightM)),
  };
};

const rowText = (at: number, isQuoted: boolean): string =>
  isQuoted ? `"Tarn Cut","Velorites ""alta""",${at}` : `Tarn Cut,Velorites alta,${at}`;

describe("a row whose quotes went wrong", () => {
  it("takes no row before it along, and is told where it stands", () => {
    const cases = fc.record({
      quoted: fc.array(fc.boolean(), { minLength: 3, maxLength: 12 }),
      odd: fc.nat({ max: 11 }),
      cell: fc.nat({ max: 1 }),
      fault: fc.constantFrom('"', 'x"', '"x"y', '"x" "y"', '"x', '""x', '"x""'),
    });
    fc.assert(
      fc.property(cases, ({ quoted, odd, cell, fault }) => {
        const at = odd % quoted.length;
        const cells = ["Tarn Cut", "Velorites alta", String(at)].with(cell, fault);
        const lines = quoted.map((isQuoted, row) => (row === at ? cells.join(",") : rowText(row, isQuoted)));
        const { errors, heights, study } = heightsIn(`${[HEADER, ...lines].join("\n")}\n`);
        const before = quoted.flatMap((_, row) => (row < at ? [row] : []));
        expect(heights.filter((height) => height < at)).toEqual(before);
        expect(errors.every(({ row }) => row === undefined || row >= at + 2)).toBe(true);
        if (fault !== 'x"') expect(study.problems.some(({ row }) => row === at + 2)).toBe(true);
      }),
      { seed: 6, numRuns: 600 },
    );
  });

  it("with text after a closing quote is left out alone", () => {
    const { errors, heights } = heightsIn(
      `${HEADER}\nTarn Cut,Velorites alta,1\nTarn Cut,"Velorites" parva,2\n"Tarn Cut","Quenstra lenis",3\n`,
    );
    expect(heights).toEqual([1, 3]);
    expect(errors).toMatchObject([{ code: "malformed-quote", row: 3 }]);
  });

  it("with a quote that nothing closes is left out alone", () => {
    const { errors, heights } = heightsIn(
      `${HEADER}\nTarn Cut,Velorites alta,1\nTarn Cut,"Velorites parva,2\nTarn Cut,Quenstra lenis,3\n`,
    );
    expect(heights).toEqual([1, 3]);
    expect(errors).toMatchObject([{ code: "unclosed-quote", row: 3, file: "occurrences.csv" }]);
  });
});

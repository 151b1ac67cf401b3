import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

type Encoded = "UTF-8" | "UTF-8 with mark" | "UTF-16LE" | "UTF-16BE" | "Windows-1252";

interface Written {
  readonly delimiter: string;
  readonly decimal: string;
  readonly end: string;
  readonly quotesAll: boolean;
  readonly encoding: Encoded;
}

const written: fc.Arbitrary<Written> = fc.record({
  delimiter: fc.constantFrom(",", ";", "\t", "|"),
  decimal: fc.constantFrom(".", ","),
  end: fc.constantFrom("\n", "\r\n", "\r"),
  quotesAll: fc.boolean(),
  encoding: fc.constantFrom("UTF-8", "UTF-8 with mark", "UTF-16LE", "UTF-16BE", "Windows-1252"),
});

/** Letters that every encoding here holds, and the signs that part cells, rows and numbers. */
const sign = fc.constantFrom(..."aüé ß°'\";,|\t.-1".split(""), "\n");
const name = fc.array(sign, { minLength: 1, maxLength: 8 }).map((signs) => `Orvella ${signs.join("")}x`);
const row = fc.record({
  name,
  // Never three decimals alone: 1,234 asks, as it should.
  position: fc.integer({ min: -99999, max: 99999 }).map((hundredths) => hundredths / 100),
});

function bytesOf(text: string, encoding: Encoded): Uint8Array {
  switch (encoding) {
    case "UTF-8":
      return new TextEncoder().encode(text);
    case "UTF-8 with mark":
      return new TextEncoder().encode(`\uFEFF${text}`);
    case "Windows-1252":
      return Uint8Array.from(text, (sign) => sign.charCodeAt(0));
    case "UTF-16LE":
    case "UTF-16BE": {
      const units = [0xfeff, ...Array.from(text, (sign) => sign.charCodeAt(0))];
      const view = new DataView(new ArrayBuffer(2 * units.length));
      for (const [at, unit] of units.entries()) view.setUint16(2 * at, unit, encoding === "UTF-16LE");
      return new Uint8Array(view.buffer);
    }
    default:
      return encoding satisfies never;
  }
}

function tableText(rows: readonly { name: string; position: number }[], how: Written): string {
  const cell = (text: string) =>
    how.quotesAll || /[,;|\t"\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
  const number = (value: number) => value.toFixed(2).replace(".", how.decimal);
  return [
    ["section", "taxon", "height (m)"],
    ...rows.map(({ name, position }) => ["Ørskel Ledge", name, number(position)]),
  ]
    .map((cells) => `${cells.map(cell).join(how.delimiter)}${how.end}`)
    .join("");
}

describe("dialects", () => {
  it("are found out, whatever is combined, and never change a cell", () => {
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 6 }), written, (rows, how) => {
        const bytes = bytesOf(tableText(rows, how), how.encoding);
        const study = readStudy(new Map([["occurrences.csv", bytes]]));
        const [sheet] = study.sheets;
        expect(sheet.dialect).toMatchObject({
          delimiter: how.delimiter,
          decimal: how.decimal === "," ? "comma" : "point",
          encoding: how.encoding === "UTF-8 with mark" ? "UTF-8" : how.encoding,
        });
        expect(Array.from(sheet.rows, ([, taxon]) => taxon)).toEqual(rows.map(({ name }) => name));
        const distinct = new Set(rows.map(({ name, position }) => `${name.trim()}\u0000${position}`));
        const heights = study.sections.flatMap(({ occurrences }) =>
          Array.from(occurrences, ({ heightM }) => heightM),
        );
        expect(heights).toHaveLength(distinct.size);
        for (const height of heights) expect(rows.some(({ position }) => position + 0 === height)).toBe(true);
        expect(study.problems.filter(({ severity }) => severity === "error")).toEqual([]);
      }),
      { seed: 1, numRuns: 1500 },
    );
  });
});

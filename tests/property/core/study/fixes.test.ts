import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Problem } from "../../../../src/core/study/problem.ts";
import { soundTables, type Tables, texts, withCell } from "../../../unit/core/tables/mended-tables.ts";
import { errorsOf, studyFrom } from "../../../unit/core/tables/study-files.ts";

interface Cell {
  readonly file: string;
  readonly row: number;
  readonly column: string;
}

const cellsOf = (tables: Tables): readonly Cell[] =>
  Object.entries(tables).flatMap(([file, [header, ...rows]]) =>
    rows.flatMap((_, index) => header.map((column) => ({ file, row: index + 2, column }))),
  );

const written = ({ file, row, column }: Cell) =>
  soundTables[file][row - 1][soundTables[file][0].indexOf(column)];

/** Slips of the pen and of the spreadsheet. */
const slips: readonly ((text: string, at: number) => string)[] = [
  (text) => text.toUpperCase(),
  (text) => text.replace(/[ -]/, "_"),
  (text) => text.replace(/[ -]/, ""),
  (text) => text.replace(".", ","),
  (text) => `${text} m`,
  (text) => `${text}cm`,
  (text) => `${text} ng/g`,
  (text) => `${text} Ma`,
  (text) => `${text} g/cm3`,
  (text, at) => text.slice(0, at % text.length) + text.slice((at % text.length) + 1),
  (text, at) => `${text.slice(0, at % text.length)}e${text.slice((at % text.length) + 1)}`,
  (text, at) => `${text.slice(0, at % text.length)}7${text.slice(at % text.length)}`,
];

const slip = fc.record({
  cell: fc.constantFrom(...cellsOf(soundTables).filter((cell) => written(cell) !== "")),
  slip: fc.constantFrom(...slips),
  at: fc.nat({ max: 40 }),
});

const keyOf = ({ code, file, row, column }: Problem) => JSON.stringify([code, file, row, column]);

describe("a one-key mend", () => {
  it("takes its problem away and brings no error, whatever the slip", () => {
    let mended = 0;
    fc.assert(
      fc.property(slip, ({ cell, slip, at }) => {
        const spoilt = withCell(soundTables, { ...cell, now: slip(written(cell), at) });
        const study = studyFrom(texts(spoilt));
        for (const problem of study.problems) {
          if (problem.fix === undefined) continue;
          mended += 1;
          const after = studyFrom(texts(withCell(spoilt, problem.fix)));
          expect(after.problems.map(keyOf)).not.toContain(keyOf(problem));
          expect(errorsOf(after).length).toBeLessThanOrEqual(
            errorsOf(study).length - (problem.severity === "error" ? 1 : 0),
          );
        }
      }),
      { seed: 1, numRuns: 240 },
    );
    expect(mended).toBeGreaterThan(20);
  });

  it("leads back to the study as it was before the slip", () => {
    const before = studyFrom(texts(soundTables)).sections;
    fc.assert(
      fc.property(slip, ({ cell, slip, at }) => {
        const spoilt = withCell(soundTables, { ...cell, now: slip(written(cell), at) });
        const fixes = studyFrom(texts(spoilt)).problems.flatMap(({ fix }) => fix ?? []);
        const own = fixes.find(
          ({ file, row, column }) => JSON.stringify({ file, row, column }) === JSON.stringify(cell),
        );
        if (own === undefined) return;
        expect(studyFrom(texts(withCell(spoilt, own))).sections).toEqual(before);
      }),
      { seed: 2, numRuns: 200 },
    );
  });
});

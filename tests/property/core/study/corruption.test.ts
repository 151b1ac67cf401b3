// The example study, thinned, with its second leg over dipping beds: whatever happens to one cell is told where it stands,
// and nothing else changes.

import { readdirSync, readFileSync } from "node:fs";
import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Study } from "../../../../src/core/study/model.ts";
import type { ColumnDeclaration } from "../../../../src/core/study/tables/declare.ts";
import { tables as declarations } from "../../../../src/core/study/tables/index.ts";
import { readWrittenCsv } from "../../../../src/core/tables/csv.ts";
import { type Tables, texts } from "../../../unit/core/tables/mended-tables.ts";
import { studyFrom } from "../../../unit/core/tables/study-files.ts";

const example = new URL("../../../../datasets/veyra-shelf/", import.meta.url);
const kept = new Set(["orskel-ledge", "tamber-quarry"]);

const legs: Tables[string] = [
  [
    "section",
    "leg",
    "reading",
    "position",
    "tape_bearing_deg",
    "tape_slope_deg",
    "dip_deg",
    "dip_direction_deg",
  ],
  ["orskel-ledge", "A", "0", "0", "", "", "", ""],
  ["orskel-ledge", "A", "22.4", "21.8", "", "", "", ""],
  ["orskel-ledge", "B", "0", "18.6", "", "", "", ""],
  ["orskel-ledge", "B", "10", "", "110", "20", "50", "95"],
  ["orskel-ledge", "B", "18", "", "100", "5", "52", "98"],
  ["orskel-ledge", "B", "26", "", "95", "-10", "55", "90"],
];

/** Rows of two sections, in the samples that are kept: every forty-fifth, and what was found, searched and measured there. */
function thinned(): Tables {
  const files = readdirSync(example).filter((name) => name.endsWith(".csv") && name !== "choices.csv");
  const whole = new Map(
    files.map((name) => {
      const { headers, rows } = readWrittenCsv(readFileSync(new URL(name, example), "utf8"));
      return [name, { headers, rows }] as const;
    }),
  );
  const samples = whole.get("samples.csv")?.rows.filter((_, at) => at % 45 === 0) ?? [];
  const names = new Set(samples.map(([section, sample]) => `${section} ${sample}`));
  const cut = ([name, { headers, rows }]: readonly [
    string,
    { headers: readonly string[]; rows: readonly (readonly string[])[] },
  ]) => {
    const [section, sample] = ["section", "sample"].map((column) => headers.indexOf(column));
    const own = rows.filter(
      (cells) =>
        (section < 0 || kept.has(cells[section])) &&
        (sample < 0 || names.has(`${cells[section]} ${cells[sample]}`)),
    );
    return [name, [headers, ...own]] as const;
  };
  return { ...Object.fromEntries([...whole].map(cut)), "legs.csv": legs };
}

const sound = thinned();
const before = studyFrom(texts(sound));
const columnsOf = (file: string): ReadonlyMap<string, ColumnDeclaration> =>
  new Map(Object.entries(declarations.find(({ name }) => `${name}.csv` === file)?.columns ?? {}));

interface Cell {
  readonly file: string;
  readonly row: number;
  readonly column: string;
}

/** Cells in which not any text is good: numbers, words of a list, values, units, signs, and names of other tables' rows. */
const cells: readonly Cell[] = Object.entries(sound).flatMap(([file, [header, ...rows]]) =>
  header.flatMap((column) => {
    const declared = columnsOf(file).get(column);
    const isStrict =
      declared !== undefined &&
      (declared.type !== "text" ||
        ["section", "sample", "leg", "value", "unit", "qualifier"].includes(column));
    return isStrict ? rows.map((_, at) => ({ file, row: at + 2, column })) : [];
  }),
);
const written = ({ file, row, column }: Cell) => sound[file][row - 1][sound[file][0].indexOf(column)];

function spoilt({ file, row, column }: Cell, now: string): Study {
  const at = sound[file][0].indexOf(column);
  const rows = sound[file].map((cells, index) => (index === row - 1 ? cells.with(at, now) : cells));
  return studyFrom(texts({ ...sound, [file]: rows }));
}

/** The study without a row; the others keep their numbers. */
function without({ file, row }: Cell): Study {
  const rows = sound[file].map((cells, index) => (index === row - 1 ? cells.map(() => "") : cells));
  return studyFrom(texts({ ...sound, [file]: rows }));
}

const garbage = fc.constantFrom(
  "#REF!",
  "12..4",
  "\uFFFD",
  "1O.5",
  "0x1F",
  "??!",
  "NaN",
  "12.4 furlong",
  "yes no",
  "--",
  "=1+1",
);
const damage = fc.record({ cell: fc.constantFrom(...cells), now: garbage });

const isNamed = (study: Study, cell: Cell): boolean =>
  study.problems.some(
    ({ file, row, column, found }) =>
      (file === cell.file && row === cell.row && column === cell.column) || found.includes(written(cell)),
  );

/** What a row becomes, table by table, where a spoilt cell can take no more than its own row. */
const leaves = new Set([
  "occurrences.csv",
  "measurements.csv",
  "searches.csv",
  "horizons.csv",
  "beds.csv",
  "intervals.csv",
]);

const heightsOfLegs = (study: Study) =>
  new Map(
    study.sections.flatMap(({ legs }) =>
      legs.flatMap(({ name, readings, heightsM }) =>
        readings.map((reading, at) => [`${name} ${reading}`, heightsM[at]] as const),
      ),
    ),
  );

describe("a corrupted cell of the example", () => {
  it("the example as thinned reads without an error", () => {
    expect(before.problems.filter(({ severity }) => severity === "error")).toEqual([]);
    expect(before.sections.map(({ occurrences }) => occurrences.length > 4)).toEqual([true, true]);
    expect(cells.length).toBeGreaterThan(500);
  });

  it("is told with its file, row and column, or by the name that it held", () => {
    fc.assert(
      fc.property(damage, ({ cell, now }) => {
        const study = spoilt(cell, now);
        expect([cell, now, isNamed(study, cell)]).toEqual([cell, now, true]);
      }),
      { seed: 1, numRuns: 40 },
    );
  });

  it("takes at most its own row with it", () => {
    const leaf = damage.filter(({ cell }) => leaves.has(cell.file));
    fc.assert(
      fc.property(leaf, ({ cell, now }) => {
        const study = spoilt(cell, now);
        const isCaution = study.problems.some(
          ({ severity, file, row, column }) =>
            severity === "caution" && file === cell.file && row === cell.row && column === cell.column,
        );
        if (!isCaution) expect(study.sections).toEqual(without(cell).sections);
      }),
      { seed: 2, numRuns: 20 },
    );
  });

  it("of a leg never moves a reading: what is still placed stands where it stood", () => {
    const ofLeg = damage.filter(({ cell }) => cell.file === "legs.csv");
    const known = heightsOfLegs(before);
    fc.assert(
      fc.property(ofLeg, ({ cell, now }) => {
        const study = spoilt(cell, now);
        for (const [reading, height] of heightsOfLegs(study))
          expect([reading, known.get(reading)]).toEqual([reading, height]);
        expect([cell, now, isNamed(study, cell)]).toEqual([cell, now, true]);
      }),
      { seed: 3, numRuns: 30 },
    );
  });
});

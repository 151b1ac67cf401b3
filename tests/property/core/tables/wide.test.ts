import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Study } from "../../../../src/core/study/model.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const encoder = new TextEncoder();
const read = (files: Record<string, string>, settings?: unknown): Study =>
  readStudy(new Map(Object.entries(files).map(([name, text]) => [name, encoder.encode(text)])), { settings });

const taxa = [
  ["Velorites alta", "ammonites"],
  ["Velorites cf. parva", "ammonites"],
  ["Quenstra lenis", "bivalves"],
  ["Quenstra dura", "bivalves"],
] as const;

type Cell = "found" | "in vain" | "blank";
/** How each coding writes a find and a search in vain, and what a search row calls it. */
const codings = {
  x: { found: "x", vain: "0", counting: "presence", count: "", abundance: "" },
  plus: { found: "+", vain: "-", counting: "presence", count: "", abundance: "" },
  one: { found: "1", vain: "0", counting: "presence", count: "", abundance: "" },
  counts: { found: "3", vain: "0", counting: "count", count: "3", abundance: "" },
  letters: { found: "C", vain: "\u2013", counting: "scale", count: "", abundance: "C" },
} as const;

const sheets = fc.record({
  cells: fc.array(fc.tuple(...taxa.map(() => fc.constantFrom<Cell>("found", "in vain", "blank"))), {
    minLength: 2,
    maxLength: 8,
  }),
  coding: fc.constantFrom("x", "plus", "one", "counts", "letters"),
  isTurned: fc.boolean(),
  delimiter: fc.constantFrom(",", ";", "\t"),
  blank: fc.constantFrom("not-found", "not-searched"),
  axis: fc.constantFrom("Height (m)", "Depth (ft)"),
});
type WideSheet = typeof sheets extends fc.Arbitrary<infer T> ? T : never;

const line = (cells: readonly string[], delimiter: string) => cells.join(delimiter);

function wideText({ cells, coding, isTurned, delimiter, axis }: WideSheet): string {
  const { found, vain } = codings[coding];
  const written = { found, "in vain": vain, blank: "" };
  const rows = [
    ["", "", "Group", ...taxa.map(([, group]) => group)],
    ["Section", "Sample", axis, ...taxa.map(([taxon]) => taxon)],
    ...cells.map((row, at) => [
      "Tarn Cut",
      `T${at + 1}`,
      String(at + 1),
      ...row.map((cell) => written[cell]),
    ]),
  ];
  const turned = isTurned ? (rows[0] ?? []).map((_, column) => rows.map((row) => row[column] ?? "")) : rows;
  const legend = coding === "letters" ? ["C = common"] : [];
  return `${[...turned.map((row) => line(row, delimiter)), ...legend].join("\n")}\n`;
}

const table = (...rows: readonly string[]) => `${rows.join("\n")}\n`;

function longTables({ cells, coding, blank, axis }: WideSheet): Record<string, string> {
  const { count, abundance, counting } = codings[coding];
  const hasFinds = cells.some((row) => row.includes("found"));
  const at = (find: (row: readonly Cell[], sample: string) => readonly string[]) =>
    cells.flatMap((row, place) => find(row, `T${place + 1}`));
  const searched = (row: readonly Cell[], group: string) => {
    const own = row.filter((_, taxon) => taxa[taxon]?.[1] === group);
    return blank === "not-found" || own.some((cell) => cell !== "blank");
  };
  return {
    "samples.csv": table(
      `section,sample,${axis}`,
      ...cells.map((_, place) => `Tarn Cut,T${place + 1},${place + 1}`),
    ),
    "taxa.csv": table(
      "taxon,group",
      ...taxa.map(([taxon, group]) => `${taxon.replace("cf. ", "")},${group}`),
    ),
    "occurrences.csv": table(
      "section,sample,taxon,count,abundance",
      ...at((row, sample) =>
        row.flatMap((cell, t) =>
          cell === "found" ? [`Tarn Cut,${sample},${taxa[t]?.[0]},${count},${abundance}`] : [],
        ),
      ),
    ),
    "searches.csv": table(
      "section,sample,group,counting",
      ...at((row, sample) =>
        ["ammonites", "bivalves"].flatMap((group) =>
          searched(row, group) ? [`Tarn Cut,${sample},${group},${hasFinds ? counting : "presence"}`] : [],
        ),
      ),
    ),
  };
}

/** What a section holds, without where in which file it stands. */
const contentsOf = (study: Study) =>
  study.sections.map(({ name, axis, unit, samples, occurrences, searches }) => ({
    name,
    axis,
    unit,
    samples: Array.from(samples, ({ name, heightM }) => [name, heightM]),
    finds: Array.from(occurrences, ({ verbatim, taxon, qualifier, sample, heightM, count, abundance }) =>
      JSON.stringify([verbatim, taxon, qualifier, sample, heightM, count, abundance]),
    ).toSorted(),
    searches: searches
      .map(({ sample, group, heightM, counting, derived }) =>
        JSON.stringify([sample, group, heightM, counting, derived]),
      )
      .toSorted(),
  }));

describe("a wide sheet", () => {
  it("makes the finds, samples and searches that the long tables make, either way up, in any coding", () => {
    fc.assert(
      fc.property(sheets, (sheet) => {
        fc.pre(sheet.cells.some((row) => row.includes("found")));
        fc.pre(
          sheet.blank === "not-found" || sheet.cells.some((row) => row.some((cell) => cell !== "blank")),
        );
        const settings = { tables: { "finds.csv": { blank: sheet.blank } } };
        const wide = read({ "finds.csv": wideText(sheet) }, settings);
        expect(wide.problems.filter(({ severity }) => severity === "error")).toEqual([]);
        expect(contentsOf(wide)).toEqual(contentsOf(read(longTables(sheet))));
      }),
      { numRuns: 150 },
    );
  }, 120_000);

  it("is read as chosen, whatever its columns were taken to be", () => {
    const choices = fc.dictionary(
      fc.constantFrom("Section", "Sample", "Height (m)", "Depth (ft)", "Velorites alta", "Quenstra lenis"),
      fc.record(
        {
          is: fc.constantFrom("taxon", "unused", "sample", "position", "section", "notes"),
          unit: fc.constantFrom("m", "cm", "mm", "ft"),
          axis: fc.constantFrom("height", "depth"),
        },
        { requiredKeys: [] },
      ),
    );
    fc.assert(
      fc.property(sheets, choices, (sheet, columns) => {
        const study = read({ "finds.csv": wideText(sheet) }, { tables: { "finds.csv": { columns } } });
        for (const { recognised } of study.sheets)
          for (const { header, is, by } of recognised) {
            const chosen = columns[header]?.is;
            if (chosen === "unused") expect([header, is]).toEqual([header, "unused"]);
            if (by === "chosen" && chosen !== undefined && is !== "unused")
              expect([header, is]).toEqual([header, chosen]);
          }
      }),
      { numRuns: 60 },
    );
  }, 120_000);
});

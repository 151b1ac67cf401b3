import { describe, expect, test } from "vitest";
import type { RangeTapers } from "../../../src/core/ranges/asked-ends.ts";
import { type Drawing, rangeChart, rangeChartPages, renderPlate } from "../../../src/figures/index.ts";
import { chartItems } from "../../../src/figures/plates/chart-layout.ts";
import { chartedTaxa } from "../../../src/figures/plates/charted-taxa.ts";
import { methodComparison } from "../../../src/figures/plates/method-comparison.tsx";
import { goldenText, inLines } from "../golden.ts";
import { manyTaxa, smallAnalysis } from "./fixtures.ts";
import { withEnds } from "./range-fixtures.ts";
import { outside, overlaps, textBoxes } from "./text-boxes.ts";

const small = withEnds(smallAnalysis());
const cliff = { section: "cliff" } as const;
const tapers: readonly RangeTapers[] = [
  {
    taxon: "Aurea prima",
    top: {
      ...cliff,
      taxon: "Aurea prima",
      method: "uniform",
      heightsM: [8.5, 12, 20],
      chances: [1, 0.5, 0.2],
    },
  },
];
const folded = new Set(["small things"]);

const goldens: Readonly<Record<string, Drawing>> = {
  "range-chart-ends": rangeChart(small, { ...cliff, focus: "Aurea secunda" }),
  "range-chart-by-method": rangeChart(small, { ...cliff, method: "uniform", tapers, folded, order: "name" }),
  "compare-methods": methodComparison(small, { ...cliff, taxa: ["Aurea prima", "Bellona minor"] }),
};

const many = withEnds(manyTaxa(120));
const cases: Readonly<Record<string, () => readonly Drawing[]>> = {
  ...Object.fromEntries(Object.entries(goldens).map(([name, drawing]) => [name, () => [drawing]])),
  "every method in turn": () =>
    small.study.settings.ranges.methods.map((method) => rangeChart(small, { ...cliff, method, tapers })),
  "groups folded, in every order": () =>
    (["group", "last", "name"] as const).map((order) =>
      rangeChart(many, { ...cliff, order, folded: new Set(["group 0", "group 2"]) }),
    ),
  "many taxa on pages": () => rangeChartPages(many, { ...cliff, pageWidth: 700, order: "last" }),
  "a comparison of four, and of none": () =>
    [many.taxa.slice(0, 4).map(({ taxon }) => taxon), []].map((taxa) =>
      methodComparison(many, { ...cliff, taxa }),
    ),
  "a frame that holds a part": () => [
    rangeChart(small, { ...cliff, frame: [-2, 1], focus: "Aurea prima" }),
    methodComparison(small, { ...cliff, frame: [-2, 1], taxa: ["Aurea prima"] }),
  ],
};

describe.each(Object.entries(goldens))("the plate %s", (name, drawing) => {
  test("is the committed figure", () => {
    const svg = inLines(renderPlate(drawing.element));
    expect(svg).toBe(goldenText(`plate-${name}`, svg));
  });
});

describe.each(Object.entries(cases))("%s", (_, make) => {
  const drawings = make();
  const svgs = drawings.map((drawing) => renderPlate(drawing.element));

  test("has no text on another, none outside, none under 7 points, and no number that is none", () => {
    for (const [i, svg] of svgs.entries()) {
      const { width, height } = drawings[i] ?? { width: 0, height: 0 };
      expect(overlaps(textBoxes(svg))).toEqual([]);
      expect(outside(textBoxes(svg), width, height)).toEqual([]);
      const sizes = [...svg.matchAll(/font-size="([^"]+)"/g)].map((match) => Number(match[1]));
      expect(Math.min(...sizes)).toBeGreaterThanOrEqual(7);
      expect(svg.replaceAll(/>[^<]*</g, "><").match(/NaN|Infinity|undefined/g) ?? []).toEqual([]);
    }
  });
});

const namesOf = (drawing: Drawing) =>
  [...renderPlate(drawing.element).matchAll(/data-taxon="([^"]+)"/g)].map((match) => match[1]);

describe("ends by a method", () => {
  test("are those of its rows at both ends; without one named, of the method that leads", () => {
    const [led] = chartedTaxa(small, cliff);
    expect([led?.top?.method, led?.base?.method]).toEqual(["uniform", "sampled"]);
    const [asked] = chartedTaxa(small, { ...cliff, method: "top-k", tapers: [] });
    expect([asked?.top?.method, asked?.base?.method]).toEqual(["top-k", "top-k"]);
    expect(asked?.taper).toBeUndefined();
  });

  test("a taxon in focus shows each find as a mark of its row, those a person set aside among them", () => {
    const aside = [{ taxon: "Aurea secunda", heightM: 3, row: "finds.csv:9" }];
    const drawing = rangeChart(small, { ...cliff, focus: "Aurea secunda", aside });
    expect(renderPlate(drawing.element)).toContain('data-row="finds.csv:9"');
    expect(renderPlate(rangeChart(small, cliff).element)).not.toContain("data-row=");
  });

  test("a folded group keeps a tick for each of its taxa", () => {
    const drawing = goldens["range-chart-by-method"] ?? rangeChart(small, cliff);
    expect(namesOf(drawing)).toEqual([
      "Aurea prima",
      "Aurea secunda",
      "Aurea ultima",
      "Bellona minor",
      "Bellona rara",
      "Bellona sera",
    ]);
    expect(renderPlate(drawing.element)).toContain("small things (3)");
  });

  test("order by last find mixes the groups, and folded ones stand last", () => {
    const lasts = chartedTaxa(small, { ...cliff, order: "last" }).map(({ lastM }) => lastM);
    expect(lasts).toEqual(lasts.toSorted((a, b) => a - b));
    const items = chartItems(chartedTaxa(small, { ...cliff, order: "last" }), { order: "last", folded });
    expect(items.map(({ kind }) => kind)).toEqual(["taxon", "taxon", "taxon", "folded"]);
  });

  test("every taxon stands on one page", () => {
    const pages = rangeChartPages(many, { ...cliff, pageWidth: 700 });
    expect(Math.max(...pages.map(({ width }) => width))).toBeLessThanOrEqual(700);
    expect(new Set(pages.flatMap(namesOf)).size).toBe(120);
  });
});

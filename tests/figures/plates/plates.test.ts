import { describe, expect, test } from "vitest";
import type { Analysis } from "../../../src/core/analysis-result.ts";
import {
  type Drawing,
  fenceDiagram,
  markerPlate,
  plates,
  rangeChart,
  rangeChartPages,
  renderPlate,
  timingPlate,
} from "../../../src/figures/index.ts";
import { goldenText, inLines } from "../golden.ts";
import {
  analysisOf,
  answer,
  horizon,
  manyTaxa,
  measured,
  section,
  smallAnalysis,
  withTaxa,
} from "./fixtures.ts";
import { outside, overlaps, textBoxes } from "./text-boxes.ts";

const small = smallAnalysis();
const empty = analysisOf([section("bare")]);
const lens = { halfWidthM: 0.5, times: 10 };

const goldens: Readonly<Record<string, Drawing>> = {
  "range-chart": rangeChart(small, { section: "cliff" }),
  "range-chart-lens": rangeChart(small, { section: "cliff", lens }),
  "range-chart-core": rangeChart(small, { section: "core", vertical: "own" }),
  fence: fenceDiagram(small),
  "fence-no-datum": fenceDiagram({ ...small, alignment: { ...empty.alignment } }),
  markers: markerPlate(small, { section: "cliff" }),
  timing: timingPlate(small, { section: "cliff", set: "candidates" }),
  "timing-last-finds": timingPlate(small, { section: "cliff", set: "candidates", shows: "last-finds" }),
  "timing-tried": timingPlate(tried(), { section: "cliff", set: "candidates", was: small }),
};

/** The small study with its main horizon moved up and another p along the section. */
function tried(): Analysis {
  const main = small.markers.main.bySection.get("cliff");
  if (main === undefined) throw new Error("no main horizon");
  const moved = { ...main, name: main.horizon, source: "manual" as const, positionM: main.positionM + 0.6 };
  const bySection = new Map([...small.markers.main.bySection, ["cliff", moved]]);
  const markers = {
    ...small.markers,
    horizons: [...small.markers.horizons, moved],
    main: { ...small.markers.main, bySection },
  };
  const curves = small.timing.curves.map((curve) => ({ ...curve, p: curve.p.map((p) => p / 2) }));
  return { ...small, markers, timing: { ...small.timing, curves } };
}

const hostileNames = [
  "<img src=x onerror=alert(1)>",
  "__proto__",
  "=cmd|' /C calc'!A0",
  "W".repeat(200_000),
  "constructor",
];

function hostile(): Analysis {
  const sections = hostileNames.map((name) =>
    section(name, {
      title: name,
      datum: name,
      measurements: [measured(name, 3, 2), measured("iridium", 4, 1)],
    }),
  );
  const base = analysisOf(sections);
  const horizons = hostileNames.map((name) => horizon(name, name, 10));
  const markers = {
    ...base.markers,
    horizons,
    main: { ...base.markers.main, bySection: new Map(horizons.map((own) => [own.section, own])) },
  };
  const taxa = hostileNames.flatMap((own) =>
    hostileNames.map((taxon) => ({ section: own, taxon, group: taxon, heightsM: [1, 2, 9] })),
  );
  return withTaxa({ ...base, markers }, taxa);
}

const cases: Readonly<Record<string, () => readonly Drawing[]>> = {
  "every plate of a small study": () => plates(small).map(({ drawing }) => drawing),
  "every golden": () => Object.values(goldens),
  "a study with nothing in it": () => [
    rangeChart(empty, { section: "bare" }),
    markerPlate(empty, { section: "bare" }),
    timingPlate(empty, { section: "bare", set: "candidates" }),
    fenceDiagram(empty),
    fenceDiagram(analysisOf([])),
  ],
  "a section of no thickness": () => [
    rangeChart(analysisOf([section("thin", { topM: 0 })]), { section: "thin" }),
  ],
  "one taxon with one find": () => [
    rangeChart(
      withTaxa(empty, [{ section: "bare", taxon: "Solus", group: "", heightsM: [4], role: "too-few" }]),
      {
        section: "bare",
      },
    ),
  ],
  "200 taxa": () => [
    rangeChart(manyTaxa(200), { section: "cliff" }),
    ...rangeChartPages(manyTaxa(200), { section: "cliff" }),
  ],
  "30 horizons at one level": () => [crowdedHorizons()],
  "hostile names": () => plates(hostile()).map(({ drawing }) => drawing),
  "the common scale": () => [rangeChart(small, { section: "core", vertical: "common", lens })],
};

function crowdedHorizons(): Drawing {
  const horizons = Array.from({ length: 30 }, (_, i) => horizon("bare", `ash number ${i}`, 9 + i * 0.01));
  return rangeChart({ ...empty, markers: { ...empty.markers, horizons } }, { section: "bare" });
}

describe.each(Object.entries(goldens))("the plate %s", (name, drawing) => {
  test("is the committed figure", () => {
    const svg = inLines(renderPlate(drawing.element));
    expect(svg).toBe(goldenText(`plate-${name}`, svg));
  });
});

describe.each(Object.entries(cases))("%s", (_, make) => {
  const drawings = make();
  const svgs = drawings.map((drawing) => renderPlate(drawing.element));

  test("has no text on another", () => {
    expect(svgs.flatMap((svg) => overlaps(textBoxes(svg)))).toEqual([]);
  });

  test("keeps every text inside its frame", () => {
    const found = drawings.flatMap(({ width, height }, i) =>
      outside(textBoxes(svgs[i] ?? ""), width, height),
    );
    expect(found).toEqual([]);
  });

  test("has no text under 7 points, no number that is none, and ids used once", () => {
    for (const svg of svgs) {
      const sizes = [...svg.matchAll(/font-size="([^"]+)"/g)].map((match) => Number(match[1]));
      expect(Math.min(...sizes)).toBeGreaterThanOrEqual(7);
      expect(svg.replaceAll(/>[^<]*</g, "><").match(/NaN|Infinity|undefined/g) ?? []).toEqual([]);
      const ids = [...svg.matchAll(/ id="([^"]+)"/g)].map((match) => match[1]);
      expect(new Set(ids).size).toBe(ids.length);
      const references = [...svg.matchAll(/url\(#([^)]+)\)/g)].map((match) => match[1]);
      expect(references.filter((id) => !ids.includes(id))).toEqual([]);
    }
  });
});

const beside = (part: Partial<Parameters<typeof timingPlate>[1]>) =>
  text(timingPlate(small, { section: "cliff", set: "candidates", ...part }));

describe("what a timing plate shows beside its ranges", () => {
  test("the levels of the scenario of most weight, or of the one asked for where it has levels", () => {
    expect(beside({})).toContain("if two pulses");
    expect(beside({ scenario: "single" })).toContain("if one level");
    expect(beside({ scenario: "pulses-4" })).toContain("if two pulses");
  });

  test("the last finds take the place of levels, p and duration", () => {
    const words = beside({ shows: "last-finds" });
    expect(words).toContain("number above each level");
    expect(words).not.toContain("p of ending here");
    expect(words).not.toContain("least, most");
  });

  test("no method by its key, and a unit once an interval", () => {
    expect(beside({})).not.toMatch(/common-end|duration-/);
    expect(beside({})).toContain("it lies from 11.5 to 12.6 m.");
  });
});

test("a lens that reaches an end of the section leaves no piece of the axis without length", () => {
  const part = { section: "cliff", frame: [-0.3, 0.3] as const, lens: { halfWidthM: 0.3, times: 10 } };
  expect(text(rangeChart(small, part))).not.toMatch(/\d\.0{4,}/);
});

describe("what the page needs", () => {
  test("a panel's scale maps metres to the points that are drawn", () => {
    const drawing = goldens["range-chart"];
    const [panel] = drawing?.panels ?? [];
    const svg = drawing ? renderPlate(drawing.element) : "";
    const y = Math.round((panel?.scale(12.1) ?? 0) * 1000) / 1000;
    expect(svg).toContain(`data-horizon="rusty layer"`);
    expect(svg).toMatch(
      new RegExp(`data-horizon="rusty layer"><g><path d="[^"]*"[^>]*></path><path d="M[\\d.]+ ${y}h`),
    );
    expect(panel?.scale.invert(panel.scale(7))).toBeCloseTo(7, 9);
  });

  test("a deeper level of a core stands lower on the plate", () => {
    const [panel] = goldens["range-chart-core"]?.panels ?? [];
    expect(panel?.scale(-30)).toBeGreaterThan(panel?.scale(-20) ?? 0);
    expect(renderPlate(goldens["range-chart-core"]?.element ?? crowdedHorizons().element)).toMatch(
      />70<[\s\S]*>90<[\s\S]*>ft depth</,
    );
  });

  test("every taxon is a group of its name", () => {
    const svg = renderPlate(rangeChart(small, { section: "cliff" }).element);
    const taxa = [...svg.matchAll(/data-taxon="([^"]+)"/g)].map((match) => match[1]);
    expect(taxa).toEqual([
      "Aurea prima",
      "Aurea secunda",
      "Aurea ultima",
      "Bellona rara",
      "Bellona minor",
      "Bellona sera",
    ]);
  });

  test("a frame shows only its part, and the common scale puts the datum of two sections at one height", () => {
    const [part] = rangeChart(small, { section: "cliff", frame: [-2, 1] }).panels;
    expect(part?.scale.invert(part.bottom)).toBeCloseTo(10.1, 9);
    expect(part?.scale.invert(part.top)).toBeCloseTo(13.1, 9);
    const [cliff, core] = fenceDiagram(small).panels;
    expect(cliff?.scale(12.1)).toBeCloseTo(core?.scale(-24) ?? 0, 9);
  });

  test("a lens gives its band the times asked for", () => {
    const [panel] = rangeChart(small, { section: "cliff", lens }).panels;
    const points = (from: number, to: number) =>
      Math.abs((panel?.scale(to) ?? 0) - (panel?.scale(from) ?? 0));
    expect(points(12, 12.1) / points(3, 3.1)).toBeCloseTo(10, 6);
  });
});

function text(drawing: Drawing): string {
  return textBoxes(renderPlate(drawing.element))
    .map((box) => box.text)
    .join(" ");
}

describe("what a plate says where there is nothing to draw", () => {
  test("no taxon, no measurement, no datum", () => {
    expect(text(rangeChart(empty, { section: "bare" }))).toContain(
      "No taxon has a find that counts in this section.",
    );
    expect(text(markerPlate(empty, { section: "bare" }))).toContain("Nothing was measured in this section.");
    expect(text(fenceDiagram(empty))).toContain("declare one horizon for them all");
    expect(text(timingPlate(empty, { section: "bare", set: "candidates" }))).toContain(
      "nothing can be asked",
    );
  });

  test("an empty joint set is words, and no box", () => {
    const timing = { ...small.timing, answers: [answer({ method: "common-end-joint", outcome: "empty" })] };
    const drawing = timingPlate({ ...small, timing }, { section: "cliff", set: "candidates" });
    expect(text(drawing)).toContain("No single level fits these finds");
    expect(text(drawing)).not.toContain("levels not excluded");
  });

  test("sections without the datum are named beside the fence", () => {
    const alignment = { ...small.alignment, sections: small.alignment.sections.slice(0, 1) };
    expect(text(fenceDiagram({ ...small, alignment }))).toContain(
      "Not drawn, since the datum is not placed there: Core 4.",
    );
  });
});

test("many taxa page, and every page keeps names at one size", () => {
  const pages = rangeChartPages(manyTaxa(200), { section: "cliff", pageWidth: 800 });
  expect(pages.length).toBeGreaterThan(2);
  expect(Math.max(...pages.map((page) => page.width))).toBeLessThanOrEqual(800);
  const named = pages.flatMap((page) => [...renderPlate(page.element).matchAll(/data-taxon="([^"]+)"/g)]);
  expect(named.length).toBe(200);
});

test("file names hold only letters, digits and hyphens, each once, and none is long", () => {
  const files = plates(hostile()).map(({ file }) => file);
  expect(new Set(files).size).toBe(files.length);
  for (const file of files) expect(file).toMatch(/^figures\/[a-z0-9-]{1,140}\.svg$/);
});

test("a name is text, never markup", () => {
  for (const { drawing } of plates(hostile())) expect(renderPlate(drawing.element)).not.toContain("<img");
});

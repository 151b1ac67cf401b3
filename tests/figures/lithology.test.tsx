import { describe, expect, test } from "vitest";
import { contactPath } from "../../src/figures/columns/contact.ts";
import { lithologyOf, plainLetters } from "../../src/figures/lithology/lithology.ts";
import { lithologyLegend } from "../../src/figures/lithology/lithology-legend.ts";
import { renderPlate } from "../../src/figures/render-plate.ts";
import { frame } from "./cases/frame.tsx";
import { PATTERN_IDS } from "./cases/marks.tsx";

describe("lithologyOf", () => {
  // Numbers of FGDC-STD-013-2006, section 37.
  test.each([
    ["limestone", "limestone", 627],
    ["Marly limestone", "marly-limestone", 638],
    ["grey MARL, laminated", "marl", 623],
    ["black shale", "black-shale", 624],
    ["boundary clay", "clay", 620],
    ["volcanic ash", "tuff", 711],
    ["bentonite", "bentonite", 662],
  ])("draws %j as %s", (term, pattern, fgdc) => {
    expect(lithologyOf(term)).toMatchObject({ term, pattern, fgdc });
  });

  test("takes whole words only", () => {
    expect(lithologyOf("marlin").pattern).toBeUndefined();
  });

  test("weathers clay back behind limestone", () => {
    expect(lithologyOf("clay").weathering).toBeLessThan(lithologyOf("limestone").weathering);
  });

  test("names what it does not know instead of guessing", () => {
    expect(lithologyOf("greywacke")).toEqual({ term: "greywacke", weathering: 0.7 });
    expect([...plainLetters(["greywacke", "marl", "skarn", "greywacke"])]).toEqual([
      ["greywacke", "a"],
      ["skarn", "b"],
    ]);
    expect(lithologyLegend(["marl", "greywacke"]).map(({ label }) => label)).toEqual(["marl", "greywacke"]);
  });
});

test("a plate defines the patterns it uses, once, in one order", () => {
  const [once, twice] = [
    frame("p", null, { patterns: ["marl", "chalk"] }),
    frame("p", null, { patterns: ["chalk", "marl", "chalk"] }),
  ];
  expect(renderPlate(once)).toBe(renderPlate(twice));
  expect(renderPlate(once).match(/<pattern id="[^"]+"/g)).toEqual([
    '<pattern id="p-chalk"',
    '<pattern id="p-marl"',
  ]);
});

test("every pattern draws something of its own", () => {
  const tiles = PATTERN_IDS.map((id) =>
    renderPlate(frame("p", null, { patterns: [id] })).replaceAll(`p-${id}`, "p-x"),
  );
  expect(new Set(tiles).size).toBe(PATTERN_IDS.length);
});

test("every kind of contact but a gradational one, which is dashed, has its own line", () => {
  const kinds = ["sharp", "erosive", "hardground", "burrowed", "karst", "faulted"] as const;
  expect(new Set(kinds.map((kind) => contactPath(kind, { x: 0, y: 0, width: 30 }))).size).toBe(kinds.length);
});

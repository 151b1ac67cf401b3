import { expect, test } from "vitest";
import { namedRock } from "../../../src/figures/columns/formation-column.tsx";
import { polarityRuns } from "../../../src/figures/columns/polarity-column.tsx";
import { heightScale } from "../../../src/figures/height-scale.ts";
import { taperPath } from "../../../src/figures/marks/taper.tsx";
import { analyteSeries } from "../../../src/figures/plates/analyte-series.ts";
import { drawnTaxa } from "../../../src/figures/plates/drawn-taxa.ts";
import { groupSigns, searchedGroups } from "../../../src/figures/plates/searched-groups.ts";
import { slugs } from "../../../src/figures/plates/slugs.ts";
import { fitText, textWidth } from "../../../src/figures/text.ts";
import { TEXT } from "../../../src/figures/theme.ts";
import { analysisOf, measured, section, smallAnalysis } from "./fixtures.ts";

test("slugs are safe, short and never shared", () => {
  const given = slugs(["Ábra Tor", "../../etc/passwd", "abra-tor", "***", "x".repeat(500)], "section");
  expect([...given.values()]).toEqual(["abra-tor", "etc-passwd", "abra-tor-2", "section", "x".repeat(48)]);
  expect(new Set(slugs(["A b", "a-b", "A  B"], "s").values())).toEqual(new Set(["a-b", "a-b-2", "a-b-3"]));
});

test("neighbouring beds of one formation are one stretch", () => {
  const beds = [
    { baseM: 4, topM: 6, name: "Upper" },
    { baseM: 0, topM: 2, name: "Lower" },
    { baseM: 2, topM: 4, name: "Lower" },
    { baseM: 6, topM: 7, name: "" },
  ];
  expect(namedRock(beds)).toEqual([
    { name: "Lower", baseM: 0, topM: 4 },
    { name: "Upper", baseM: 4, topM: 6 },
  ]);
});

test("polarity between two runs stays open", () => {
  const samples = [9, 1, 3, 7].map((heightM) => ({ heightM, isNormal: heightM < 5 }));
  expect(polarityRuns(samples)).toEqual([
    { isNormal: true, baseM: 1, topM: 3 },
    { isNormal: false, baseM: 7, topM: 9 },
  ]);
});

test("a taper that crosses the edge of a lens bends there", () => {
  const y = heightScale(
    { bottomM: 0, topM: 10, top: 0, bottom: 100 },
    { baseM: 4, topM: 6, magnification: 5 },
  );
  const path = taperPath({
    x: 50,
    width: 10,
    y,
    colour: "#000",
    firstM: 1,
    lastM: 3,
    above: [
      { heightM: 3, confidence: 0 },
      { heightM: 5, confidence: 1 },
    ],
    occurrencesM: [],
  });
  expect(path).toContain(`52.5 ${Math.round(y(4) * 1000) / 1000}`);
});

test("a find set aside is open, and taxa stand by group and last find", () => {
  const small = smallAnalysis();
  const taxa = drawnTaxa(small, "cliff", groupSigns(small));
  expect(taxa.map(({ lastM }) => lastM)).toEqual([8.5, 11.5, 19.5, 9.5, 10.5, 17.5]);
  expect(taxa[1]?.open).toEqual([{ heightM: 13.5, kind: "reworked" }]);
});

test("a sample searched for two groups can be barren for one", () => {
  const small = smallAnalysis();
  const [cliff] = small.study.sections;
  const groups = searchedGroups(small, cliff ?? section("none"));
  const at = (heightM: number) =>
    groups.map(({ samples }) => samples.find((own) => own.heightM === heightM)?.isFound);
  expect(at(1.5)).toEqual([true, false]);
  expect(at(2.5)).toEqual([false, true]);
});

function nickelIn(units: readonly string[]) {
  const measurements = units.map((givenUnit) => measured("nickel", 1, 40_000, { givenUnit }));
  const own = section("s", { measurements });
  return analyteSeries(analysisOf([own]), own)[0];
}

test("values are drawn in the unit as given where all agree, else in the canonical one", () => {
  expect(nickelIn(["ppm", "ppm"])?.points[0]?.value).toBe(40);
  expect(nickelIn(["ppm", "ppb"])).toMatchObject({
    unit: "ng/g",
    points: [{ value: 40_000 }, { value: 40_000 }],
  });
});

test("a cell of any length is cut to the width it has", () => {
  const cut = fitText("Long name ".repeat(20_000), 60, TEXT.taxon);
  expect(cut.endsWith("…")).toBe(true);
  expect(textWidth(cut, TEXT.taxon)).toBeLessThanOrEqual(60);
  expect(textWidth(cut, TEXT.taxon)).toBeGreaterThan(50);
});

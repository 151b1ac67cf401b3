import { describe, expect, it } from "vitest";
import { analyse } from "../../../../src/core/analysis.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";

const tables = {
  "sections.csv": "section,axis,unit,bottom,top\ncore,depth,ft,100,0\nledge,height,m,0,30\n",
  "horizons.csv":
    "section,horizon,kind,position,below,above\ncore,clay,impact,40,1,1\nledge,clay,impact,12,0.1,0.1\n",
  "occurrences.csv":
    "section,taxon,position\ncore,Orbula vesta,80\ncore,Orbula vesta,60\ncore,Orbula vesta,45\nledge,Orbula vesta,4\nledge,Orbula vesta,8\nledge,Orbula vesta,11\n",
};

function markersWith(boundary: unknown) {
  const settings = JSON.stringify({ boundary, replicates: 100 });
  const files = Object.entries({ ...tables, "settings.json": settings });
  return analyse(readStudy(new Map(files.map(([name, text]) => [name, new TextEncoder().encode(text)]))))
    .markers;
}

const pick = { section: "core", horizon: "clay", position: 38, below: 0.5, above: 1 };

describe("a horizon placed by hand", () => {
  it("is read in the section's own axis and unit and becomes the main horizon there alone", () => {
    const { main, horizons } = markersWith({ picks: [pick] });
    const here = main.bySection.get("core");
    expect(here).toMatchObject({ source: "manual", name: "clay", kind: "impact", refersTo: "level" });
    expect(here?.positionM).toBeCloseTo(-38 * 0.3048, 12);
    expect(main.bySection.get("ledge")).toMatchObject({ source: "given", positionM: 12 });
    expect(horizons.filter(({ section }) => section === "core").map(({ source }) => source)).toEqual([
      "given",
      "manual",
    ]);
  });

  it("reaches its standard deviations times the quantile of the level each way", () => {
    const here = markersWith({ picks: [pick] }).main.bySection.get("core");
    const z = 1.959963984540054;
    expect(here?.lowM).toBeCloseTo((-38 - z * 0.5) * 0.3048, 9);
    expect(here?.highM).toBeCloseTo((-38 + z * 1) * 0.3048, 9);
    expect(here?.sigmaM).toBeCloseTo(0.75 * 0.3048, 12);
  });

  it("is told with its distance from the automatic one", () => {
    const { cautions } = markersWith({ picks: [pick] });
    const told = cautions.find(({ code }) => code === "horizon-placed-by-hand");
    expect(told).toMatchObject({ section: "core", subject: "clay", numbers: { source: "given" } });
    expect(told?.numbers?.differenceM).toBeCloseTo(2 * 0.3048, 12);
  });

  it("of two picks of one name the last stands; a new name is a horizon of its own", () => {
    const { horizons, main } = markersWith({
      picks: [pick, { ...pick, position: 39 }, { section: "ledge", horizon: "level", position: 9 }],
    });
    const manual = horizons.filter(({ source }) => source === "manual");
    expect(manual).toHaveLength(2);
    expect(manual[0]?.positionM).toBeCloseTo(-39 * 0.3048, 12);
    expect(manual[1]).toMatchObject({ name: "level", kind: "other", positionM: 9, lowM: 9, highM: 9 });
    expect(main.bySection.get("ledge")?.name).toBe("clay");
  });

  it("in a section that is not there is told and changes nothing", () => {
    const { horizons, cautions } = markersWith({ picks: [{ ...pick, section: "lost" }] });
    expect(horizons).toHaveLength(2);
    expect(cautions).toContainEqual({ code: "pick-not-placed", section: "lost", subject: "clay" });
  });
});

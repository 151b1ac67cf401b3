import { expect, it } from "vitest";
import { lines, studyFrom } from "./study-files.ts";

it("a study with cautions alone keeps every row as it stands", () => {
  const study = studyFrom({
    "sections.csv": lines(
      "section,axis,unit,bottom,top",
      "Orskel Ledge,height,m,0,9",
      "Orskel Lodge,height,m,0,9",
    ),
    "samples.csv": lines("section,sample,base,top", "Orskel Ledge,OL-1,0,2", "Orskel Ledge,ol 1,1,3"),
    "occurrences.csv": lines(
      "section,sample,position,taxon,qualifier",
      "Orskel Ledge,OL-1,,Velorites alta,juvenile",
      "Orskel Ledge,ol 1,,Velorites altu,",
      "Orskel Ledge,,12,Velorites altu,",
    ),
    "beds.csv": lines(
      "section,base,top,lithology",
      "Orskel Ledge,0,2,marl",
      "Orskel Ledge,1,3,marl",
      "Orskel Ledge,4,5,marl",
    ),
    "horizons.csv": lines(
      "section,horizon,kind,position,age_ma",
      "Orskel Ledge,Rim,ash,1,83",
      "Orskel Ledge,upper surface,ash,2,84",
      "Orskel Lodge,Rim,ash,2,",
      "Orskel Lodge,upper surface,ash,1,",
    ),
  });
  expect(study.problems.filter(({ severity }) => severity === "error")).toEqual([]);
  const codes = new Set(study.problems.map(({ code }) => code));
  const expected = ["similar-name", "unknown-qualifier", "beds-overlap", "beds-gap", "samples-overlap"];
  const rest = ["ages-out-of-order", "horizon-order", "outside-section"];
  for (const code of [...expected, ...rest]) expect(codes).toContain(code);
  const kept = study.sections.map((section) => [
    section.name,
    section.samples.map(({ name, baseM, topM }) => [name, baseM, topM]),
    Array.from(section.occurrences, ({ taxon, heightM }) => [taxon, heightM]),
    section.beds.map(({ baseM, topM }) => [baseM, topM]),
    section.horizons.map(({ name, ageMa }) => [name, ageMa]),
  ]);
  expect(kept).toEqual([
    [
      "Orskel Ledge",
      [
        ["OL-1", 0, 2],
        ["ol 1", 1, 3],
      ],
      [
        ["Velorites alta", 1],
        ["Velorites altu", 2],
        ["Velorites altu", 12],
      ],
      [
        [0, 2],
        [1, 3],
        [4, 5],
      ],
      [
        ["Rim", 83],
        ["upper surface", 84],
      ],
    ],
    [
      "Orskel Lodge",
      [],
      [],
      [],
      [
        ["Rim", undefined],
        ["upper surface", undefined],
      ].toReversed(),
    ],
  ]);
});

import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { smearBaseM } from "../../../datasets/veyra-shelf-truth/generator/scale.ts";
import { readTruth } from "../../../datasets/veyra-shelf-truth/generator/truth.ts";
import { findMarkers } from "../../../src/core/markers/find-markers.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";

const at = (path: string) => fileURLToPath(new URL(`../../../datasets/${path}`, import.meta.url));
const truth = readTruth(readFileSync(at("veyra-shelf-truth/truth.json"), "utf8"));
const names = readdirSync(at("veyra-shelf")).filter((name) => !name.endsWith(".md"));
const study = readStudy(
  new Map(names.map((name) => [name, new Uint8Array(readFileSync(at(`veyra-shelf/${name}`)))])),
);
const markers = findMarkers(study);

describe.each(truth.sections)("the layer found in $section", (section) => {
  const found = markers.horizons.filter(
    (horizon) => horizon.section === section.section && horizon.name.startsWith("iridium-"),
  );

  it("is the only iridium anomaly", () => {
    expect(found.map(({ name, source }) => `${name} ${source}`)).toEqual(["iridium-1 found"]);
  });

  it("has an interval that covers the true event surface", () => {
    expect(found[0]?.refersTo).toBe("event-surface");
    expect(found[0]?.lowM).toBeLessThanOrEqual(section.eventSurfaceM);
    expect(found[0]?.highM).toBeGreaterThanOrEqual(section.eventSurfaceM);
  });

  it("has the mixing length and the base of the smear of the truth, to a tenth of the length", () => {
    const tolerance = section.mixingLengthM / 10;
    expect(Math.abs((found[0]?.mixing?.lengthM ?? 0) - section.mixingLengthM)).toBeLessThan(tolerance);
    expect(Math.abs((found[0]?.mixing?.baseM ?? 0) - smearBaseM(section))).toBeLessThan(tolerance);
  });

  it("answers to the name of the main horizon", () => {
    expect(found[0]?.horizon).toBe(truth.horizon);
    expect(markers.main.bySection.get(section.section)?.horizon).toBe(truth.horizon);
  });
});

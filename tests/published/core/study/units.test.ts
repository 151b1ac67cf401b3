// units.csv: conversion factors from their definitions. Mass fractions: powers of ten (SI prefixes, BIPM SI Brochure,
// 9th edition, table 7). International foot 0.3048 m exactly and US survey foot 1200/3937 m: NIST Special Publication
// 811 (2008), B.6. Depth to height: h = datum - d.
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { givenToHeight } from "../../../../src/core/study/heights.ts";
import { measurementUnit, toMetres } from "../../../../src/core/study/units.ts";
import { readWrittenCsv } from "../../../../src/core/tables/csv.ts";

function record(value: unknown): Readonly<Record<string, unknown>> {
  if (typeof value !== "object" || value === null) throw new Error("units.csv: expected an object of inputs");
  return Object.fromEntries(Object.entries(value));
}

const cases = readWrittenCsv(readFileSync(new URL("units.csv", import.meta.url), "utf8")).rows.map(
  ([name, inputs, expected, tolerance]) => ({
    name,
    inputs: record(JSON.parse(inputs)),
    expected: Number(expected),
    tolerance,
  }),
);
const near = (value: number, expected: number, tolerance: string) => {
  const [kind, size] = tolerance.split(" ");
  const allowed = Number(size) * (kind === "rel" ? Math.abs(expected) : 1);
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(allowed);
};
const canonical = (value: number, unit: string): number => {
  const meant = measurementUnit(unit, "iridium");
  if (meant === undefined || meant === "refused") throw new Error(`not read: ${unit}`);
  expect(meant.unit).toBe("ng/g");
  return value * meant.factor;
};

// units-by-definition.csv: made by units_by_definition.py beside it, which names the definitions.
const definitions = readWrittenCsv(
  readFileSync(new URL("units-by-definition.csv", import.meta.url), "utf8"),
).rows.map(([kind, unit, factor]) => ({ kind, unit, factor: Number(factor) }));

describe("units against their definitions", () => {
  it.each(definitions)("1 $unit", ({ kind, unit, factor }) => {
    if (kind === "length") expect(toMetres(1, unit)).toBe(factor);
    else expect(measurementUnit(unit, "iridium")).toMatchObject({ quantity: kind, factor });
  });

  it("a mass or an amount by a volume, an amount by a mass, and a part by volume are no mass fractions", () => {
    for (const unit of [
      "mg/L",
      "ug/l",
      "µg L⁻¹",
      "ng/mL",
      "g/m3",
      "kg/m³",
      "mol/kg",
      "µmol/g",
      "ppmv",
      "g",
      "g/g/g",
    ])
      expect([unit, measurementUnit(unit, "iridium")]).toEqual([unit, undefined]);
  });

  it.each([
    ["‰ VPDB", "VPDB"],
    ["per mil (V-PDB)", "VPDB"],
    ["permil vs. PDB", "PDB"],
    ["‰, VSMOW", "VSMOW"],
    ["per mil V-CDT", "VCDT"],
    ["‰ AIR", "AIR"],
    ["‰ VSMOW", "VSMOW"],
    ["‰", undefined],
  ])("%s keeps its scale, and its number", (written, scale) => {
    const unit = measurementUnit(written, "d18o");
    expect(unit).toMatchObject({ quantity: "per-mil", factor: 1 });
    expect(typeof unit === "object" ? unit.scale : unit).toBe(scale);
  });

  it("per mil of an unknown scale is not read", () => {
    expect(measurementUnit("‰ XYZ", "d18o")).toBeUndefined();
  });
});

describe("conversion factors", () => {
  it.each(cases.filter(({ name }) => name.startsWith("conc")))("$name", ({ inputs, expected, tolerance }) => {
    near(canonical(Number(inputs.value), String(inputs.unit)), expected, tolerance);
  });

  it.each(cases.filter(({ name }) => name.startsWith("length")))(
    "$name",
    ({ inputs, expected, tolerance }) => {
      const isRounded = inputs.unit === "us_survey_ft";
      near(toMetres(Number(inputs.value), String(inputs.unit)), expected, isRounded ? "rel 1e-9" : tolerance);
    },
  );

  it.each(cases.filter(({ name }) => name.startsWith("depth")))(
    "$name",
    ({ inputs, expected, tolerance }) => {
      const height = givenToHeight(Number(inputs.depth_ft), { axis: "depth", unit: "ft" });
      near(Number(inputs.datum_height_m) + height, expected, tolerance);
    },
  );

  it("reads both micro signs, capitals and negative powers", () => {
    for (const unit of ["\u00b5g/g", "\u03bcg/g", "ug/g", "PPM", "µg g-1", "µg·g⁻¹", "ug g^-1", "mg / kg"]) {
      expect([unit, canonical(1, unit)]).toEqual([unit, 1000]);
    }
  });

  it("takes ppt for 1e-12 and refuses it where parts per thousand could be meant", () => {
    expect(canonical(1, "ppt")).toBe(1e-3);
    for (const analyte of ["d13c", "δ18O", "delta34S", "salinity"]) {
      expect(measurementUnit("ppt", analyte)).toBe("refused");
    }
  });

  it("takes counts per gram, per mil, percent and counts for what they are, and nothing else", () => {
    expect(measurementUnit("grains/g", "shocked-quartz")).toEqual({
      quantity: "per-gram",
      unit: "grains/g",
      factor: 1,
    });
    expect(measurementUnit("grains/kg", "shocked-quartz")).toEqual({
      quantity: "per-gram",
      unit: "grains/g",
      factor: 1e-3,
    });
    expect(measurementUnit("/g", "spherules")).toMatchObject({ quantity: "per-gram", factor: 1 });
    expect(measurementUnit("per mil", "d13c")).toMatchObject({ quantity: "per-mil" });
    expect(measurementUnit("‰", "d13c")).toMatchObject({ quantity: "per-mil" });
    expect(measurementUnit("percent", "shocked-quartz")).toMatchObject({ quantity: "percent" });
    expect(measurementUnit("count", "spherules")).toMatchObject({ quantity: "count" });
    expect(measurementUnit("polarity", "polarity")).toMatchObject({ quantity: "polarity" });
    expect(measurementUnit("", "iridium")).toBeUndefined();
    expect(measurementUnit("furlong", "iridium")).toBeUndefined();
  });
});

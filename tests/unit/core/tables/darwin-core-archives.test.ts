import { describe, expect, it } from "vitest";
import type { Study } from "../../../../src/core/study/model.ts";
import { readSources } from "../../../../src/core/tables/read-sources.ts";
import { onlySection, problemsOf } from "./study-files.ts";

interface Part {
  readonly type: string;
  readonly terms: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

const files = ["event.txt", "occurrence.txt", "measurement.txt"];

/** An archive whose first part is the core; the first column of each is the id. */
function archiveOf(...parts: readonly Part[]): ReadonlyMap<string, Uint8Array> {
  const texts = new Map<string, string>();
  const described = parts.map(({ type, terms, rows }, at) => {
    const file = files.find((name) => !texts.has(name)) ?? "more.txt";
    texts.set(file, [["id", ...terms], ...rows].map((cells) => `${cells.join("\t")}\n`).join(""));
    const fields = terms.map(
      (term, i) => `<field index="${i + 1}" term="http://rs.tdwg.org/dwc/terms/${term}"/>`,
    );
    const [tag, id] = at === 0 ? ["core", "id"] : ["extension", "coreid"];
    return `<${tag} rowType="http://rs.tdwg.org/dwc/terms/${type}" fieldsTerminatedBy="\\t" fieldsEnclosedBy="" ignoreHeaderLines="1"><files><location>${file}</location></files><${id} index="0"/>${fields.join("")}</${tag}>`;
  });
  texts.set("meta.xml", `<archive>${described.join("")}</archive>`);
  return new Map([...texts].map(([name, text]) => [name, new TextEncoder().encode(text)]));
}

const events: Part = {
  type: "Event",
  terms: [
    "parentEventID",
    "locality",
    "decimalLatitude",
    "decimalLongitude",
    "verticalDatum",
    "eventRemarks",
  ],
  rows: [
    ["survey", "", "Veyra coast", "", "", "", ""],
    ["TC", "survey", "Tarn Cut, north face", "54.5", "-3.25", "base of bed 1", ""],
    ["TC-1", "TC", "", "", "", "", "weathered"],
    ["TC-2", "TC", "", "", "", "", ""],
  ],
};
const occurrences = (terms: readonly string[], ...rows: readonly (readonly string[])[]): Part => ({
  type: "Occurrence",
  terms,
  rows,
});
const facts = (...rows: readonly (readonly string[])[]): Part => ({
  type: "MeasurementOrFact",
  terms: ["measurementType", "measurementValue", "measurementUnit"],
  rows,
});
const heights = facts(
  ["TC-1", "stratigraphic height", "150", "cm"],
  ["TC-2", "Stratigraphic height", "320.5", "cm"],
  ["TC-2", "iridium", "0.3", "ng/g"],
);
const two = occurrences(["scientificName"], ["TC-1", "Orvella tenuis"], ["TC-2", "Orvella tenuis"]);

const unusual = ({ problems }: Study) =>
  problems
    .map(({ code }) => code)
    .filter((code) => !["ungrouped", "searches-derived", "one-occurrence", "one-level"].includes(code));

describe("a Darwin Core archive with positions among its measurements", () => {
  it("has samples at those heights, the parent event as section, and true measurements as such", async () => {
    const study = await readSources(archiveOf(events, two, heights));
    expect(onlySection(study)).toMatchObject({
      name: "TC",
      title: "Tarn Cut, north face",
      axis: "height",
      unit: "cm",
      datum: "base of bed 1",
      samples: [
        { name: "TC-1", heightM: 1.5, notes: "weathered" },
        { name: "TC-2", heightM: 3.205 },
      ],
      occurrences: [{ heightM: 1.5, sample: "TC-1" }, { heightM: 3.205 }],
      measurements: [{ analyte: "iridium", sample: "TC-2", heightM: 3.205 }],
    });
    expect(unusual(study)).toEqual([]);
  });

  it.each([
    ["depth below surface", "ft", { axis: "depth", unit: "ft" }, -0.3048],
    ["Depth below sea floor", "metres", { axis: "depth", unit: "m" }, -1],
    ["core_depth", "mm", { axis: "depth", unit: "mm" }, -0.001],
    ["height above base", "m", { axis: "height", unit: "m" }, 1],
  ])("reads %s in %s", async (type, unit, scale, heightM) => {
    const study = await readSources(
      archiveOf(events, two, facts(["TC-1", type, "1", unit], ["TC-2", type, "2", unit])),
    );
    expect(onlySection(study)).toMatchObject({
      ...scale,
      samples: [{ heightM }, { heightM: 2 * heightM }].toSorted((a, b) => a.heightM - b.heightM),
    });
  });

  it("asks where they state no unit, or two, and takes no water depth for a position", async () => {
    const noUnit = facts(
      ["TC-1", "stratigraphic height", "1", ""],
      ["TC-2", "stratigraphic height", "2", ""],
    );
    const mixed = facts(
      ["TC-1", "stratigraphic height", "1", "m"],
      ["TC-2", "stratigraphic height", "2", "ft"],
    );
    for (const part of [noUnit, mixed]) {
      const study = await readSources(archiveOf(events, two, part));
      expect(problemsOf(study, "axis-unknown")).toHaveLength(1);
      expect(study.sections).toEqual([]);
    }
    const water = await readSources(archiveOf(events, two, facts(["TC-1", "water depth", "80", "m"])));
    expect(problemsOf(water, "missing-column")).toHaveLength(1);
  });

  it("places occurrences directly where there are no events", async () => {
    const core = occurrences(
      ["locality", "scientificName"],
      ["o1", "Orskel Ledge", "Orvella tenuis"],
      ["o2", "Orskel Ledge", "Orvella tenuis"],
    );
    const study = await readSources(
      archiveOf(core, facts(["o1", "depth in core", "10", "m"], ["o2", "depth in core", "12", "m"])),
    );
    expect(onlySection(study)).toMatchObject({
      name: "Orskel Ledge",
      axis: "depth",
      occurrences: [{ heightM: -10 }, { heightM: -12 }],
    });
    expect(unusual(study)).toEqual([]);
  });
});

const findsOf = async (terms: readonly string[], ...rows: readonly (readonly string[])[]) =>
  readSources(archiveOf(events, occurrences(terms, ...rows), heights));

describe("the finds of a Darwin Core archive", () => {
  it("are counts, abundances, and absences that say who looked", async () => {
    const study = await findsOf(
      ["scientificName", "individualCount", "organismQuantity", "organismQuantityType", "occurrenceStatus"],
      ["TC-1", "Orvella tenuis", "", "7", "individuals", "present"],
      ["TC-2", "Orvella tenuis", "", "R", "relative abundance", "present"],
      ["TC-1", "Orvella alta", "", "", "", "absent"],
      ["TC-2", "Orvella alta", "3", "", "", "absent"],
      ["TC-2", "Orvella lata", "", "", "", "probable"],
    );
    const finds = Array.from(onlySection(study).occurrences, ({ taxon, count, abundance }) => [
      taxon,
      count,
      abundance,
    ]);
    expect(finds).toEqual([
      ["Orvella tenuis", 7, undefined],
      ["Orvella tenuis", undefined, "R"],
      ["Orvella alta", 0, undefined],
      ["Orvella alta", 3, undefined],
      ["Orvella lata", undefined, undefined],
    ]);
    expect(unusual(study).toSorted()).toEqual([
      "count-zero",
      "status-contradicted",
      "status-unknown",
      "terms-unused",
    ]);
    expect(problemsOf(study, "status-contradicted")).toMatchObject([
      { file: "occurrence.txt [occurrences]", row: 5, column: "occurrenceStatus" },
    ]);
  });

  it("keep a name as it was written with its signs, without its author", async () => {
    const study = await findsOf(
      ["scientificName", "scientificNameAuthorship", "verbatimIdentification", "identificationQualifier"],
      ["TC-1", "Orvella tenuis (Marn, 1931)", "(Marn, 1931)", "", ""],
      ["TC-2", "Orvella tenuis", "", "Orvella cf. tenuis", ""],
      ["TC-2", "Orvella", "", "", "aff. tenuis"],
      ["TC-1", "", "", "Palla nova?", ""],
      ["TC-2", "Palla nova", "", "smooth clam", ""],
    );
    const finds = Array.from(onlySection(study).occurrences, ({ verbatim, taxon, qualifier }) => [
      verbatim,
      taxon,
      qualifier,
    ]);
    expect(finds).toEqual([
      ["Orvella tenuis", "Orvella tenuis", undefined],
      ["Orvella cf. tenuis", "Orvella tenuis", "cf."],
      ["Orvella", "Orvella tenuis", "aff."],
      ["Palla nova?", "Palla nova", "?"],
      ["Palla nova", "Palla nova", undefined],
    ]);
    expect(problemsOf(study, "terms-unused")).toMatchObject([{ found: "verbatimIdentification" }]);
  });
});

// Term names of Darwin Core (TDWG, ratified term list of the namespace http://rs.tdwg.org/dwc/terms/), those of the
// classes that a section's tables touch; `references` is Dublin Core's, which Darwin Core takes over.
import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { tables } from "../../../../src/core/study/tables/index.ts";

const terms = new Set(
  `basisOfRecord catalogNumber references occurrenceID occurrenceStatus individualCount organismQuantity organismQuantityType
  preparations disposition occurrenceRemarks eventID parentEventID fieldNumber samplingProtocol sampleSizeValue sampleSizeUnit
  samplingEffort eventDate eventRemarks eventType verbatimElevation verbatimDepth minimumDepthInMeters maximumDepthInMeters
  verticalDatum locationRemarks decimalLatitude decimalLongitude lowestBiostratigraphicZone highestBiostratigraphicZone
  lithostratigraphicTerms group formation member bed scientificName acceptedNameUsage taxonRank identificationQualifier
  verbatimIdentification identifiedBy materialSampleID measurementType measurementValue measurementUnit measurementAccuracy
  measurementMethod measurementRemarks scientificNameAuthorship locality locationID`.split(/\s+/),
);

/** Classes of the same list that an archive's files may hold; the extension's row type is OBIS's. */
const classes = new Set(["Event", "Occurrence", "MeasurementOrFact", "ExtendedMeasurementOrFact"]);

const sources = new URL("../../../../src/core/tables/sources/", import.meta.url);

describe("Darwin Core names", () => {
  it("that archives are read by are terms of the standard", () => {
    const text = readdirSync(sources)
      .filter((name) => /^(?:darwin-core|stated-positions).*\.ts$/.test(name))
      .map((name) => readFileSync(new URL(name, sources), "utf8"))
      .join("\n");
    const looked = /(?:get|set|delete|value|take|isFilled)\((?:values, |rows, )?"([A-Za-z]+)"/g;
    const named = [...text.matchAll(looked)].map(([, term]) => term);
    const notTerms = new Set(["term", "rowType", "encoding", "index", "default"]); // attributes of meta.xml
    const used = [...new Set(named)].filter(
      (name) => !notTerms.has(name) && !/Terminated|Enclosed|ignore/.test(name),
    );
    expect(used.length).toBeGreaterThan(12);
    expect(used.filter((name) => !terms.has(name))).toEqual([]);
    const types = [...text.matchAll(/\["([A-Z][A-Za-z]+)", "[a-z]+"\]/g)].map(([, type]) => type);
    expect(types.toSorted()).toEqual([...classes].toSorted());
  });

  it.each(tables.map((table) => [table.name, table] as const))(
    "of %s are terms of the standard",
    (_, table) => {
      for (const [name, { dwc }] of Object.entries(table.columns)) {
        if (dwc !== undefined) expect([name, dwc, terms.has(dwc)]).toEqual([name, dwc, true]);
      }
    },
  );
});

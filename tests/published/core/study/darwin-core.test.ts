// Term names of Darwin Core (TDWG, ratified term list of the namespace http://rs.tdwg.org/dwc/terms/), those of the
// classes that a section's tables touch; `references` is Dublin Core's, which Darwin Core takes over.
import { describe, expect, it } from "vitest";
import { tables } from "../../../../src/core/study/tables/index.ts";

const terms = new Set(
  `basisOfRecord catalogNumber references occurrenceID occurrenceStatus individualCount organismQuantity organismQuantityType
  preparations disposition occurrenceRemarks eventID parentEventID fieldNumber samplingProtocol sampleSizeValue sampleSizeUnit
  samplingEffort eventDate eventRemarks eventType verbatimElevation verbatimDepth minimumDepthInMeters maximumDepthInMeters
  verticalDatum locationRemarks decimalLatitude decimalLongitude lowestBiostratigraphicZone highestBiostratigraphicZone
  lithostratigraphicTerms group formation member bed scientificName acceptedNameUsage taxonRank identificationQualifier
  verbatimIdentification identifiedBy materialSampleID measurementType measurementValue measurementUnit measurementAccuracy
  measurementMethod measurementRemarks`.split(/\s+/),
);

describe("Darwin Core names", () => {
  it.each(tables.map((table) => [table.name, table] as const))(
    "of %s are terms of the standard",
    (_, table) => {
      for (const [name, { dwc }] of Object.entries(table.columns)) {
        if (dwc !== undefined) expect([name, dwc, terms.has(dwc)]).toEqual([name, dwc, true]);
      }
    },
  );
});

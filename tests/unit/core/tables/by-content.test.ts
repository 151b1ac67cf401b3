import { describe, expect, it } from "vitest";
import { occurrences } from "../../../../src/core/study/tables/occurrences.ts";
import { choicesByContent } from "../../../../src/core/tables/by-content.ts";
import { parseRecords } from "../../../../src/core/tables/csv.ts";
import { findHeader } from "../../../../src/core/tables/dialect/header.ts";

const listed = { section: new Set(["Tarn Cut", "Orsk Beck"]), sample: new Set(["T1", "T2", "T3"]) };

function choices(text: string) {
  const { records } = parseRecords(text);
  const found = choicesByContent(findHeader(records, occurrences), records, { table: occurrences, listed });
  return Object.fromEntries(Array.from(found, ([header, { is, by }]) => [header, `${is} by ${by}`]));
}

describe("columns taken by their content", () => {
  it("are names of taxa, of listed samples and sections", () => {
    expect(
      choices(
        "where,what,from\nTarn Cut,Velorites alta,T1\nOrsk Beck,Quenstra lenis,T2\nTarn Cut,Velorites parva,T3\n",
      ),
    ).toEqual({ where: "section by content", what: "taxon by content", from: "sample by content" });
  });

  it("are positions where numbers go one way and nothing else says where a row lies", () => {
    const text =
      "section,what,how far\nTarn Cut,Velorites alta,1\nTarn Cut,Quenstra lenis,2.5\nTarn Cut,Velorites parva,4\n";
    expect(choices(text)).toEqual({ what: "taxon by content", "how far": "position by content" });
  });

  it("are no positions where numbers go both ways, or where a sample tells the place", () => {
    expect(
      choices(
        "section,what,how far\nTarn Cut,Velorites alta,1\nTarn Cut,Quenstra lenis,5\nTarn Cut,Velorites parva,4\n",
      ),
    ).toEqual({ what: "taxon by content" });
    expect(
      choices(
        "section,sample,what,no\nTarn Cut,T1,Velorites alta,1\nTarn Cut,T2,Quenstra lenis,2\nTarn Cut,T3,Velorites parva,3\n",
      ),
    ).toEqual({ what: "taxon by content" });
  });

  it("are none where too few values fit, or all are one", () => {
    expect(choices("section,what\nTarn Cut,Velorites alta\nTarn Cut,some shells\nTarn Cut,more\n")).toEqual(
      {},
    );
    expect(choices("section,what\nTarn Cut,Velorites alta\nTarn Cut,Velorites alta\n")).toEqual({});
  });

  it("never displace a header that is known", () => {
    expect(
      choices("section,taxon,what\nTarn Cut,some,Velorites alta\nTarn Cut,more,Quenstra lenis\n"),
    ).toEqual({});
  });
});

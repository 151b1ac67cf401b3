import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import { parseRepeatSheet, repeatSheet, sheetDifferences } from "../../../src/report/repeat-sheet.ts";

const digest = async (content: string | Uint8Array) => createHash("sha256").update(content).digest("hex");
const study = (text: string) =>
  readStudy(new Map([["occurrences.csv", new TextEncoder().encode(text)]]), { name: "trial" });

const rows = "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1.2\nOrskel Ledge,Orvella tenuis,2.2\n";

describe("the repeat sheet", () => {
  it("records size and digest of every table, and every setting with its default", async () => {
    const sheet = await repeatSheet(study(rows), new Map([["timing.csv", "a\n"]]), digest);
    expect(sheet.study.tables).toEqual([
      { name: "occurrences.csv", size: rows.length, sha256: await digest(rows) },
    ]);
    expect(sheet.settings).toMatchObject({
      confidence: 0.95,
      replicates: 20000,
      timing: { durationHorizons: 10 },
    });
    expect(sheet.results).toEqual([{ name: "timing.csv", sha256: await digest("a\n") }]);
  });

  it("the digest is SHA-256 (FIPS 180-4: the known answer of `abc`)", async () => {
    expect(await digest("abc")).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  });

  it("reads back as it was written, and refuses other texts", async () => {
    const sheet = await repeatSheet(study(rows), new Map(), digest);
    expect(parseRepeatSheet(JSON.stringify(sheet))).toEqual(sheet);
    for (const text of ["", "{}", "[1]", '{"program":{"name":"other"}}'])
      expect(parseRepeatSheet(text)).toBeUndefined();
  });

  it("names a table that changed since", async () => {
    const sheet = await repeatSheet(study(rows), new Map(), digest);
    expect(await sheetDifferences(sheet, study(rows), digest)).toEqual([]);
    const changed = await sheetDifferences(sheet, study(rows.replace("2.2", "2.3")), digest);
    expect(changed.map((difference) => difference.table)).toEqual(["study/occurrences.csv"]);
  });

  it("holds no time, path, user or thread count", async () => {
    const text = JSON.stringify(await repeatSheet(study(rows), new Map(), digest));
    expect(text).not.toMatch(/\d{4}-\d{2}-\d{2}|\/|thread|user|date/i);
  });
});

import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readSources } from "../../../../src/core/tables/read-sources.ts";
import { readStudy } from "../../../../src/core/tables/read-study.ts";
import { packStudy } from "../../../../src/core/tables/sources/pack-study.ts";
import { unpackSources } from "../../../../src/core/tables/sources/unpack-sources.ts";
import { workbook, zip } from "../../../unit/core/tables/awkward/packed.ts";

const plain = "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1.5\n";
const encoder = new TextEncoder();

const damage = fc.array(fc.tuple(fc.nat(), fc.nat(255)), { minLength: 1, maxLength: 12 });

function damaged(bytes: Uint8Array, places: readonly (readonly [number, number])[]): Uint8Array {
  const copy = bytes.slice();
  for (const [at, value] of places) copy[at % copy.length] = value;
  return copy;
}

const sound: readonly (readonly [string, Uint8Array])[] = [
  ["study.zip", zip({ "occurrences.csv": plain.repeat(20) })],
  ["stored.zip", zip({ "study/occurrences.csv": plain, "study/settings.json": "{}" }, 0)],
  [
    "study.xlsx",
    await workbook({
      occurrences: [
        ["section", "taxon", "height (m)"],
        ["Orskel Ledge", "x", 1],
      ],
    }),
  ],
  ["occurrences.csv", encoder.encode(plain)],
  [
    "meta.xml",
    encoder.encode(
      '<archive><core rowType="Occurrence" fieldsTerminatedBy=","><files><location>occurrences.csv</location></files><id index="0"/><field index="1" term="x/scientificName"/></core></archive>',
    ),
  ],
  [
    "datapackage.json",
    encoder.encode(
      '{"resources":[{"name":"occurrences","path":"occurrences.csv","dialect":{"delimiter":";"}}]}',
    ),
  ],
];

describe("reading sources never throws", () => {
  it("on damaged archives, workbooks and descriptions, and says that something is wrong where nothing was read", async () => {
    const property = fc.asyncProperty(
      fc.subarray([...sound], { minLength: 1 }),
      fc.infiniteStream(damage),
      async (files, damages) => {
        const given = new Map(
          files.map(([name, bytes]) => [name, damaged(bytes, damages.next().value ?? [])] as const),
        );
        const study = await readSources(given);
        if (study.sheets.length === 0) expect(study.problems.length).toBeGreaterThan(0);
        expect(study.files.map(({ name }) => name)).toEqual([...given.keys()]);
      },
    );
    await fc.assert(property, { seed: 1, numRuns: 400 });
  });

  it("on arbitrary bytes under any ending", async () => {
    const name = fc.constantFrom("a.zip", "a.xlsx", "a.csv", "occurrences.tsv", "meta.xml", "samples.txt");
    const bytes = fc.oneof(
      fc.uint8Array({ maxLength: 300 }),
      fc.uint8Array({ maxLength: 300 }).map((rest) => new Uint8Array([0x50, 0x4b, 3, 4, ...rest])),
      fc
        .string({ unit: fc.constantFrom(..."<>/\"'= archivecoefld&;x0\n".split("")) })
        .map((text) => encoder.encode(text)),
    );
    const property = fc.asyncProperty(fc.dictionary(name, bytes), async (files) => {
      const study = await readSources(new Map(Object.entries(files)));
      expect(study.problems.length).toBeGreaterThan(0);
    });
    await fc.assert(property, { seed: 1, numRuns: 400 });
  });
});

describe("a packed study", () => {
  it("gives its files and its study back, and the same bytes in any order of its files", async () => {
    const name = fc.constantFrom(
      "occurrences.csv",
      "samples.csv",
      "settings.json",
      "datapackage.json",
      "logs/beds.csv",
    );
    const content = fc.oneof(fc.uint8Array({ maxLength: 80 }), fc.constant(encoder.encode(plain)));
    const property = fc.asyncProperty(
      fc.dictionary(name, content, { noNullPrototype: true }),
      async (record) => {
        const files = new Map(Object.entries(record));
        const packed = packStudy(files);
        expect(packStudy(new Map([...files].toReversed()))).toEqual(packed);
        const { files: unpacked, problems } = await unpackSources(new Map([["s.zip", packed]]));
        expect(problems).toEqual([]);
        expect(new Map([...unpacked].map(([path, bytes]) => [path.replace("s.zip/", ""), bytes]))).toEqual(
          files,
        );
        const sorted = new Map([...files].toSorted(([a], [b]) => (a < b ? -1 : 1)));
        const [whole, again] = [readStudy(sorted), await readSources(new Map([["s.zip", packed]]))];
        expect({ sheets: again.sheets, sections: again.sections }).toEqual({
          sheets: whole.sheets,
          sections: whole.sections,
        });
      },
    );
    await fc.assert(property, { seed: 1, numRuns: 200 });
  });
});

describe("a zip of a study", () => {
  it("reads as the folder does, whatever its cells hold", async () => {
    const cells = fc.array(fc.string({ unit: "grapheme", maxLength: 10 }), { minLength: 1, maxLength: 4 });
    const property = fc.asyncProperty(cells, async (names) => {
      const text = `section,taxon,height (m)\n${names.map((name, at) => `S,"T ${name.replaceAll('"', '""')}",${at}`).join("\n")}\n`;
      const folder = readStudy(new Map([["occurrences.csv", encoder.encode(text)]]));
      const packed = await readSources(new Map([["study.zip", zip({ "occurrences.csv": text })]]));
      expect({ ...packed, files: [], name: "" }).toEqual({ ...folder, files: [], name: "" });
    });
    await fc.assert(property, { seed: 1, numRuns: 200 });
  });
});

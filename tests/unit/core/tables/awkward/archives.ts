import { type AwkwardFile, oneByte } from "./awkward-file.ts";
import { bareHeader, bareRow, bareWorkbook, workbook, zip } from "./packed.ts";

const plain = "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1.5\n";
const one = [["Orskel Ledge", "Orvella tenuis", 1.5]] as const;
const header = ["section", "taxon", "height (m)"];
const find = ["Orskel Ledge", "Orvella tenuis", 1.5];

const locked = zip({ "occurrences.csv": plain });
for (const signature of [0x04034b50, 0x02014b50]) markLocked(locked, signature);

/** Sets the flag of encryption in the header with a signature. */
function markLocked(bytes: Uint8Array, signature: number): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  for (let at = 0; at + 4 <= bytes.length; at++)
    if (view.getUint32(at, true) === signature) bytes[at + (signature === 0x02014b50 ? 8 : 6)] |= 1;
}

const damaged = zip({ "occurrences.csv": plain }, 0);
damaged[60] ^= 1;

const meta = (depth: string) => `<?xml version="1.0"?>
<archive xmlns="http://rs.tdwg.org/dwc/text/" metadata="eml.xml">
  <core encoding="UTF-8" fieldsTerminatedBy="\\t" linesTerminatedBy="\\n" fieldsEnclosedBy="" ignoreHeaderLines="1" rowType="http://rs.tdwg.org/dwc/terms/Event">
    <files><location>event.txt</location></files>
    <id index="0"/>
    <field index="0" term="http://rs.tdwg.org/dwc/terms/eventID"/>
    <field index="1" term="http://rs.tdwg.org/dwc/terms/parentEventID"/>
    <field index="2" term="http://rs.tdwg.org/dwc/terms/${depth}"/>
    <field default="Veyra" term="http://rs.tdwg.org/dwc/terms/country"/>
  </core>
  <extension encoding="UTF-8" fieldsTerminatedBy="," fieldsEnclosedBy='"' ignoreHeaderLines="1" rowType="http://rs.tdwg.org/dwc/terms/Occurrence">
    <files><location>occurrence.txt</location></files>
    <coreid index="0"/>
    <field index="1" term="http://rs.tdwg.org/dwc/terms/scientificName"/>
    <field index="2" term="http://rs.tdwg.org/dwc/terms/individualCount"/>
  </extension>
</archive>`;

const archive = (depth: string, cells: readonly [string, string]) =>
  zip({
    "meta.xml": meta(depth),
    "eml.xml": "<eml/>",
    "event.txt": `id\tparent\tdepth\nTC\t\t\nTC-1\tTC\t${cells[0]}\nTC-2\tTC\t${cells[1]}\n`,
    "occurrence.txt": 'id,name,n\nTC-1,"Orvella tenuis",3\nTC-2,Orvella robusta,1\n',
  });

const packageOf = (resource: object) =>
  JSON.stringify({ profile: "tabular-data-package", resources: [resource] });

/** Studies packed in one file, and folders that describe themselves. */
export const archives: readonly AwkwardFile[] = [
  {
    title: "a zip of a study",
    files: { "study.zip": zip({ "occurrences.csv": plain }) },
    finds: one,
    told: [],
  },
  {
    title: "a zip with the folder in it, and what a system hides there",
    files: {
      "study.zip": zip({
        "study/occurrences.csv": plain,
        "study/README.md": "x",
        "__MACOSX/study/._occurrences.csv": "\u0000",
        "study/.DS_Store": "\u0000",
      }),
    },
    finds: one,
    told: [],
  },
  {
    title: "a locked zip",
    files: { "study.zip": locked },
    finds: [],
    told: ["archive-encrypted", "no-data"],
  },
  { title: "a damaged zip", files: { "study.zip": damaged }, finds: [], told: ["archive-broken", "no-data"] },
  {
    title: "half a zip",
    files: { "study.zip": zip({ "occurrences.csv": plain }).slice(0, 90) },
    finds: [],
    told: ["archive-broken", "no-data"],
  },
  {
    title: "a zip that is none, beside a good table",
    files: { "more.zip": "not a zip", "occurrences.csv": plain },
    finds: one,
    told: ["archive-broken"],
  },
  {
    title: "a small zip that unpacks to 64 MiB",
    files: { "study.zip": zip({ "occurrences.csv": new Uint8Array(2 ** 26) }) },
    finds: [],
    told: ["archive-too-large", "no-data"],
  },
  {
    title: "a zip of 2,000 files",
    files: {
      "study.zip": zip(Object.fromEntries(Array.from({ length: 2000 }, (_, i) => [`${i}.csv`, ""])), 0),
    },
    finds: [],
    told: ["archive-too-large", "no-data"],
  },
  {
    title: "a zip in a zip",
    files: { "study.zip": zip({ "inner.zip": zip({ "beds.csv": "" }), "occurrences.csv": plain }) },
    finds: one,
    told: ["archive-inside"],
  },
  {
    title: "a workbook of a sheet per table",
    files: {
      "study.xlsx": await workbook({
        Sections: [
          ["section", "axis", "unit"],
          ["Tarn Cut", "depth", "ft"],
        ],
        Samples: [["section", "sample", "position"], ["Tarn Cut", "A", 10.5], [], ["Tarn Cut", 7, 0.1 + 0.2]],
        Occurrences: [
          ["section", "taxon", "sample", "doubtful"],
          ["Tarn Cut", "Orvella tenuis", "A", false],
          ["Tarn Cut", "Orvella robusta", 7, true],
        ],
      }),
    },
    finds: [
      ["Tarn Cut", "Orvella tenuis", -3.2004],
      ["Tarn Cut", "Orvella robusta", -0.09144],
    ],
    told: [],
  },
  {
    title: "a workbook of one sheet under the name it came with, notes and units above the rows",
    files: {
      "finds.xlsx": await workbook({
        Sheet1: [["Finds of the north face"], [], ["section", "taxon", "height"], [null, null, "m"], find],
        Sheet2: [],
      }),
    },
    finds: one,
    told: ["taken-as", "read-as", "notes-above"],
  },
  {
    title: "a workbook with decimal commas kept as text",
    files: {
      "study.xlsx": await workbook({ occurrences: [header, ["Orskel Ledge", "Orvella tenuis", "1,5"]] }),
    },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "a workbook that made a date of a position",
    files: {
      "study.xlsx": await workbook({
        occurrences: [header, ["Orskel Ledge", "Orvella robusta", new Date(Date.UTC(2024, 4, 1))], find],
      }),
    },
    finds: one,
    told: ["not-a-number"],
  },
  {
    title: "a workbook with a formula, and one that failed",
    files: {
      "study.xlsx": bareWorkbook(
        `${bareHeader}${bareRow(2, '<c r="C2"><f>1+0.5</f><v>1.5</v></c>')}${bareRow(3, '<c r="C3" t="e"><f>NA()</f><v>#N/A</v></c>')}`,
      ),
    },
    finds: one,
    told: ["cell-without-value", "one-of"],
  },
  {
    title: "a workbook with a row numbered a thousand million",
    files: { "study.xlsx": bareWorkbook(`${bareHeader}<row r="1000000000"></row>`) },
    finds: [],
    told: ["workbook-unreadable", "no-data"],
  },
  {
    title: "a workbook that reaches to the last column",
    files: { "study.xlsx": bareWorkbook(`${bareHeader}${bareRow(2, '<c r="XFD2"><v>1</v></c>')}`) },
    finds: [],
    told: ["too-many-columns", "no-data"],
  },
  {
    title: "a workbook whose sheet is no XML",
    files: { "study.xlsx": bareWorkbook("<row r=") },
    finds: [],
    told: ["workbook-unreadable", "no-data"],
  },
  {
    title: "an old or locked workbook",
    files: { "study.xls": [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1, 0, 0] },
    finds: [],
    told: ["old-workbook", "no-data"],
  },
  {
    title: "a workbook in a zip",
    files: { "study.zip": zip({ "study/tables.xlsx": await workbook({ occurrences: [header, find] }) }) },
    finds: one,
    told: [],
  },
  {
    title: "a data package 1.0 with its own paths, signs and letters",
    files: {
      "datapackage.json": packageOf({
        name: "occurrences",
        path: "data/finds-2024.txt",
        encoding: "windows-1252",
        dialect: { delimiter: ";", quoteChar: "'", header: false },
        schema: {
          missingValues: ["", "-99"],
          fields: [
            { name: "section", type: "string" },
            { name: "taxon", type: "string" },
            { name: "height (m)", type: "number", decimalChar: "," },
            { name: "count", type: "integer" },
          ],
        },
      }),
      "data/finds-2024.txt": oneByte("'Ørskel; Ledge';Orvella tenuis;1,5;-99\n"),
    },
    finds: [["Ørskel; Ledge", "Orvella tenuis", 1.5]],
    told: [],
  },
  {
    title: "a data package 2.0 zipped, with resources that are elsewhere, inline or missing",
    files: {
      "package.zip": zip({
        "datapackage.json": JSON.stringify({
          $schema: "https://datapackage.org/profiles/2.0/datapackage.json",
          resources: [
            { name: "occurrences", type: "table", path: "finds.csv", dialect: { delimiter: "|" } },
            { name: "samples", path: "https://example.org/samples.csv" },
            { name: "taxa", data: [["taxon"], ["x"]] },
            { name: "beds", path: "logs/beds-old.csv" },
          ],
        }),
        "finds.csv": plain.replaceAll(",", "|"),
      }),
    },
    finds: one,
    told: ["resource-unread", "resource-unread", "resource-unread"],
  },
  {
    title: "a Darwin Core archive with depths in feet",
    files: { "dwca.zip": archive("verbatimDepth", ["10.5 ft", "2 feet"]) },
    finds: [
      ["TC", "Orvella tenuis", -3.2004],
      ["TC", "Orvella robusta", -0.6096],
    ],
    told: ["terms-unused"],
  },
  {
    title: "a Darwin Core archive with depths without a unit asks",
    files: { "dwca.zip": archive("verbatimDepth", ["10.5", "2"]) },
    finds: [],
    told: ["terms-unused", "axis-unknown", "section-left-out", "section-left-out"],
  },
  {
    title: "a Darwin Core archive with a question of units answered",
    files: { "dwca.zip": archive("verbatimDepth", ["10.5", "2"]) },
    settings: { sections: { unit: "ft" } },
    finds: [
      ["TC", "Orvella tenuis", -3.2004],
      ["TC", "Orvella robusta", -0.6096],
    ],
    told: ["terms-unused"],
  },
];

import { type AwkwardFile, oneByte, utf16 } from "./awkward-file.ts";

const plain = "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1.5\n";
const semicolons = "section;taxon;depth (ft)\nTarn Cut;Orvella tenuis;10,5\nTarn Cut;Orvella robusta;2\n";
const one = [["Orskel Ledge", "Orvella tenuis", 1.5]] as const;
const feet = [
  ["Tarn Cut", "Orvella tenuis", -3.2004],
  ["Tarn Cut", "Orvella robusta", -0.6096],
] as const;

/** Files whose signs, letters and headers are not the plain ones. */
export const dialects: readonly AwkwardFile[] = [
  {
    title: "semicolons and decimal commas, depth in feet",
    files: { "occurrences.csv": semicolons },
    finds: feet,
    told: ["read-as"],
  },
  {
    title: "the same, settled in the settings",
    files: { "occurrences.csv": semicolons },
    settings: { tables: { "occurrences.csv": { delimiter: "semicolon", decimal: "comma" } } },
    finds: feet,
    told: [],
  },
  {
    title: "the same, settled by name without ending",
    files: { "occurrences.csv": semicolons },
    settings: { tables: { occurrences: { delimiter: "semicolon", decimal: "comma" } } },
    finds: feet,
    told: [],
  },
  {
    title: "tabs in a .csv",
    files: { "occurrences.csv": plain.replaceAll(",", "\t") },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "tabs in a .tsv",
    files: { "occurrences.tsv": plain.replaceAll(",", "\t") },
    finds: one,
    told: [],
  },
  {
    title: "bars in a .txt",
    files: { "Occurrences.txt": plain.replaceAll(",", "|") },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "a number that can be read in two ways",
    files: { "occurrences.csv": "section;taxon;height (m)\nOrskel Ledge;Orvella tenuis;1,234\n" },
    finds: [],
    told: ["decimal-ambiguous", "no-data"],
  },
  {
    title: "the same, answered with comma",
    files: { "occurrences.csv": "section;taxon;height (m)\nOrskel Ledge;Orvella tenuis;1,234\n" },
    settings: { tables: { occurrences: { decimal: "comma" } } },
    finds: [["Orskel Ledge", "Orvella tenuis", 1.234]],
    told: ["read-as"],
  },
  {
    title: "1.234 between semicolons asks as well",
    files: { "occurrences.csv": "section;taxon;height (m)\nOrskel Ledge;Orvella tenuis;1.234\n" },
    finds: [],
    told: ["decimal-ambiguous", "no-data"],
  },
  {
    title: "1.234 between commas is a plain number",
    files: { "occurrences.csv": "section,taxon,height (m)\nOrskel Ledge,Orvella tenuis,1.234\n" },
    finds: [["Orskel Ledge", "Orvella tenuis", 1.234]],
    told: [],
  },
  {
    title: "one number with a point among decimal commas is an error of its row",
    files: {
      "occurrences.csv":
        "section;taxon;height (m)\nOrskel Ledge;Orvella tenuis;1,5\nOrskel Ledge;Orvella tenuis;2,5\nOrskel Ledge;Orvella robusta;3.5\n",
    },
    finds: [
      ["Orskel Ledge", "Orvella tenuis", 1.5],
      ["Orskel Ledge", "Orvella tenuis", 2.5],
    ],
    told: ["read-as", "not-a-number"],
  },
  {
    title: "one number decides for all that could be either",
    files: {
      "occurrences.csv":
        "section;taxon;height (m)\nOrskel Ledge;Orvella tenuis;1,234\nOrskel Ledge;Orvella robusta;0,5\n",
    },
    finds: [
      ["Orskel Ledge", "Orvella tenuis", 1.234],
      ["Orskel Ledge", "Orvella robusta", 0.5],
    ],
    told: ["read-as"],
  },
  {
    title: "UTF-16, little end first, as a spreadsheet's Unicode text",
    files: { "occurrences.txt": utf16(plain.replaceAll(",", "\t"), "little") },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "UTF-16, big end first",
    files: { "occurrences.csv": utf16(plain, "big") },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "Windows-1252 letters",
    files: { "occurrences.csv": oneByte(plain.replace("Orskel", "Ørskél")) },
    finds: [["Ørskél Ledge", "Orvella tenuis", 1.5]],
    told: ["read-as-windows-1252"],
  },
  {
    title: "Windows-1252 signs between 0x80 and 0x9F",
    files: {
      "occurrences.csv": oneByte(plain.replace("Ledge", "\x96 \x93Ledge\x94")),
    },
    finds: [["Orskel – “Ledge”", "Orvella tenuis", 1.5]],
    told: ["read-as-windows-1252"],
  },
  {
    title: "Windows-1252, settled in the settings",
    files: { "occurrences.csv": oneByte(plain.replace("Orskel", "Ørskél")) },
    settings: { tables: { occurrences: { encoding: "Windows-1252" } } },
    finds: [["Ørskél Ledge", "Orvella tenuis", 1.5]],
    told: [],
  },
  {
    title: "notes above the header",
    files: { "occurrences.csv": `Field book 3,,\n"heights, taped",,\n\n${plain}` },
    finds: one,
    told: ["notes-above"],
  },
  {
    title: "units in a row of their own",
    files: { "occurrences.csv": "section,taxon,height\n,,m\nOrskel Ledge,Orvella tenuis,1.5\n" },
    finds: one,
    told: ["read-as"],
  },
  {
    title: "a unit in brackets in a row of its own, dashes elsewhere",
    files: { "occurrences.csv": "section,taxon,depth\n-,-,[ft]\nTarn Cut,Orvella tenuis,10.5\n" },
    finds: [["Tarn Cut", "Orvella tenuis", -3.2004]],
    told: ["read-as"],
  },
  {
    title: "a unit that is none in a row of its own",
    files: { "occurrences.csv": "section,taxon,height\n,,furlong\nOrskel Ledge,Orvella tenuis,1.5\n" },
    finds: [],
    told: ["unknown-unit", "no-data"],
  },
  {
    title: "a merged header over two columns",
    files: {
      "samples.csv": "section,sample,depth (m),\n,,top,base\nTarn Cut,A,1,2\n",
      "occurrences.csv": "section,taxon,sample\nTarn Cut,Orvella tenuis,A\n",
    },
    finds: [["Tarn Cut", "Orvella tenuis", -1.5]],
    told: ["read-as"],
  },
  {
    title: "a merged header over two columns, and their unit in a third row",
    files: {
      "samples.csv": "section,sample,height,\n,,base,top\n,,m,m\nOrskel Ledge,A,1,2\n",
      "occurrences.csv": "section,taxon,sample\nOrskel Ledge,Orvella tenuis,A\n",
    },
    finds: [["Orskel Ledge", "Orvella tenuis", 1.5]],
    told: ["read-as"],
  },
  {
    title: "cells that could be names of columns",
    files: {
      "samples.csv": "section,sample,height (m)\nCore,ID,1.5\n",
      "occurrences.csv": "section,taxon,sample\nCore,fossil,ID\n,,\nCore,Orvella tenuis,ID\n",
    },
    finds: [
      ["Core", "fossil", 1.5],
      ["Core", "Orvella tenuis", 1.5],
    ],
    told: [],
  },
  {
    title: "empty columns and rows at the end",
    files: {
      "occurrences.csv": "section,taxon,height (m),,,\n\nOrskel Ledge,Orvella tenuis,1.5,,,\n,,,,,\n,,,,,\n",
    },
    finds: one,
    told: [],
  },
  {
    title: "a quoted line break and quoted semicolons between semicolons",
    files: {
      "occurrences.csv":
        'section;taxon;height (m);notes\nOrskel Ledge;Orvella tenuis;1,5;"grey; then\nred"\nOrskel Ledge;Orvella robusta;2,5;\n',
    },
    finds: [
      ["Orskel Ledge", "Orvella tenuis", 1.5],
      ["Orskel Ledge", "Orvella robusta", 2.5],
    ],
    told: ["read-as"],
  },
  {
    title: "a find list under a name of its own",
    files: { "my finds.csv": plain },
    finds: one,
    told: ["taken-as"],
  },
  {
    title: "a find list under a name of its own, stated in the settings",
    files: { "my finds.csv": plain },
    settings: { tables: { "my finds": { table: "occurrences" } } },
    finds: one,
    told: [],
  },
  {
    title: "a shopping list",
    files: { "occurrences.csv": plain, "shopping.csv": "what,how many\nhammer,1\n" },
    finds: one,
    told: ["unknown-file"],
  },
  {
    title: "a sheet of 10,000 columns",
    files: {
      "occurrences.csv": `section,taxon,height (m)${Array.from({ length: 10_000 }, (_, i) => `,t${i}`).join("")}\nOrskel Ledge,Orvella tenuis,1\n`,
    },
    finds: [],
    told: ["too-many-columns", "no-data"],
  },
  {
    title: "a setting for a file that is not there",
    files: { "occurrences.csv": plain },
    settings: { tables: { occurences: { decimal: "comma" } } },
    finds: one,
    told: ["table-setting-unused"],
  },
];

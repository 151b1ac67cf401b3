import { mkdir, open, writeFile } from "node:fs/promises";
import { join } from "node:path";

const SECTIONS = 50;
const TAXA = 600;
const FINDS_IN_A_SAMPLE = 20;
const GROUPS = ["ammonoids", "bivalves", "foraminifera", "echinoids", "brachiopods"];

const section = (/** @type {number} */ at) => `Ledge ${at + 1}`;
const taxon = (/** @type {number} */ at) => `Orvella ${word(at)}ensis`;

/**
 * Writes an invented study of as many finds: 50 sections, 20 finds in every sample, five groups searched in each.
 * @param {string} folder
 * @param {number} finds
 */
export async function writeStudy(folder, finds) {
  await mkdir(folder, { recursive: true });
  const samples = Math.ceil(finds / SECTIONS / FINDS_IN_A_SAMPLE);
  const all = Array.from({ length: SECTIONS }, (_, at) => section(at));
  const write = (/** @type {string} */ name, /** @type {string[]} */ lines) =>
    writeFile(join(folder, name), `${lines.join("\n")}\n`);
  await write("sections.csv", [
    "section,axis,unit,bottom,top",
    ...all.map((name) => `${name},height,m,0,200`),
  ]);
  await write("taxa.csv", [
    "taxon,group",
    ...Array.from({ length: TAXA }, (_, at) => `${taxon(at)},${GROUPS[at % GROUPS.length]}`),
  ]);
  const tables = await Promise.all(
    ["samples.csv", "searches.csv", "occurrences.csv"].map((name) => open(join(folder, name), "w")),
  );
  const heads = [
    "section,sample,position",
    "section,sample,group",
    "section,taxon,sample,count,abundance,qualifier",
  ];
  for (const [at, head] of heads.entries()) await tables[at].write(`${head}\n`);
  for (const [at, name] of all.entries()) {
    /** @type {string[][]} */
    const lines = [[], [], []];
    for (let sample = 0; sample < samples; sample++) {
      const own = `${name},L${at + 1}-${sample + 1}`;
      lines[0].push(`${own},${((sample * 190) / samples).toFixed(3)}`);
      for (const group of GROUPS) lines[1].push(`${own},${group}`);
      for (let find = 0; find < FINDS_IN_A_SAMPLE; find++) {
        const which = (find * 29 + sample * 7 + at) % TAXA;
        const count = 1 + ((which * sample) % 40);
        const sign = which % 50 === 0 ? "cf." : "";
        lines[2].push(
          `${name},${taxon(which)},L${at + 1}-${sample + 1},${count},${"RFCA"[which % 4]},${sign}`,
        );
      }
    }
    for (const [table, own] of lines.entries()) await tables[table].write(`${own.join("\n")}\n`);
  }
  for (const table of tables) await table.close();
}

/** A word for a number, unlike that of any other. */
const word = (/** @type {number} */ at) =>
  [at % 10, Math.floor(at / 10) % 10, Math.floor(at / 100)]
    .map((digit) => ["bor", "dal", "fen", "gur", "hil", "kam", "lod", "mer", "nis", "pol"][digit])
    .join("");

import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { drawsFor, poisson } from "../../../datasets/veyra-shelf-truth/generator/draws.ts";
import { exampleFinds, exampleSearches } from "../../../datasets/veyra-shelf-truth/generator/fossils.ts";
import { heightAtKa, kaAtHeight, smearBaseM } from "../../../datasets/veyra-shelf-truth/generator/scale.ts";
import { type SectionData, sectionData } from "../../../datasets/veyra-shelf-truth/generator/section-data.ts";
import { exampleStudy, trueLevels } from "../../../datasets/veyra-shelf-truth/generator/study.ts";
import { readTruth } from "../../../datasets/veyra-shelf-truth/generator/truth.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";

const at = (path: string) => fileURLToPath(new URL(`../../../datasets/${path}`, import.meta.url));
const truthText = readFileSync(at("veyra-shelf-truth/truth.json"), "utf8");
const truth = readTruth(truthText);
const data = truth.sections.map((section, index) => sectionData(truth, section, index));
const dataOf = (name: string): SectionData => {
  const found = data.find(({ section }) => section.section === name);
  if (found === undefined) throw new Error(`no section ${name}`);
  return found;
};

describe("the committed study", () => {
  const study = exampleStudy(truthText);

  it("is what the generator writes from the truth, byte for byte", () => {
    for (const [name, text] of study) {
      expect(readFileSync(at(`veyra-shelf/${name}`)).equals(Buffer.from(text)), name).toBe(true);
    }
  });

  it("is read without an error, and with a caution only for taxa found once", () => {
    const files = new Map([...study].map(([name, text]) => [name, new TextEncoder().encode(text)]));
    const read = readStudy(files);
    expect([...new Set(read.problems.map(({ severity, code }) => `${severity} ${code}`))]).toEqual([
      "caution one-occurrence",
    ]);
    const samples = read.sections.map(({ name, samples }) => [name, samples.length]);
    expect(samples).toEqual(data.map(({ section, samples }) => [section.section, samples.length]));
  });

  it("places every sample within 5 mm of where the generator had it", () => {
    const files = new Map([...study].map(([name, text]) => [name, new TextEncoder().encode(text)]));
    for (const { name, samples } of readStudy(files).sections) {
      const truly = new Map(dataOf(name).samples.map(({ code, heightM }) => [code, heightM]));
      for (const sample of samples) {
        expect(Math.abs(sample.heightM - (truly.get(sample.name) ?? 0)), sample.name).toBeLessThan(0.0051);
      }
    }
  });

  it("holds no table that the generator does not write", () => {
    expect(readdirSync(at("veyra-shelf")).toSorted()).toEqual([...study.keys(), "README.md"].toSorted());
  });
});

describe("the truth", () => {
  const beforeEvent = truth.taxa.filter(({ end }) => end !== "aftermath");
  const ending = (end: string) => beforeEvent.filter((taxon) => taxon.end === end).length;

  it("lets a quarter of the taxa end early, most at the event, and some survive", () => {
    expect(truth.taxa.length).toBeGreaterThanOrEqual(45);
    expect(ending("early") / beforeEvent.length).toBeCloseTo(0.25, 1);
    expect(ending("event") / beforeEvent.length).toBeGreaterThan(0.5);
    expect(ending("survivor")).toBeGreaterThanOrEqual(5);
  });

  it("gives exactly the taxa of the shallow-water guild an early end", () => {
    for (const { guild, end } of truth.taxa) expect(end === "early").toBe(guild === "shallow-water");
  });

  it("puts the early step 3.2 m below the event in the expanded section", () => {
    const ends = trueLevels(truth).filter(
      ({ section, end }) => section === "orskel-ledge" && end === "early",
    );
    for (const { lastM } of ends) expect(lastM).toBeCloseTo(28.86 - 3.2, 9);
  });

  it("takes the time of the missing rock out of the heights at the hiatus alone", () => {
    const { section } = dataOf("nirrel-cut");
    const cut = smearBaseM(section);
    expect(heightAtKa(section, -20)).toBe(cut);
    expect(kaAtHeight(section, cut + 1e-9) - kaAtHeight(section, cut - 1e-9)).toBeCloseTo(30, 5);
    expect(heightAtKa(section, kaAtHeight(section, 4.2))).toBeCloseTo(4.2, 9);
  });
});

describe("the sections", () => {
  it("hold 60 to 200 samples each, many of them barren", () => {
    for (const { samples, searches, finds } of data) {
      expect(samples.length).toBeGreaterThanOrEqual(60);
      expect(samples.length).toBeLessThanOrEqual(200);
      const fruitful = new Set(finds.map(({ sample, taxon }) => `${sample.code} ${taxon.group}`));
      expect(fruitful.size / searches.length).toBeLessThan(0.85);
    }
  });

  it("have no sample in covered rock, lost core or rock not searched", () => {
    for (const { section, samples } of data) {
      const sign = section.axis === "depth" ? -1 : 1;
      for (const gap of section.intervals) {
        const inside = samples.filter(({ base, top }) => base < sign * gap.top && top > sign * gap.base);
        expect(inside).toEqual([]);
      }
    }
  });

  it("are cut in slabs without a gap from below the smear to above its tail", () => {
    for (const { section, samples, measurements } of data) {
      const slabs = samples.filter(({ kind }) => kind === "slab").toSorted((a, b) => a.base - b.base);
      slabs.slice(1).forEach((slab, index) => expect(slab.base).toBeCloseTo(slabs[index]?.top ?? 0, 9));
      expect(slabs[0]?.heightM).toBeLessThan(smearBaseM(section));
      expect(slabs.at(-1)?.heightM).toBeGreaterThan(smearBaseM(section) + 3 * section.mixingLengthM);
      const measured = measurements.filter(
        ({ analyte, sample }) => analyte === "iridium" && slabs.includes(sample),
      );
      expect(measured.length).toBe(slabs.length);
    }
  });

  it("give back the fluence of the truth when the slabs above background are summed", () => {
    for (const { section, measurements } of data) {
      const perUnit = section.iridium.unit === "pg/g" ? 0.001 : 1;
      const cmPer = { m: 100, cm: 1, ft: 30.48 }[section.unit];
      const excess = measurements
        .filter(({ analyte, sample }) => analyte === "iridium" && sample.kind === "slab")
        .map(({ value, sample }) => {
          const content = value.startsWith("<") ? section.iridium.background : Number(value) * perUnit;
          return (
            (content - section.iridium.background) * sample.densityGCm3 * (sample.top - sample.base) * cmPer
          );
        });
      const fluence = excess.reduce((sum, part) => sum + part, 0);
      expect(fluence / section.fluenceNgCm2).toBeGreaterThan(0.9);
      expect(fluence / section.fluenceNgCm2).toBeLessThan(1.1);
    }
  });
});

describe("the finds", () => {
  it("lie within the true ranges, but for mixing and the reworked specimens that the truth names", () => {
    for (const { section, finds } of data) {
      const levels = new Map(
        trueLevels(truth).flatMap((level) =>
          level.section === section.section ? [[level.taxon, level]] : [],
        ),
      );
      for (const { sample, taxon, reworked } of finds) {
        const lastM = levels.get(taxon.name)?.lastM ?? Number.POSITIVE_INFINITY;
        const firstM = levels.get(taxon.name)?.firstM ?? Number.NEGATIVE_INFINITY;
        expect(sample.heightM).toBeGreaterThan(firstM - section.mixingLengthM);
        if (reworked === "") expect(sample.heightM).toBeLessThan(lastM + 6 * section.mixingLengthM);
      }
    }
  });

  it("let exactly one taxon reach the highest sample searched for its group in the expanded section", () => {
    const { searches, finds } = dataOf("orskel-ledge");
    const reaching = truth.groups.flatMap(({ group }) => {
      const ofGroup = searches.filter((search) => search.group.group === group);
      const top = ofGroup.reduce((a, b) => (b.sample.heightM > a.sample.heightM ? b : a)).sample;
      return finds.filter(({ sample, taxon }) => sample.code === top.code && taxon.group === group);
    });
    expect(reaching.map(({ taxon }) => taxon.name)).toEqual(["Dorvinella minima"]);
  });

  it("tail above the base of the smear with the mixing length of the layer", () => {
    const { section, samples } = dataOf("tamber-quarry");
    const base = smearBaseM(section);
    const isWithin = (from: number, to: number) => (heightM: number) =>
      heightM > base + from * section.mixingLengthM && heightM < base + to * section.mixingLengthM;
    const ended = new Set(truth.taxa.filter(({ end }) => end === "event").map(({ name }) => name));
    let [below, above] = [0, 0];
    for (let replicate = 0; replicate < 200; replicate++) {
      const searches = exampleSearches(truth, section, {
        samples,
        draws: drawsFor(replicate, 1, "searching"),
      });
      const draws = drawsFor(replicate, 1, "fossils");
      for (const find of exampleFinds({ truth: { ...truth, reworked: [] }, section, searches, draws })) {
        if (find.taxon.group !== "planktic microfossils" || !ended.has(find.taxon.name)) continue;
        if (isWithin(-1, 0)(find.sample.heightM)) below += 1;
        if (isWithin(1, 2)(find.sample.heightM)) above += 1;
      }
    }
    const expected = Math.exp(-1) - Math.exp(-2);
    expect(above / below).toBeGreaterThan(expected - 0.05);
    expect(above / below).toBeLessThan(expected + 0.05);
  });
});

describe("poisson", () => {
  it("has the mean it was asked for", () => {
    const draws = drawsFor(7, 0, "geochemistry");
    const sum = Array.from({ length: 4000 }, () => poisson(draws, 2.5)).reduce(
      (total, count) => total + count,
      0,
    );
    expect(sum / 4000).toBeCloseTo(2.5, 0);
    expect(Math.abs(sum / 4000 - 2.5)).toBeLessThan(4 * Math.sqrt(2.5 / 4000));
  });
});

import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { trueLevels } from "../../../datasets/veyra-shelf-truth/generator/study.ts";
import { analyse } from "../../../src/core/analysis.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import { covers, toldBy, writtenTruth } from "../../calibration/example-variants.ts";

const folder = fileURLToPath(new URL("../../../datasets/veyra-shelf/", import.meta.url));
const names = readdirSync(folder).filter((name) => /\.(?:csv|json)$/.test(name));
const analysis = analyse(
  readStudy(new Map(names.map((name) => [name, new Uint8Array(readFileSync(folder + name))]))),
);
const levels = trueLevels(writtenTruth);
const endOf = new Map(writtenTruth.taxa.map(({ name, end }) => [name, end]));
const sections = writtenTruth.sections.map(({ section }) => section);
const told = (section: string, set = "candidates") => toldBy(analysis, section, writtenTruth.horizon, set);

/** True offset of the early step from the event, m. */
function stepM(section: string): number {
  const eventM = writtenTruth.sections.find((one) => one.section === section)?.eventSurfaceM ?? Number.NaN;
  return (levels.find((one) => one.section === section && one.end === "early")?.lastM ?? Number.NaN) - eventM;
}

describe("the answers about the example", () => {
  it.each(["orskel-ledge", "tamber-quarry", "vs-2"])("give two pulses the most weight in %s", (section) => {
    expect(told(section).lead).toBe("pulses-2");
    expect(told(section).weights.get("pulses-2")).toBeGreaterThan(0.5);
  });

  it("hold both true levels in the intervals of the pulses where these lie far apart", () => {
    const answer = told("orskel-ledge");
    expect(answer.weights.get("pulses-2")).toBeGreaterThan(0.95);
    expect(covers(answer, "pulses-2", { pulse: 1, offsetM: stepM("orskel-ledge") })).toBe(true);
    expect(covers(answer, "pulses-2", { pulse: 2, offsetM: 0 })).toBe(true);
  });

  it("put every early taxon there in the earlier pulse, and nearly all others in the later", () => {
    const earlier = analysis.timing.membership.filter(
      (one) =>
        one.section === "orskel-ledge" &&
        one.set === "candidates" &&
        one.scenario === "pulses-2" &&
        one.pulse === 1,
    );
    const wrong = earlier.filter(
      ({ taxon, probability }) => (endOf.get(taxon) === "early") !== probability > 0.5,
    );
    expect(earlier.length).toBeGreaterThan(35);
    expect(wrong.filter(({ taxon }) => endOf.get(taxon) === "early")).toEqual([]);
    expect(wrong.length).toBeLessThanOrEqual(0.1 * earlier.length);
  });

  it("do not tell the steps apart where 0.4 m lie between them, and say so", () => {
    const answer = told("nirrel-cut");
    expect(Math.abs(stepM("nirrel-cut"))).toBeLessThan(0.5);
    expect(answer.lead).toBe("one-level");
    expect(answer.sentence).toContain("an earlier pulse besides is not excluded");
  });

  it.each(sections)("let one level lead for each guild in %s", (section) => {
    const openShelf = told(section, "open-shelf");
    expect(openShelf.lead).toBe("one-level");
    expect(openShelf.weights.get("one-level")).toBeGreaterThan(0.9);
    expect(told(section, "shallow-water").lead).toBe("one-level");
  });

  it("cover the true level of a guild in at least seven of eight sections and guilds", () => {
    const covered = sections.flatMap((section) => [
      covers(told(section, "open-shelf"), "single", { set: "open-shelf", offsetM: 0 }),
      covers(told(section, "shallow-water"), "single", { set: "shallow-water", offsetM: stepM(section) }),
    ]);
    expect(covered).toHaveLength(8);
    expect(covered.filter((is) => is === true).length).toBeGreaterThanOrEqual(7);
  });

  it("favour the layer of the event among the horizons where no other lies near", () => {
    for (const section of ["orskel-ledge", "vs-2"]) {
      const weights = told(section, "open-shelf").horizonWeights;
      expect(weights.get(writtenTruth.horizon)).toBeGreaterThan(0.9);
    }
  });
});

import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { analyse } from "../../../src/core/analysis.ts";
import { readStudy } from "../../../src/core/tables/read-study.ts";
import { findings } from "../../../src/report/findings/index.ts";
import { plain } from "../../../src/report/wordings/words.ts";

const folder = "datasets/veyra-shelf";
const files = new Map(readdirSync(folder).map((name) => [name, readFileSync(`${folder}/${name}`)]));
const all = findings(analyse(readStudy(files)));
const timing = (section: string, set: string) =>
  plain(
    all.find((one) => one.station === "timing" && one.section === section && one.set === set)?.sentence ?? [],
  );

describe("what the findings say of the example", () => {
  it("no finding claims that an end was sudden, simultaneous or an extinction", () => {
    const texts = all.flatMap((one) => [plain(one.sentence), ...one.weaknesses.map((w) => plain(w.words))]);
    expect(texts.length).toBeGreaterThan(100);
    expect(texts.filter((text) => /sudden|simultaneous|extinct/i.test(text))).toEqual([]);
  });

  it("what is not rejected is followed by the longest duration that is not excluded", () => {
    const text = timing("orskel-ledge", "open-shelf");
    expect(text).toMatch(
      /cannot be told from one level .* If they ended together, it was .* from veyra-impact \(95\u00a0%\)/,
    );
    expect(text).toMatch(/A local disappearance over .* cannot be excluded\.$/);
  });

  it("what is rejected names the assumption, the scenario of most weight and the level", () => {
    expect(timing("orskel-ledge", "candidates")).toMatch(
      /^One level is rejected for 39 candidates .* if recovery is constant; two pulses have (?:over.)?0\.9\d+ of the weight .* took at least 0\.79.m \(95\u00a0%\); one over up to /,
    );
  });

  it("a set whose finds thin out upward is told so first, with a bound that holds all the same", () => {
    expect(timing("nirrel-cut", "shallow-water")).toMatch(
      /^Finds of these taxa thin out upward: proof against that, a common level, if there is one, lies /,
    );
    expect(timing("nirrel-cut", "open-shelf")).not.toContain("thin out");
  });

  it("a level is said to lie higher where the samples above are small", () => {
    expect(timing("tamber-quarry", "candidates")).toContain("or higher, since the samples just above");
  });

  it("no level is trusted where last finds agree better than chance allows", () => {
    const text = timing("tamber-quarry", "open-shelf");
    expect(text).toContain("agree better than chance allows");
    expect(text).not.toContain("from veyra-impact (");
  });
});

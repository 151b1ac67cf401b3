import { describe, expect, it } from "vitest";
import { acceptedName, settleFinds } from "../../../../src/core/study/finds.ts";
import type { RockInterval } from "../../../../src/core/study/model.ts";
import { find, sampleAt, searchOf, sectionWith, studyOf, taxonOf, withTaxa } from "./sections.ts";

const reasonsOf = (study: ReturnType<typeof studyOf>) =>
  settleFinds(study).finds.map((f) => [f.heightM, f.used, f.reason]);

const intervalAt = { notes: "", origin: { file: "intervals.csv", row: 2 } };
const repeat = (more: Partial<RockInterval> = {}): RockInterval => ({
  kind: "fault-repeat",
  baseM: 3,
  topM: 5,
  ...intervalAt,
  ...more,
});
const mapped = (intervals: readonly RockInterval[], ...heights: readonly number[]) =>
  studyOf(sectionWith({ intervals, occurrences: heights.map((height) => find("Orvella tenuis", height)) }), {
    settings: withTaxa({ faultRepeat: "map" }),
  });

describe("which finds count", () => {
  it("counts horizons, not specimens: finds of one sample are one horizon", () => {
    const s1 = sampleAt("S1", 1);
    const section = sectionWith({
      samples: [s1],
      searches: [searchOf(s1, "ammonoids")],
      occurrences: [
        find("Orvella tenuis", 1, { sample: "S1" }),
        find("Orvella tenuis", 1, { sample: "S1", count: 7 }),
      ],
    });
    const { taxa, finds } = settleFinds(studyOf(section, { taxa: [taxonOf("Orvella tenuis", "ammonoids")] }));
    expect(taxa[0].heightsM).toEqual([1]);
    expect(taxa[0].samples).toEqual(["S1"]);
    expect(finds.map((f) => f.used)).toEqual(["yes", "merged"]);
  });

  it("a count of 0 is looked for and not found, never a find", () => {
    const study = studyOf(sectionWith({ occurrences: [find("Orvella tenuis", 1, { count: 0 })] }));
    expect(settleFinds(study).taxa).toEqual([]);
    expect(reasonsOf(study)).toEqual([[1, "no", "zero-count"]]);
  });

  it("reads cf. and ? only inclusively, aff. and sp. never", () => {
    const occurrences = [
      find("Orvella tenuis", 1),
      find("Orvella tenuis", 2, { qualifier: "cf." }),
      find("Orvella tenuis", 3, { qualifier: "?" }),
      find("Orvella tenuis", 4, { qualifier: "aff." }),
      find("Orvella tenuis", 5, { qualifier: "sp." }),
    ];
    const strict = settleFinds(studyOf(sectionWith({ occurrences })));
    expect(strict.taxa[0].heightsM).toEqual([1]);
    expect(strict.taxa[0].lastInclusiveM).toBe(3);
    const settings = withTaxa({ identification: "inclusive" });
    const inclusive = settleFinds(studyOf(sectionWith({ occurrences }), { settings }));
    expect(inclusive.taxa[0].heightsM).toEqual([1, 2, 3]);
    expect(inclusive.taxa[0].lastStrictM).toBe(1);
  });

  it("a species group stands for itself", () => {
    const section = sectionWith({
      occurrences: [find("Orvella tenuis", 1), find("Orvella tenuis", 2, { qualifier: "ex gr." })],
    });
    expect(settleFinds(studyOf(section)).taxa.map((t) => t.taxon)).toEqual([
      "Orvella tenuis",
      "Orvella tenuis ex gr.",
    ]);
  });

  it.each([
    ["exclude", [1]],
    ["exclude-yes", [1, 2]],
    ["include", [1, 2, 3]],
  ] as const)("reworked %s", (reworked, heights) => {
    const occurrences = [
      find("Orvella tenuis", 1),
      find("Orvella tenuis", 2, { reworked: "suspected" }),
      find("Orvella tenuis", 3, { reworked: "yes" }),
    ];
    const study = studyOf(sectionWith({ occurrences }), { settings: withTaxa({ reworked }) });
    expect(settleFinds(study).taxa[0].heightsM).toEqual(heights);
  });

  it("a reworked find is never in place, whatever the settings count", () => {
    const occurrences = [find("Orvella tenuis", 1), find("Orvella tenuis", 3, { reworked: "yes" })];
    const study = studyOf(sectionWith({ occurrences }), { settings: withTaxa({ reworked: "include" }) });
    expect(settleFinds(study).taxa[0]).toMatchObject({ heightsM: [1, 3], lastStrictM: 1 });
  });

  it("a taxon of its own takes the group of its name", () => {
    const occurrences = [find("Orvella tenuis", 1, { qualifier: "s.l." })];
    const study = studyOf(sectionWith({ occurrences }), { taxa: [taxonOf("Orvella tenuis", "ammonoids")] });
    expect(settleFinds(study).taxa[0]).toMatchObject({ taxon: "Orvella tenuis s.l.", group: "ammonoids" });
  });

  it("sets aside finds in covered rock and in a repeated passage, and says which", () => {
    const interval = { notes: "", origin: { file: "intervals.csv", row: 2 } };
    const section = sectionWith({
      intervals: [
        { kind: "covered", baseM: 1, topM: 2, ...interval },
        { kind: "fault-repeat", baseM: 3, topM: 4, ...interval },
      ],
      occurrences: [find("Orvella tenuis", 1), find("Orvella tenuis", 1.5), find("Orvella tenuis", 3.5)],
    });
    expect(reasonsOf(studyOf(section))).toEqual([
      [1, "yes", "used"],
      [1.5, "no", "no-recovery"],
      [3.5, "no", "fault-repeat"],
    ]);
  });

  describe("maps finds in a repeated passage where the settings say so", () => {
    it("to the stretch of equal length directly below", () => {
      const study = mapped([repeat()], 1.5, 3, 3.5, 4.5, 6);
      expect(reasonsOf(study)).toEqual([
        [1.5, "yes", "used"],
        [3, "yes", "used"],
        [1.5, "merged", "fault-repeat-mapped"],
        [2.5, "yes", "fault-repeat-mapped"],
        [6, "yes", "used"],
      ]);
      expect(settleFinds(study).taxa[0]).toMatchObject({ heightsM: [1.5, 2.5, 3, 6], lastStrictM: 6 });
    });

    it("as far down as the thicknesses say, where they agree", () => {
      expect(reasonsOf(mapped([repeat({ thicknessLowM: 3, thicknessHighM: 3 })], 3.5))).toEqual([
        [0.5, "yes", "fault-repeat-mapped"],
      ]);
    });

    it.each([
      [{ thicknessLowM: 2, thicknessHighM: 4 }],
      [{ thicknessLowM: 2 }],
      [{ thicknessHighM: 2 }],
      [{ thicknessLowM: 0, thicknessHighM: 0 }],
    ])("but sets them aside where nobody can say how far: %j", (thickness) => {
      expect(reasonsOf(mapped([repeat(thickness)], 3.5))).toEqual([[3.5, "no", "fault-repeat"]]);
    });

    it("through a passage that is itself a repeat, and never into rock that nobody could search", () => {
      const first = repeat({ baseM: 1, topM: 3 });
      expect(reasonsOf(mapped([repeat(), first], 3.5))).toEqual([[-0.5, "yes", "fault-repeat-mapped"]]);
      const covered = { ...repeat({ baseM: 1, topM: 3 }), kind: "covered" } as const;
      expect(reasonsOf(mapped([repeat(), covered], 3.5))).toEqual([[1.5, "no", "no-recovery"]]);
    });

    it("and leaves them in no sample, for theirs lies higher", () => {
      const [low, high] = [sampleAt("S1", 1), sampleAt("S2", 3.5)];
      const section = sectionWith({
        intervals: [repeat()],
        samples: [low, high],
        searches: [searchOf(low, "ungrouped"), searchOf(high, "ungrouped")],
        occurrences: [
          find("Orvella tenuis", 1, { sample: "S1" }),
          find("Orvella tenuis", 3.5, { sample: "S2" }),
        ],
      });
      const study = studyOf(section, { settings: withTaxa({ faultRepeat: "map" }) });
      expect(settleFinds(study).taxa[0]).toMatchObject({ heightsM: [1, 1.5], samples: ["S1", undefined] });
    });
  });

  it("follows synonyms and stops at a circle", () => {
    const taxa = new Map(
      [
        taxonOf("Palla vetus", "g", { accepted: "Palla nova" }),
        taxonOf("Palla nova", "g", { accepted: "Palla vera" }),
        taxonOf("Circa una", "g", { accepted: "Circa bis" }),
        taxonOf("Circa bis", "g", { accepted: "Circa una" }),
      ].map((t) => [t.name, t]),
    );
    expect(acceptedName("Palla vetus", taxa)).toBe("Palla vera");
    expect(acceptedName("Circa una", taxa)).toBe("Circa una");
  });

  it("a find in a sample not searched for its group has no sample", () => {
    const s1 = sampleAt("S1", 1);
    const section = sectionWith({
      samples: [s1],
      searches: [searchOf(s1, "bivalves")],
      occurrences: [find("Orvella tenuis", 1, { sample: "S1" })],
    });
    const { taxa } = settleFinds(studyOf(section, { taxa: [taxonOf("Orvella tenuis", "ammonoids")] }));
    expect(taxa[0].samples).toEqual([undefined]);
  });

  it("a name that is a property of every object is a name like others", () => {
    const section = sectionWith({ occurrences: [find("__proto__", 1), find("constructor", 2)] });
    expect(settleFinds(studyOf(section)).taxa.map((t) => t.taxon)).toEqual(["__proto__", "constructor"]);
  });

  it("a published range without finds brings its own number of horizons", () => {
    const range = {
      firstM: 1,
      lastM: 9,
      horizons: 12,
      counted: "horizons" as const,
      origin: { file: "r.csv", row: 2 },
    };
    const section = sectionWith({ publishedRanges: [{ taxon: "Orvella tenuis", ...range }] });
    const [taxon] = settleFinds(studyOf(section)).taxa;
    expect([taxon.heightsM, taxon.publishedHorizons]).toEqual([[1, 9], 12]);
  });
});

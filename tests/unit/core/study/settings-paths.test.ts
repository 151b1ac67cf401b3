import { describe, expect, it } from "vitest";
import { editDistance, suggestName } from "../../../../src/core/study/nearest.ts";
import { problemList } from "../../../../src/core/study/problem-list.ts";
import { readSettings } from "../../../../src/core/study/read-settings.ts";
import {
  knownSettingPaths,
  mergeSettings,
  partedAssignment,
  setSetting,
  settingPath,
} from "../../../../src/core/study/setting-path.ts";
import { defaultSettings } from "../../../../src/core/study/settings.ts";

const read = (raw: unknown) => {
  const problems = problemList();
  const settings = readSettings(raw, "settings.json", problems);
  return { settings, problems: problems.problems() };
};

describe("nearest names", () => {
  it("counts insertions, deletions and replacements", () => {
    expect(editDistance("kitten", "sitting")).toBe(3);
    expect(editDistance("", "abc")).toBe(3);
  });
  it("suggests a near name and nothing far", () => {
    expect(suggestName("occurences.csv", ["samples.csv", "occurrences.csv"])).toBe("occurrences.csv");
    expect(suggestName("zzzzzz", ["samples.csv"])).toBeUndefined();
  });
});

describe("settings", () => {
  it("writes every default out", () => {
    expect(read({})).toEqual({ settings: defaultSettings, problems: [] });
  });

  it("tells an unknown path with the nearest name, and a bad value with its path; the rest stands", () => {
    const { settings, problems } = read({
      seed: 7,
      taxa: { minimumHorizonz: 4, minimumHorizons: 5, reworked: "maybe" },
      confidence: 2,
    });
    expect(settings.seed).toBe(7);
    expect(settings.taxa.minimumHorizons).toBe(5);
    expect(settings.taxa.reworked).toBe("exclude");
    expect(settings.confidence).toBe(0.95);
    const told = problems.map(({ severity, code, column }) => [severity, code, column]);
    expect(told).toContainEqual(["error", "unknown-setting", "taxa.minimumHorizonz"]);
    expect(told).toContainEqual(["error", "bad-setting", "taxa.reworked"]);
    expect(told).toContainEqual(["error", "bad-setting", "confidence"]);
    expect(told).toHaveLength(3);
    expect(problems.find(({ code }) => code === "unknown-setting")?.mend).toContain("taxa.minimumHorizons");
  });

  it("falls back to the defaults where the whole is no object", () => {
    for (const raw of [null, 3, "text", []]) {
      const { settings, problems } = read(raw);
      expect(settings).toEqual(defaultSettings);
      expect(problems).toMatchObject([{ code: "bad-setting" }]);
    }
  });

  it("takes out a list of which one entry is bad", () => {
    const { settings, problems } = read({
      boundary: { horizon: "H", same: [{ name: "H", horizons: [["a"]] }] },
    });
    expect(settings.boundary).toEqual({ horizon: "H", same: [], weights: {}, picks: [] });
    expect(problems[0].column).toBe("boundary.same.0.horizons.0.1");
  });
});

describe("one setting by its path", () => {
  it("knows every path", () => {
    expect(knownSettingPaths()).toContain("taxa.minimumHorizons");
    expect(knownSettingPaths()).toContain("sections.unit");
    expect(knownSettingPaths()).not.toContain("taxa");
  });

  it("sets JSON, and text where the text is no JSON", () => {
    expect(setSetting({ seed: 1 }, "taxa.minimumHorizons", "4")).toEqual({
      kind: "set",
      settings: { seed: 1, taxa: { minimumHorizons: 4 } },
    });
    expect(setSetting(undefined, "boundary.horizon", "Veyra impact")).toEqual({
      kind: "set",
      settings: { boundary: { horizon: "Veyra impact" } },
    });
    expect(setSetting({}, "timing.sets.early", '["Orvella tenuis"]')).toEqual({
      kind: "set",
      settings: { timing: { sets: { early: ["Orvella tenuis"] } } },
    });
    expect(setSetting({}, "timing", "{}")).toMatchObject({ kind: "set" });
  });

  it("names the nearest for an unknown path", () => {
    expect(setSetting({}, "taxa.minimumHorizon", "4")).toEqual({
      kind: "unknown",
      path: "taxa.minimumHorizon",
      nearest: "taxa.minimumHorizons",
    });
    expect(setSetting({}, "seed.x", "4")).toMatchObject({ kind: "unknown" });
    expect(setSetting({}, "__proto__.x", "4")).toMatchObject({ kind: "unknown" });
  });

  it("merges part by part and replaces lists whole", () => {
    expect(mergeSettings({ seed: 1, taxa: { a: 1, b: [1, 2] } }, { taxa: { b: [3] } })).toEqual({
      seed: 1,
      taxa: { a: 1, b: [3] },
    });
  });
});

describe("a path with names of more than letters", () => {
  it("reaches a file whose name holds dots, and a header with brackets", () => {
    expect(setSetting({}, 'tables["my.file.csv"].decimal', "comma")).toEqual({
      kind: "set",
      settings: { tables: { "my.file.csv": { decimal: "comma" } } },
    });
    const path = settingPath(["tables", "my.file.csv", "columns", 'Depth "old" (ft)', "unit"]);
    expect(path).toBe('tables["my.file.csv"].columns["Depth \\"old\\" (ft)"].unit');
    expect(setSetting({}, path, "ft")).toMatchObject({
      settings: { tables: { "my.file.csv": { columns: { 'Depth "old" (ft)': { unit: "ft" } } } } },
    });
  });

  it("parts at the first equals sign outside of quotes, and refuses what is not closed", () => {
    expect(partedAssignment('tables["a=b.csv"].section=Tarn=Cut')).toEqual([
      'tables["a=b.csv"].section',
      "Tarn=Cut",
    ]);
    expect(partedAssignment("=5")).toBeUndefined();
    for (const path of ['tables["a', "tables..x", "tables[a].decimal"])
      expect(setSetting({}, path, "comma")).toMatchObject({ kind: "unknown" });
  });

  it("names the nearest column for a choice that is none", () => {
    const { problems } = read({ tables: { finds: { columns: { Level: { is: "positon" } } } } });
    expect(problems).toMatchObject([{ code: "bad-setting", column: "tables.finds.columns.Level.is" }]);
    expect(problems[0]?.expected).toContain("did you mean position?");
  });
});

import { describe, expect, it } from "vitest";
import { changedSettings, withChanges } from "../../../../src/core/study/changed-settings.ts";
import { settingField } from "../../../../src/core/study/setting-field.ts";
import { knownSettingPaths } from "../../../../src/core/study/setting-path.ts";
import { defaultSettings } from "../../../../src/core/study/settings.ts";

describe("settings with some changed", () => {
  it("keep all else", () => {
    const changed = changedSettings(defaultSettings, [
      { path: ["ranges", "tail"], value: 2 },
      { path: ["timing", "window"], value: [-3, 4] },
    ]);
    expect(changed).toEqual({
      kind: "changed",
      settings: {
        ...defaultSettings,
        ranges: { ...defaultSettings.ranges, tail: 2 },
        timing: { ...defaultSettings.timing, window: [-3, 4] },
      },
    });
  });

  it("go back to the default where a value is taken out", () => {
    const other = { ...defaultSettings, confidence: 0.5 };
    expect(changedSettings(other, [{ path: ["confidence"] }])).toEqual({
      kind: "changed",
      settings: defaultSettings,
    });
  });

  it("that cannot be are refused with the path", () => {
    for (const value of [2, "high", -1])
      expect(changedSettings(defaultSettings, [{ path: ["confidence"], value }])).toMatchObject({
        kind: "refused",
        reason: expect.stringMatching(/^confidence: /),
      });
    expect(changedSettings(defaultSettings, [{ path: ["nothing"], value: 1 }]).kind).toBe("refused");
  });

  it("leave what they were made from alone", () => {
    const raw = { taxa: { scales: { a: { x: 1 } } } };
    withChanges(raw, [{ path: ["taxa", "scales"], value: {} }]);
    expect(raw).toEqual({ taxa: { scales: { a: { x: 1 } } } });
  });
});

describe("the field of a setting", () => {
  it("is of its kind, with its words and values", () => {
    expect(settingField("confidence")).toEqual({ kind: "number", words: "level of every interval" });
    expect(settingField("taxa.reworked")).toMatchObject({
      kind: "choice",
      options: ["exclude", "exclude-yes", "include"],
    });
    expect(settingField("ranges.base")?.kind).toBe("text");
    expect(settingField("timing.window")?.kind).toBe("parts");
    expect(settingField("timing.windows")).toBeUndefined();
  });

  it("is there for every setting, with words", () => {
    for (const path of knownSettingPaths()) expect(settingField(path)?.words, path).toBeTruthy();
  });
});

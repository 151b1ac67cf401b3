import { describe, expect, it } from "vitest";
import { applyEdits } from "../../../../src/app/tables/edits.ts";
import type { GivenTable } from "../../../../src/app/tables/given-table.ts";
import { heldEdits, NO_HISTORY, withStep } from "../../../../src/app/tables/history.ts";
import { keptStep, NEW_CHOICES } from "../../../../src/app/trial/kept-step.ts";
import { NO_TRIAL, withTried } from "../../../../src/app/trial/trial.ts";
import { defaultSettings } from "../../../../src/core/study/settings.ts";

const table: GivenTable = {
  file: "choices.csv",
  table: "choices",
  headers: ["reason", "no", "choice", "old", "new", "after_results"],
  columns: ["reason", "order", "choice", "old", "new", "after_results"],
  dialect: { encoding: "UTF-8", delimiter: ",", decimal: "point", missing: [], headerRows: [1], notes: [] },
  rows: [["seen in the field", "4", "boundary.horizon", "", "clay", "no"]],
  rowNumbers: [2],
  unread: new Map(),
};
const given = new Map(
  Object.entries({
    "choices.csv": "reason,no,choice,old,new,after_results\nseen in the field,4,boundary.horizon,,clay,no\n",
    "settings.json": '{"boundary":{"horizon":"clay"},"timing":{"priors":{"single":2}}}',
  }).map(([name, text]) => [name, new TextEncoder().encode(text)]),
);
const text = (files: ReadonlyMap<string, Uint8Array>, name: string) =>
  new TextDecoder().decode(files.get(name));
const settings = { ...defaultSettings, confidence: 0.95 };
const keep = (
  changes: Parameters<typeof keptStep>[0]["changes"],
  reason = "as others do",
  history = NO_HISTORY,
) => keptStep({ changes, settings, tables: [table], history, reason });
const written = (step: ReturnType<typeof keptStep>) =>
  applyEdits(given, step.edits, { forms: [table], keepsRowNumbers: false });

describe("a choice that was tried and is kept", () => {
  it("is a setting, and a row that says what was, what is and why, after results were seen", () => {
    const files = written(keep([{ path: ["confidence"], value: 0.9 }]));
    expect(text(files, "choices.csv").split("\n")[2]).toBe("as others do,5,confidence,0.95,0.9,yes");
    expect(JSON.parse(text(files, "settings.json"))).toEqual({
      boundary: { horizon: "clay" },
      timing: { priors: { single: 2 } },
      confidence: 0.9,
    });
  });

  it("takes the whole place of a part", () => {
    const files = written(keep([{ path: ["timing", "priors"], value: { gradual: 3 } }]));
    expect(JSON.parse(text(files, "settings.json")).timing).toEqual({ priors: { gradual: 3 } });
  });

  it("without a value is taken out, so that its default stands", () => {
    const files = written(keep([{ path: ["boundary", "horizon"] }]));
    expect(JSON.parse(text(files, "settings.json")).boundary).toEqual({});
  });

  it("counts on from choices that are not in the file yet", () => {
    const once = withStep(NO_HISTORY, keep([{ path: ["confidence"], value: 0.9 }]));
    const twice = withStep(once, keep([{ path: ["seed"], value: 7 }], "again", once));
    const files = applyEdits(given, heldEdits(twice), { forms: [table], keepsRowNumbers: false });
    expect(text(files, "choices.csv").trimEnd().split("\n").slice(2)).toEqual([
      "as others do,5,confidence,0.95,0.9,yes",
      "again,6,seed,1,7,yes",
    ]);
  });

  it("of picks names those that differ", () => {
    const pick = { section: "ledge", horizon: "clay", position: 12, below: 0, above: 0 };
    const step = keep([{ path: ["boundary", "picks"], value: [pick] }]);
    expect(step.edits).toContainEqual(
      expect.objectContaining({ kind: "cell", column: 4, now: JSON.stringify(pick) }),
    );
    expect(step.edits.some((edit) => edit.kind === "cell" && edit.column === 3)).toBe(false);
  });

  it("in a study without choices begins the table behind its header", () => {
    const step = keptStep({
      changes: [{ path: ["seed"], value: 7 }],
      settings,
      tables: [],
      history: NO_HISTORY,
      reason: "why not",
    });
    expect(step.edits).toContainEqual({ kind: "row-added", file: NEW_CHOICES.file, row: 2 });
    expect(NEW_CHOICES.text).toBe("order,choice,old,new,reason,by,after_results\n");
  });
});

describe("what is tried", () => {
  const change = { path: ["confidence"], value: 0.8 };

  it("holds each setting once, and none that is as it was", () => {
    const tried = withTried(withTried(NO_TRIAL, change, settings), { ...change, value: 0.7 }, settings);
    expect(tried.changes).toEqual([{ path: ["confidence"], value: 0.7 }]);
    expect(withTried(tried, { ...change, value: 0.95 }, settings).changes).toEqual([]);
  });
});

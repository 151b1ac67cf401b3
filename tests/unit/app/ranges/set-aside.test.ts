import { expect, it } from "vitest";
import { listedFinds } from "../../../../src/app/ranges/listed-finds.ts";
import { asideStep, heldAside } from "../../../../src/app/ranges/set-aside.ts";
import { NO_HISTORY, withStep } from "../../../../src/app/tables/history.ts";
import type { Analysis } from "../../../../src/core/analysis-result.ts";
import type { Find } from "../../../../src/core/study/finds-result.ts";
import { analysisOf, section } from "../../../figures/plates/fixtures.ts";

const find = (row: number, heightM: number, parts: Partial<Find> = {}): Find => ({
  origin: { file: "occurrences.csv", row },
  section: "cliff",
  verbatim: "Aurea prima",
  accepted: "Aurea prima",
  heightM,
  used: "yes",
  reason: "used",
  ...parts,
});

const analysis: Analysis = {
  ...analysisOf([section("cliff")]),
  finds: [
    find(2, 1),
    find(3, 4),
    find(4, 9, { used: "no", reason: "reworked" }),
    find(5, 2, { section: "core" }),
  ],
};
const place = { analysis, section: "cliff", workedOn: NO_HISTORY, history: NO_HISTORY };

it("a find set aside is held with its height, and the same key takes it back", () => {
  const step = asideStep({ kind: "row", name: "occurrences.csv:3" }, place);
  if (step === undefined) throw new Error("the find cannot be set aside");
  const history = withStep(NO_HISTORY, step);
  expect(heldAside(history, "cliff")).toMatchObject([
    { row: "occurrences.csv:3", heightM: 4, taxon: "Aurea prima" },
  ]);
  expect(heldAside(history, "core")).toEqual([]);
  const back = asideStep({ kind: "row", name: "occurrences.csv:3" }, { ...place, history });
  if (back === undefined) throw new Error("the find cannot be taken back");
  expect(heldAside(withStep(history, back), "cliff")).toEqual([]);
});

it("a taxon set aside is all of its finds in the section, in one step", () => {
  const step = asideStep({ kind: "taxon", name: "Aurea prima" }, place);
  expect(step?.edits.map((edit) => ("row" in edit ? edit.row : undefined))).toEqual([2, 3, 4]);
  expect(step?.label).toBe("setting aside 3 finds of Aurea prima");
});

it("rows are known by their number before others were put above them", () => {
  const workedOn = withStep(NO_HISTORY, {
    label: "a row above",
    edits: [{ kind: "row-added", file: "occurrences.csv", row: 6, above: 2 }],
  });
  const step = asideStep(
    { kind: "row", name: "occurrences.csv:4" },
    { ...place, workedOn, history: workedOn },
  );
  expect(step?.edits).toMatchObject([{ kind: "row-set-aside", row: 3 }]);
});

it("nothing happens on a horizon or an unknown row", () => {
  expect(asideStep({ kind: "horizon", name: "rusty layer" }, place)).toBeUndefined();
  expect(asideStep({ kind: "row", name: "occurrences.csv:99" }, place)).toBeUndefined();
});

it("lists finds from above downward: those that count, those that do not and why, those set aside once", () => {
  const step = asideStep({ kind: "row", name: "occurrences.csv:3" }, place);
  const held = step === undefined ? [] : heldAside(withStep(NO_HISTORY, step), "cliff");
  const listed = listedFinds(analysis, { section: "cliff", taxon: "Aurea prima", held });
  expect(listed.map(({ heightM, isUsed, isHeld }) => [heightM, isUsed, isHeld])).toEqual([
    [9, false, false],
    [4, false, true],
    [1, true, false],
  ]);
  expect(listed[0]?.words).toBe("reworked");
});

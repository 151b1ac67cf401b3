import * as fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  allUndone,
  type EditStep,
  heldEdits,
  NO_HISTORY,
  redone,
  undone,
  withStep,
} from "../../../../src/app/tables/history.ts";

const typed = (row: number, was: string, now: string): EditStep => ({
  label: `row ${row}`,
  edits: [{ kind: "cell", file: "samples.csv", row, column: 0, was, now }],
});
const step = fc
  .record({ row: fc.nat(20), now: fc.string() })
  .map(({ row, now }) => typed(row, `${now}.`, now));

describe("the history of edits", () => {
  it("is the same after a step back and forward", () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 1 }), fc.nat(), (steps, back) => {
        const all = steps.reduce(withStep, NO_HISTORY);
        const times = back % (steps.length + 1);
        let now = all;
        for (let i = 0; i < times; i++) now = undone(now);
        expect(heldEdits(now)).toEqual(
          heldEdits(steps.slice(0, steps.length - times).reduce(withStep, NO_HISTORY)),
        );
        for (let i = 0; i < times; i++) now = redone(now);
        expect(now).toEqual(all);
      }),
    );
  });

  it("loses what was undone once something new is done, and no step that changes nothing counts", () => {
    const two = withStep(withStep(NO_HISTORY, typed(2, "a", "b")), typed(3, "c", "d"));
    const other = withStep(undone(two), typed(4, "e", "f"));
    expect(heldEdits(other)).toEqual([...typed(2, "a", "b").edits, ...typed(4, "e", "f").edits]);
    expect(redone(other)).toEqual(other);
    expect(withStep(undone(two), typed(4, "e", "e"))).toEqual(undone(two));
  });

  it("goes back to the tables as they were, and forward again", () => {
    const one = withStep(NO_HISTORY, typed(2, "a", "b"));
    expect(heldEdits(allUndone(one))).toEqual([]);
    expect(redone(allUndone(one))).toEqual(one);
  });
});

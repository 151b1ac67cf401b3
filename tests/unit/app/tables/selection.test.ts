import { describe, expect, it } from "vitest";
import { blockOf, FIRST_CELL, movedBy, type Selection } from "../../../../src/app/tables/selection.ts";

/** Rows 4, 0, 2 are shown in this order, of three columns. */
const view = { places: [4, 0, 2], columns: 3, pageRows: 2 };
const at = (place: number, column: number): Selection => ({
  anchor: { place, column },
  active: { place, column },
});
const after = (key: string, from: Selection, held: { isControl?: boolean; isShift?: boolean } = {}) =>
  movedBy({ key, isControl: false, isShift: false, ...held }, from, view);

describe("keys in a grid", () => {
  it("move along the rows as they are shown, and stop at the edges", () => {
    expect(after("ArrowDown", at(4, 1))).toEqual(at(0, 1));
    expect(after("ArrowDown", at(2, 1))).toEqual(at(2, 1));
    expect(after("ArrowLeft", at(0, 0))).toEqual(at(0, 0));
    expect(after("PageDown", at(4, 1))).toEqual(at(2, 1));
    expect(after("End", at(4, 0))).toEqual(at(4, 2));
    expect(after("ArrowUp", at(2, 2), { isControl: true })).toEqual(at(4, 2));
    expect(after("End", at(4, 0), { isControl: true })).toEqual(at(2, 2));
  });

  it("go on by Tab to the next row, and out of the table at its end", () => {
    expect(after("Tab", at(4, 2))).toEqual(at(0, 0));
    expect(after("Tab", at(0, 0), { isShift: true })).toEqual(at(4, 2));
    expect(after("Tab", at(2, 2))).toBeUndefined();
    expect(after("Tab", at(4, 0), { isShift: true })).toBeUndefined();
    expect(after("a", FIRST_CELL)).toBeUndefined();
  });

  it("stretch the block with Shift", () => {
    const stretched = after("ArrowRight", after("ArrowDown", at(4, 0), { isShift: true }) ?? FIRST_CELL, {
      isShift: true,
    });
    expect(stretched).toEqual({ anchor: { place: 4, column: 0 }, active: { place: 0, column: 1 } });
    expect(blockOf(stretched ?? FIRST_CELL, view.places)).toEqual({ rows: [0, 1], columns: [0, 1] });
  });

  it("find no cell in a view without rows", () => {
    expect(
      movedBy({ key: "ArrowDown", isControl: false, isShift: false }, at(0, 0), { ...view, places: [] }),
    ).toBe(undefined);
  });
});

// thickness-along-tape.csv: made by thickness_along_tape.py beside it, with plain vectors and no closed formula (Python 3).
// The first rows are the cases by which texts of field geology tell tape and dip apart (from memory: Compton 1985, Geology
// in the Field; Ragan 2009, Structural Geology, 4th edition): down and up the dip, along the strike, slope with and against it.
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { thicknessAlongTape } from "../../../../src/core/study/thickness-along-tape.ts";
import { readWrittenCsv } from "../../../../src/core/tables/csv.ts";

const cases = readWrittenCsv(
  readFileSync(new URL("thickness-along-tape.csv", import.meta.url), "utf8"),
).rows.map(([name, tape, tapeBearing, tapeSlope, dip, dipDirection, overturned, thickness]) => ({
  name,
  tape: Number(tape),
  angles: {
    tapeBearing: Number(tapeBearing),
    tapeSlope: Number(tapeSlope),
    dip: Number(dip),
    dipDirection: Number(dipDirection),
    isOverturned: overturned === "yes",
  },
  thickness: Number(thickness),
}));

const turned = (bearing: number) => (bearing + 37.5) % 360;

describe("thickness along a tape", () => {
  it.each(cases)("$name", ({ tape, angles, thickness }) => {
    expect(Math.abs(tape * thicknessAlongTape(angles) - thickness)).toBeLessThan(1e-12 * (1 + tape));
  });

  it("has the round values of right angles and of 30 degrees", () => {
    const east = { tapeBearing: 90, tapeSlope: 0, dip: 30, dipDirection: 90, isOverturned: false };
    expect(thicknessAlongTape(east)).toBeCloseTo(0.5, 15);
    expect(thicknessAlongTape({ ...east, tapeBearing: 270 })).toBeCloseTo(-0.5, 15);
    expect(thicknessAlongTape({ ...east, tapeBearing: 0 })).toBeCloseTo(0, 15);
    expect(thicknessAlongTape({ ...east, tapeSlope: 90, dip: 0 })).toBe(1);
    expect(thicknessAlongTape({ ...east, isOverturned: true })).toBeCloseTo(-0.5, 15);
  });

  it("is the same whatever north both bearings are read from, and turns with the way of the tape", () => {
    for (const { angles } of cases.slice(12)) {
      const magnetic = {
        ...angles,
        tapeBearing: turned(angles.tapeBearing),
        dipDirection: turned(angles.dipDirection),
      };
      expect(thicknessAlongTape(magnetic)).toBeCloseTo(thicknessAlongTape(angles), 12);
      const back = { ...angles, tapeBearing: (angles.tapeBearing + 180) % 360, tapeSlope: -angles.tapeSlope };
      expect(thicknessAlongTape(back)).toBeCloseTo(-thicknessAlongTape(angles), 12);
    }
  });

  it.each([
    { tapeBearing: 361 },
    { tapeSlope: 91 },
    { dip: -1 },
    { dip: 91 },
    { dipDirection: -1 },
    { dip: Number.NaN },
  ])("throws on an angle outside its range: %j", (wrong) => {
    const good = { tapeBearing: 0, tapeSlope: 0, dip: 0, dipDirection: 0, isOverturned: false };
    expect(() => thicknessAlongTape({ ...good, ...wrong })).toThrow(RangeError);
  });
});

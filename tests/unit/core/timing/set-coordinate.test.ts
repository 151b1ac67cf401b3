import { describe, expect, it } from "vitest";
import { recoveryCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { defaultSettings, type Settings } from "../../../../src/core/study/settings.ts";
import { candidateRanges } from "../../../../src/core/timing/range-data.ts";
import { recoveryOfSets, sharedRecoveryCautions } from "../../../../src/core/timing/set-coordinate.ts";
import { setsOf } from "../../../../src/core/timing/sets.ts";
import { candidate, covered, section, taxon } from "../ranges/small-study.ts";

const origin = { file: "recovery.csv", row: 2 };
const point = (heightM: number, recovery: number) => ({ group: "shells", heightM, recovery, origin });
const place = section({
  intervals: [covered(20, 22)],
  recovery: [point(0, 1), point(10, 1), point(10, 3), point(40, 3)],
});
const taxa = [
  taxon("Orbula alba", [2, 10, 18]),
  taxon("Orbula nigra", [4, 12, 20]),
  taxon("Spora rubra", [3, 5, 30], { group: "spores" }),
];
const ranges = candidateRanges(
  taxa.map((of) => candidate(of)),
  taxa,
  { base: { kind: "first" }, coordinate: recoveryCoordinate(place) },
);
const sets = setsOf(place.name, ranges, {});
const settings = (recovery: Settings["ranges"]["recovery"]) => ({
  ranges: { ...defaultSettings.ranges, recovery },
});
const by = (recovery: Settings["ranges"]["recovery"]) => recoveryOfSets(place, taxa, settings(recovery));
const cautions = (recovery: Settings["ranges"]["recovery"]) =>
  sharedRecoveryCautions(place.name, sets, settings(recovery));
const named = (name: string) => {
  const set = sets.find((s) => s.set === name);
  if (set === undefined) throw new Error(name);
  return set;
};

describe("the coordinate of a set of ranges", () => {
  it("is its group's where it is of one group", () => {
    const { set, coordinate } = by("table").inRecovery(named("group:shells"));
    const [alba, nigra] = set.ranges;
    expect((alba.last - alba.levels[1]) / (alba.levels[1] - alba.base)).toBeCloseTo(3, 12);
    expect(alba.base).toBeCloseTo(coordinate.toEffective(2), 12);
    expect(nigra.last).toBeCloseTo(coordinate.toEffective(20), 12);
    expect(nigra.levels[2]).toBeCloseTo(nigra.last, 12);
  });

  it("is that of constant recovery for several groups, with a caution, and without a source for the group", () => {
    const table = by("table");
    expect(table.inRecovery(named("candidates")).set).toBe(named("candidates"));
    expect(cautions("table")[0]).toMatchObject({
      code: "timing-recovery-not-shared",
      numbers: { names: "candidates" },
    });
    const spores = table.inRecovery(named("group:spores")).set.ranges[0];
    expect(spores.last - spores.base).toBeCloseTo(25, 12);
  });

  it("is left as it is under uniform recovery", () => {
    expect(by("uniform").inRecovery(named("group:shells")).set).toBe(named("group:shells"));
    expect(cautions("uniform")).toEqual([]);
  });
});

import type { Caution } from "../basis.ts";
import { type Coordinate, recoveryCoordinate } from "../ranges/coordinate.ts";
import { coordinateFor } from "../ranges/recovery.ts";
import type { LocalTaxon } from "../study/finds-result.ts";
import type { Section } from "../study/model.ts";
import type { Settings } from "../study/settings.ts";
import type { TaxonRange } from "./range-data.ts";
import type { SetOfRanges } from "./sets.ts";

export interface RecoveryOfSets {
  /** The set in the coordinate that its ranges share. */
  readonly inRecovery: <T extends SetOfRanges>(
    set: T,
  ) => { readonly set: T; readonly coordinate: Coordinate };
}

/**
 * The coordinate of each set of ranges under `ranges.recovery`. Recovery belongs to a group: a set of one group is judged
 * in the coordinate of that group; one of several groups has no coordinate in common and is judged with recovery constant
 * outside rock that could not be searched, which a caution tells.
 */
export function recoveryOfSets(
  section: Section,
  taxa: readonly LocalTaxon[],
  { ranges }: Pick<Settings, "ranges">,
): RecoveryOfSets {
  const constant = recoveryCoordinate(section);
  const known = new Map<string, Coordinate>();
  const coordinateOf = (group: string) => {
    const coordinate =
      known.get(group) ??
      coordinateFor({ section, group, taxa: taxa.filter((taxon) => taxon.group === group) }, ranges.recovery);
    known.set(group, coordinate);
    return coordinate;
  };
  return {
    inRecovery: (set) => {
      const [group, ...others] = groupsOf(set);
      if (ranges.recovery === "uniform" || group === undefined || others.length > 0)
        return { set, coordinate: constant };
      const coordinate = coordinateOf(group);
      return {
        set: { ...set, ranges: set.ranges.map((range) => inCoordinate(range, constant, coordinate)) },
        coordinate,
      };
    },
  };
}

/** Sets of several groups where recovery differs between groups. */
export function sharedRecoveryCautions(
  section: string,
  sets: readonly SetOfRanges[],
  { ranges }: Pick<Settings, "ranges">,
): Caution[] {
  const mixed = sets.filter((set) => groupsOf(set).length > 1);
  if (ranges.recovery === "uniform" || mixed.length === 0) return [];
  const numbers = { source: ranges.recovery, names: mixed.map(({ set }) => set).join(", ") };
  return [{ code: "timing-recovery-not-shared", section, numbers }];
}

function groupsOf({ ranges }: SetOfRanges): readonly string[] {
  return [...new Set(ranges.map(({ group }) => group))];
}

/** A range from one coordinate in another, by its heights. */
function inCoordinate(range: TaxonRange, from: Coordinate, to: Coordinate): TaxonRange {
  return {
    ...range,
    base: to.toEffective(range.baseM),
    last: to.toEffective(range.lastM),
    levels: range.levels.map((level) => to.toEffective(from.toHeight(level, "lower") ?? range.lastM)),
  };
}

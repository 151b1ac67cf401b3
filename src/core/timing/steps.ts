import type { Caution } from "../basis.ts";
import type { Settings } from "../study/settings.ts";
import type { TaxonRange } from "./range-data.ts";
import { earlyStep, groupPrefix, lateStep, type SetOfRanges, setOf } from "./sets.ts";

export interface Steps {
  readonly early: readonly TaxonRange[];
  readonly late: readonly TaxonRange[];
  /** Taxa that the declaration puts in both: they enter neither. */
  readonly both: readonly string[];
  /** Declared names that are no candidate and no group here. */
  readonly missing: readonly string[];
}

/** The candidates of `timing.steps`: by name, or by `group:<name>`. Undefined where no steps are declared. */
export function stepsOf(ranges: readonly TaxonRange[], { timing }: Settings): Steps | undefined {
  const { early, late } = timing.steps;
  if (early.length === 0 && late.length === 0) return undefined;
  const both = ranges.filter((range) => isIn(early, range) && isIn(late, range));
  const only = (names: readonly string[]) =>
    ranges.filter((range) => isIn(names, range) && !both.includes(range));
  const known = new Set(ranges.flatMap(({ taxon, group }) => [taxon, `${groupPrefix}${group}`]));
  return {
    early: only(early),
    late: only(late),
    both: both.map(({ taxon }) => taxon),
    missing: [...early, ...late].filter((name) => !known.has(name)),
  };
}

const isIn = (names: readonly string[], { taxon, group }: TaxonRange) =>
  names.includes(taxon) || names.includes(`${groupPrefix}${group}`);

/** Each step as a set of its own, so that one level within it is asked about beside their separation. */
export function stepSets(
  section: string,
  ranges: readonly TaxonRange[],
  settings: Settings,
): readonly SetOfRanges[] {
  const steps = stepsOf(ranges, settings);
  if (steps === undefined) return [];
  return [setOf(section, earlyStep, steps.early), setOf(section, lateStep, steps.late)].filter(
    (set) => set.ranges.length > 0,
  );
}

/** A declaration of steps that cannot be used as it stands in this section. */
export function stepCautions(section: string, ranges: readonly TaxonRange[], settings: Settings): Caution[] {
  const steps = stepsOf(ranges, settings);
  if (steps === undefined || ranges.length === 0) return [];
  const told = (code: string, names: readonly string[]): Caution[] =>
    names.length === 0 ? [] : [{ code, section, numbers: { taxa: names.length, names: names.join(", ") } }];
  return [...told("timing-steps-overlap", steps.both), ...told("timing-steps-incomplete", steps.missing)];
}

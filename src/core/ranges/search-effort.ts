import type { Section } from "../study/model.ts";
import type { SampledHorizon } from "./sampled-horizons.ts";

/** Effort at each level at which a group was looked for, in one unit; or why it is not known. */
export type SearchEffort =
  | { readonly kind: "known"; readonly efforts: readonly number[]; readonly unit: string }
  | { readonly kind: "unknown"; readonly reason: EffortReason };

export type EffortReason =
  | "no effort given"
  | "effort missing in some searches"
  | "efforts in different units";

/** The efforts of a group's sampled horizons, those of samples at one level added. */
export function searchEffort(
  section: Section,
  group: string,
  horizons: readonly Pick<SampledHorizon, "samples">[],
): SearchEffort {
  const searches = section.searches.filter((search) => search.group === group);
  const bySample = new Map(searches.map((search) => [search.sample, search.effort]));
  const efforts = horizons.map(({ samples }) =>
    samples.reduce<number | undefined>((sum, sample) => {
      const effort = bySample.get(sample);
      return sum === undefined || effort === undefined || !(effort > 0) ? undefined : sum + effort;
    }, 0),
  );
  const known = efforts.filter((effort) => effort !== undefined);
  if (known.length === 0) return { kind: "unknown", reason: "no effort given" };
  if (known.length < efforts.length) return { kind: "unknown", reason: "effort missing in some searches" };
  const units = new Set(searches.map(({ effortUnit }) => effortUnit ?? ""));
  if (units.size > 1) return { kind: "unknown", reason: "efforts in different units" };
  return { kind: "known", efforts: known, unit: [...units][0] };
}

/** True where efforts are known and differ: equal detection is then known to be wrong. */
export function isUnequal(effort: SearchEffort): effort is SearchEffort & { readonly kind: "known" } {
  return effort.kind === "known" && effort.efforts.some((e) => e !== effort.efforts[0]);
}

/** Where efforts are told for some searches but cannot be compared, the reason. */
export function effortsNotComparable(section: Section, group: string): EffortReason | undefined {
  const searches = section.searches.filter((search) => search.group === group);
  const horizons = searches.map(({ sample }) => ({ samples: [sample] }));
  const effort = searchEffort(section, group, horizons);
  return effort.kind === "known" || effort.reason === "no effort given" ? undefined : effort.reason;
}

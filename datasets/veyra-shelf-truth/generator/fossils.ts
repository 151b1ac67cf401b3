import { exp, expm1 } from "../../../src/core/numeric/elementary.ts";
import { between, type Draws } from "./draws.ts";
import type { ExampleSample } from "./sampling.ts";
import { heightAtKa, kaAtHeight } from "./scale.ts";
import type { TrueGroup, TrueSection, TrueTaxon, Truth } from "./truth.ts";

export interface ExampleSearch {
  readonly sample: ExampleSample;
  readonly group: TrueGroup;
  readonly effort: number;
}

export interface ExampleFind {
  readonly sample: ExampleSample;
  readonly taxon: TrueTaxon;
  readonly count: number;
  readonly reworked: "" | "suspected" | "yes";
}

/** Where a taxon truly begins and ends in a section, m; undefined: beyond the section. */
export interface TrueRange {
  readonly firstM?: number;
  readonly lastM?: number;
}

function endKa(taxon: TrueTaxon, truth: Truth): number | undefined {
  switch (taxon.end) {
    case "early":
      return truth.earlyStepKa;
    case "event":
      return truth.eventStepKa;
    case "survivor":
    case "aftermath":
    case "alone":
      return taxon.lastKa;
    default:
      return taxon.end satisfies never;
  }
}

/** The sea floor on which the first and the last of a taxon lay, before any mixing. */
export function trueRange(taxon: TrueTaxon, section: TrueSection, truth: Truth): TrueRange {
  const last = endKa(taxon, truth);
  const firstM = taxon.firstKa === undefined ? undefined : heightAtKa(section, taxon.firstKa);
  const lastM = last === undefined ? undefined : heightAtKa(section, last);
  return {
    ...(firstM === undefined || firstM < section.bottomM ? {} : { firstM }),
    ...(lastM === undefined || lastM > section.topM ? {} : { lastM }),
  };
}

const mixingLengthM = (group: TrueGroup, section: TrueSection): number =>
  group.mixingLengthM ?? section.mixingLengthM;

/** Share of the unmixed abundance at a height: box mixing carries fossils down by one mixing length and lets them tail upward. */
function presentShare(range: TrueRange, heightM: number, lengthM: number): number {
  const passed = (surfaceM: number) => Math.max(0, heightM - (surfaceM - lengthM)) / lengthM;
  const begun = range.firstM === undefined ? 1 : 1 - exp(-passed(range.firstM));
  const left = range.lastM === undefined ? 1 : exp(-passed(range.lastM));
  return begun * left;
}

function isSearchedIn(group: TrueGroup, sample: ExampleSample, draws: Draws): boolean {
  switch (group.search) {
    case "bulk":
      return sample.kind !== "hand";
    case "hand":
      return sample.kind === "hand";
    case "thin-section":
      return sample.kind === "bulk" && sample.lithology.includes("limestone") && draws.uniform() < 0.9;
    default:
      return group.search satisfies never;
  }
}

/** A thin slab yields as much less rock as it is thinner than the usual spacing, so that finds per metre stay even. */
function effortIn(group: TrueGroup, sample: ExampleSample, section: TrueSection, draws: Draws): number {
  const drawn = between(draws, group.effort[0], group.effort[1]);
  const scaled =
    sample.kind === "slab" ? drawn * ((sample.top - sample.base) / section.bulk.spacingBelow) : drawn;
  const step = sample.kind === "slab" ? 1 : group.effortStep;
  return Math.max(step, Math.round(scaled / step) * step);
}

/** Which group was looked for in which sample, and how hard. */
export function exampleSearches(
  truth: Truth,
  section: TrueSection,
  context: { readonly samples: readonly ExampleSample[]; readonly draws: Draws },
): ExampleSearch[] {
  const { samples, draws } = context;
  return samples.flatMap((sample) =>
    truth.groups
      .filter((group) => isSearchedIn(group, sample, draws))
      .map((group) => ({ sample, group, effort: effortIn(group, sample, section, draws) })),
  );
}

/** Recovery against its usual value at a moment. */
function recoveryAt({ recoveryByKa: knots }: Truth, ka: number): number {
  const after = knots.findIndex(([knotKa]) => knotKa >= ka);
  const upper = knots[after] ?? knots.at(-1);
  const lower = knots[after - 1] ?? upper;
  if (upper === undefined || lower === undefined) return 1;
  if (after <= 0 || upper[0] === lower[0]) return upper[1];
  return lower[1] + ((ka - lower[0]) * (upper[1] - lower[1])) / (upper[0] - lower[0]);
}

function findsIn(search: ExampleSearch, context: FossilContext): ExampleFind[] {
  const { truth, section, draws } = context;
  const { sample, group } = search;
  const relativeEffort = search.effort / group.standardEffort;
  const isBarren = draws.uniform() < truth.barrenShare;
  const preservation = isBarren ? 0 : between(draws, 0.8, 1.2) / (1 - truth.barrenShare);
  const trend = recoveryAt(truth, kaAtHeight(section, sample.heightM));
  return truth.taxa.flatMap((taxon): ExampleFind[] => {
    if (taxon.group !== group.group) return [];
    const [present, size] = [draws.uniform(), draws.exponential()];
    const share = presentShare(
      trueRange(taxon, section, truth),
      sample.heightM,
      mixingLengthM(group, section),
    );
    const chances = taxon.rate * section.recovery * trend * relativeEffort * preservation * share;
    if (present >= -expm1(-chances)) return [];
    const count = 1 + Math.floor(size * taxon.meanCount * Math.min(1, relativeEffort));
    return [{ sample, taxon, count, reworked: "" }];
  });
}

interface FossilContext {
  readonly truth: Truth;
  readonly section: TrueSection;
  readonly searches: readonly ExampleSearch[];
  readonly draws: Draws;
}

/** The specimens that the truth says were washed up into younger rock, each in the nearest sample searched for it. */
function reworkedFinds({ truth, section, searches }: FossilContext): ExampleFind[] {
  return truth.reworked
    .filter((specimen) => specimen.section === section.section)
    .map((specimen) => {
      const taxon = truth.taxa.find(({ name }) => name === specimen.taxon);
      if (taxon === undefined)
        throw new RangeError(`reworked: expected a taxon of the list, got ${specimen.taxon}`);
      const heightM = section.eventSurfaceM + specimen.aboveEventM;
      const distance = (search: ExampleSearch) => Math.abs(search.sample.heightM - heightM);
      const nearest = searches
        .filter(({ group }) => group.group === taxon.group)
        .reduce((best, search) => (distance(search) < distance(best) ? search : best));
      return { sample: nearest.sample, taxon, count: 1, reworked: specimen.mark };
    });
}

/** Every find of a section in order of samples; a specimen already found in that sample is not found twice. */
export function exampleFinds(context: FossilContext): ExampleFind[] {
  const carried = reworkedFinds(context);
  return context.searches.flatMap((search) => {
    const added = carried.filter(
      ({ sample, taxon }) => sample.code === search.sample.code && taxon.group === search.group.group,
    );
    const inPlace = findsIn(search, context).filter(
      ({ taxon }) => !added.some((find) => find.taxon === taxon),
    );
    return [...inPlace, ...added];
  });
}

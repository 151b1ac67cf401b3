import type { Candidate, LocalTaxon } from "../study/finds-result.ts";
import type { Section, Study } from "../study/model.ts";
import { reachesTop } from "../study/roles.ts";
import { type RangesInput, sectionCases, type TaxonCases } from "./cases.ts";
import { caseUnder, type Leading, leadingMethods, marked } from "./leading.ts";
import { rangeMethods } from "./methods.ts";
import { turnedBack, turnedTaper } from "./mirrored.ts";
import type { RangeEnd, RangeMethod, Taper } from "./result.ts";
import { taperBy } from "./taper.ts";

// What a person asks of single ranges beside the whole analysis: another method, or other finds.

/** The analysis of which is asked. */
interface Asked extends RangesInput {
  readonly study: Study;
}

/** The tapers of one taxon beyond its last find and beneath its first; absent where the method says nothing. */
export interface RangeTapers {
  readonly taxon: string;
  readonly top?: Taper;
  readonly base?: Taper;
}

/**
 * The tapers of a section's taxa by one method, under the same gate as its ends, one taxon at a time: a slow method can be
 * left between two of them.
 *
 * @throws RangeError where the study has no such section.
 */
export function* tapersBy(
  asked: Asked,
  { section: name, method }: { readonly section: string; readonly method: RangeMethod },
): Generator<RangeTapers> {
  const { cases, atTop, atBase } = casesFor(sectionOf(asked.study, name), asked, method);
  for (const each of cases) {
    const top = taperBy(caseUnder(atTop, each.top), method);
    const base = taperBy(caseUnder(atBase, each.base), method);
    yield {
      taxon: each.top.taxon.taxon,
      ...(top === undefined ? {} : { top }),
      ...(base === undefined ? {} : { base: turnedTaper(base) }),
    };
  }
}

/** A find that is to count: its level, and the sample that it came from. */
export interface CountedFind {
  readonly heightM: number;
  readonly sample?: string;
}

interface OtherFinds {
  readonly section: string;
  readonly taxon: string;
  readonly method: RangeMethod;
  readonly finds: readonly CountedFind[];
}

/** Both ends of one taxon as they would be if these finds of it counted and no others; undefined without any find. */
export function endsWithFinds(
  asked: Asked,
  { section: name, taxon: of, method, finds }: OtherFinds,
): { readonly top: RangeEnd; readonly base: RangeEnd } | undefined {
  const section = sectionOf(asked.study, name);
  const isAsked = (one: LocalTaxon | Candidate) => one.section === name && one.taxon === of;
  const local = asked.taxa.find(isAsked);
  const other = local && withFinds(local, finds);
  if (other === undefined) return undefined;
  const taxa = asked.taxa.map((one) => (isAsked(one) ? other : one));
  const candidates = asked.candidates.map((one) =>
    isAsked(one) ? { ...one, reachesTop: reachesTop(other, section) } : one,
  );
  const { cases, atTop, atBase } = casesFor(section, { ...asked, taxa, candidates }, method);
  const found = cases.find(({ top }) => top.taxon.taxon === of);
  if (found === undefined) return undefined;
  const [top, base] = [caseUnder(atTop, found.top), caseUnder(atBase, found.base)];
  return {
    top: marked(atTop, top, rangeMethods[method].end(top)),
    base: turnedBack(marked(atBase, base, rangeMethods[method].end(base))),
  };
}

function withFinds(local: LocalTaxon, finds: readonly CountedFind[]): LocalTaxon | undefined {
  const levels = new Map(finds.map(({ heightM, sample }) => [heightM, sample]));
  const heightsM = [...levels.keys()].toSorted((a, b) => a - b);
  if (heightsM.length === 0) return undefined;
  const { section, taxon, group, lastStrictM, counts } = local;
  const countAt = new Map(local.heightsM.map((heightM, i) => [heightM, counts?.[i]]));
  return {
    section,
    taxon,
    group,
    heightsM,
    samples: heightsM.map((heightM) => levels.get(heightM)),
    ...(counts === undefined ? {} : { counts: heightsM.map((heightM) => countAt.get(heightM)) }),
    ...(lastStrictM === undefined ? {} : { lastStrictM }),
    lastInclusiveM: heightsM[heightsM.length - 1],
  };
}

interface AskedCases {
  readonly cases: readonly TaxonCases[];
  readonly atTop: Leading;
  readonly atBase: Leading;
}

function casesFor(section: Section, { study, ...input }: Asked, method: RangeMethod): AskedCases {
  const { settings } = study;
  const ranges = { ...settings.ranges, methods: [method] };
  const cases = sectionCases(section, { ...study, settings: { ...settings, ranges } }, input);
  const candidates = cases.filter(({ isCandidate }) => isCandidate);
  const side = (end: "top" | "base") =>
    leadingMethods(
      candidates.map((each) => each[end]),
      [method],
    );
  return { cases, atTop: side("top"), atBase: side("base") };
}

function sectionOf({ sections }: Study, name: string): Section {
  const section = sections.find((candidate) => candidate.name === name);
  if (section === undefined) throw new RangeError(`asked ends: expected a section of the study, got ${name}`);
  return section;
}

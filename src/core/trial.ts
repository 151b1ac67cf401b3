import type { Analysis } from "./analysis-result.ts";
import { boundaryIn } from "./markers/boundary.ts";
import { givenHorizons } from "./markers/given-horizons.ts";
import { settleMainHorizon } from "./markers/main-horizon.ts";
import { pickedHorizons } from "./markers/picked-horizons.ts";
import type { MarkerHorizon, Markers } from "./markers/result.ts";
import { followedEnds } from "./ranges/followed-ends.ts";
import type { RangeEnd, RangeMethod, Ranges, Taper } from "./ranges/result.ts";
import { type SettledFinds, settleFinds } from "./study/finds.ts";
import type { LocalTaxon } from "./study/finds-result.ts";
import { groupBy } from "./study/grouping.ts";
import type { Section, Study } from "./study/model.ts";
import { assignRoles, markBelowCeiling } from "./study/roles.ts";
import type { Settings } from "./study/settings.ts";
import { exactAnswers, type LevelFacts, levelFacts } from "./timing/exact-answers.ts";
import type { Timing, TimingAnswer } from "./timing/result.ts";
import type { TimingInput } from "./timing/section-cases.ts";

/** A choice being tried: the settings as they would be, and what of the section is in view. */
export interface Tried {
  readonly settings: Settings;
  /** The set of taxa whose answers follow; without one, no question about assemblages does. */
  readonly set?: string;
  /** Methods whose ends follow. */
  readonly methods?: readonly RangeMethod[];
}

/**
 * The analysis with what is in view of one section worked out under other settings, as far as it has a closed form: the
 * main horizon, roles, tapers and ends, the exact answers about one set. All else stands as it was, so that it follows a
 * hand within a frame; the whole is `analyse` with the same settings.
 *
 * @throws RangeError where the study has no such section.
 */
export function followSection(analysis: Analysis, name: string): (tried: Tried) => Analysis {
  const section = analysis.study.sections.find((candidate) => candidate.name === name);
  if (section === undefined)
    throw new RangeError(`followSection: expected a section of the study, got ${name}`);
  const own = { ...analysis.study, sections: [section] };
  const settled = settleFinds(own);
  const settledUnder = (settings: Settings) =>
    isSame(settings.taxa, own.settings.taxa) ? settled : settleFinds({ ...own, settings });
  return (tried) => tryIn(section, { analysis, tried, settled: settledUnder(tried.settings) });
}

interface Trial {
  readonly analysis: Analysis;
  readonly tried: Tried;
  readonly settled: SettledFinds;
}

function tryIn(section: Section, { analysis, tried, settled }: Trial): Analysis {
  const study = { ...analysis.study, settings: tried.settings };
  const markers = markersUnder(analysis.markers, study);
  const assigned = rolesIn(section, { study, markers, settled });
  const changed = changedTaxa(analysis, section, { taxa: assigned.taxa, settings: tried.settings });
  const input = { ...assigned, markers, untrimmed: settled.taxa };
  const kept = <T extends { readonly section: string }>(all: readonly T[], now: readonly T[]) => [
    ...all.filter((one) => one.section !== section.name),
    ...now,
  ];
  return {
    ...analysis,
    study,
    markers,
    finds: kept(analysis.finds, assigned.finds),
    taxa: kept(analysis.taxa, assigned.taxa),
    candidates: kept(analysis.candidates, assigned.candidates),
    ranges: followedRanges(section, { analysis, tried, study, input, changed }),
    timing: followedTiming(section, { analysis, tried, study, input, changed }),
  };
}

interface Following {
  readonly analysis: Analysis;
  readonly tried: Tried;
  readonly study: Study;
  readonly input: TimingInput;
  readonly changed: ReadonlySet<string>;
}

function followedRanges(section: Section, { analysis, tried, study, input, changed }: Following): Ranges {
  const { ranges } = analysis;
  if (changed.size === 0 && tried.methods === undefined) return ranges;
  const now = followedEnds(section, study, { methods: tried.methods, tapersOf: changed, input });
  return {
    ...ranges,
    ends: now.ends.length === 0 ? ranges.ends : replaced(ranges.ends, now.ends, endKey),
    tapers: replaced(ranges.tapers, now.tapers, taperKey),
    baseTapers: replaced(ranges.baseTapers, now.baseTapers, taperKey),
  };
}

function followedTiming(section: Section, { analysis, tried, study, input, changed }: Following): Timing {
  const { timing } = analysis;
  if (tried.set === undefined) return timing;
  const asked = { section: section.name, set: tried.set, isCurveWanted: changed.size > 0 };
  const now = exactAnswers(study, input, asked);
  return {
    ...timing,
    answers: replaced(timing.answers, now.answers, answerKey),
    curves: replaced(timing.curves, now.curves, ({ section, set }) => `${section}\n${set}`),
  };
}

/** What is said of one level at which all taxa of a set might have ended; undefined where the section has no such set. */
export function askLevel(
  analysis: Analysis,
  asked: { readonly section: string; readonly set: string; readonly heightM: number },
): LevelFacts | undefined {
  return levelFacts(analysis.study, analysis, asked);
}

/** The horizons under other settings: given and picked ones anew, found ones as the last survey left them. */
function markersUnder(markers: Markers, { sections, settings }: Study): Markers {
  const { confidence, boundary } = settings;
  const horizons = sections.flatMap((section): MarkerHorizon[] => {
    const found = markers.horizons
      .filter((h) => h.section === section.name && h.source === "found")
      .map((h) => ({ ...h, horizon: h.name }));
    const automatic = [...givenHorizons(section, confidence), ...found];
    return [...automatic, ...pickedHorizons(section, boundary.picks, { automatic, level: confidence })];
  });
  const settled = settleMainHorizon(horizons, boundary);
  return { ...markers, horizons: settled.horizons, main: settled.main };
}

function rolesIn(
  section: Section,
  {
    study,
    markers,
    settled,
  }: { readonly study: Study; readonly markers: Markers; readonly settled: SettledFinds },
) {
  const boundary = boundaryIn(section.name, markers, study);
  const { settings } = study;
  const { candidates, taxa } = assignRoles({ section, taxa: settled.taxa, boundary, settings });
  const boundaries = new Map(boundary === undefined ? [] : [[section.name, boundary]]);
  return { finds: markBelowCeiling(settled.finds, candidates, boundaries), taxa, candidates };
}

const isSame = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/** The taxa of a section whose tapers another choice changes: all, or those whose finds count otherwise. */
function changedTaxa(
  { study, taxa: before }: Analysis,
  section: Section,
  { taxa, settings }: { readonly taxa: readonly LocalTaxon[]; readonly settings: Settings },
): ReadonlySet<string> {
  const { confidence, ranges } = settings;
  const isBaseOnHorizon = ranges.base !== "first" && ranges.base !== "section-bottom";
  const isRangeSame = study.settings.confidence === confidence && isSame(study.settings.ranges, ranges);
  if (!isRangeSame || isBaseOnHorizon) return new Set(taxa.map(({ taxon }) => taxon));
  const here = before.filter((one) => one.section === section.name);
  const known = new Map(here.map(({ taxon, heightsM }) => [taxon, heightsM]));
  const moved = taxa.filter(({ taxon, heightsM }) => !isSame(known.get(taxon), heightsM));
  return new Set(moved.map(({ taxon }) => taxon));
}

/** The rows with each group of them that is there anew in the place of the old one. */
function replaced<T>(old: readonly T[], now: readonly T[], keyOf: (row: T) => string): readonly T[] {
  const anew = groupBy(now, keyOf);
  const placed = new Set<string>();
  const rows = old.flatMap((row) => {
    const key = keyOf(row);
    const group = anew.get(key);
    if (group === undefined) return [row];
    if (placed.has(key)) return [];
    placed.add(key);
    return group;
  });
  return [...rows, ...[...anew].flatMap(([key, group]) => (placed.has(key) ? [] : group))];
}

const endKey = ({ section, taxon, end, method, identification }: RangeEnd): string =>
  [section, taxon, end, method, identification].join("\n");

const taperKey = ({ section, taxon }: Taper): string => `${section}\n${taxon}`;

const answerKey = ({ section, set, question, method }: TimingAnswer): string =>
  [section, set, question, method].join("\n");

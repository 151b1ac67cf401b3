import { toCommon } from "../../core/alignment/flatten.ts";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Measurement, RockInterval, Sample, Section } from "../../core/study/model.ts";
import { metres, offset, position } from "../../report/wordings/numbers.ts";

/** What lies under the reading line, in words. */
export interface ReadingFacts {
  readonly own: string;
  /** Said instead of the rest where the line lies above or below all of the section. */
  readonly beyond?: string;
  readonly fromHorizon?: string;
  readonly common?: string;
  readonly rock?: string;
  readonly sample?: string;
  /** Who was looked for in that sample, and who was found. */
  readonly search?: string;
  readonly iridium?: string;
}

/** Everything that the tables say about one height of a section. */
export function readingFacts(analysis: Analysis, section: Section, heightM: number): ReadingFacts {
  const main = analysis.markers.main.bySection.get(section.name);
  if (heightM > section.topM || heightM < section.bottomM)
    return { own: position(section, heightM), beyond: beyondWords(section, heightM) };
  const sample = nearest(section.samples, heightM);
  return {
    own: position(section, heightM),
    fromHorizon:
      main === undefined ? undefined : `${offset(heightM - main.positionM)} m from the main horizon`,
    common: commonWords(analysis, section, heightM),
    rock: rockWords(section, heightM),
    sample: sample && `${sample.name}${awayWords(sample.heightM - heightM)}`,
    search: sample && searchWords(analysis, section, sample),
    iridium: iridiumWords(analysis, section, heightM),
  };
}

function beyondWords({ title, bottomM, topM }: Section, heightM: number): string {
  return heightM > topM
    ? `${metres(heightM - topM)} m above the top of ${title}`
    : `${metres(bottomM - heightM)} m below the bottom of ${title}`;
}

function nearest<T extends { readonly heightM: number }>(
  items: readonly T[],
  heightM: number,
): T | undefined {
  let best: T | undefined;
  for (const item of items)
    if (best === undefined || Math.abs(item.heightM - heightM) < Math.abs(best.heightM - heightM))
      best = item;
  return best;
}

const awayWords = (awayM: number): string => {
  if (Math.abs(awayM) < 0.005) return "";
  return `, ${Math.abs(awayM).toFixed(2)} m ${awayM > 0 ? "above" : "below"}`;
};

function commonWords({ alignment }: Analysis, section: Section, heightM: number): string | undefined {
  const own = alignment.sections.find((candidate) => candidate.section === section.name);
  if (own === undefined) return undefined;
  const { common, commonHigh } = toCommon(own, heightM, { beyond: alignment.beyond });
  return commonHigh === undefined
    ? `common ${offset(common)} m`
    : `common ${offset(common)} to ${offset(commonHigh)} m`;
}

const intervalWords: Readonly<Record<RockInterval["kind"], string>> = {
  covered: "covered",
  "core-loss": "core lost",
  "not-searched": "not searched",
  "fault-cut": "cut by a fault",
  "fault-repeat": "repeated by a fault",
  slump: "slumped",
};

function rockWords(section: Section, heightM: number): string | undefined {
  const holds = ({ baseM, topM }: { baseM: number; topM: number }) => heightM >= baseM && heightM <= topM;
  const interval = section.intervals.find(holds);
  if (interval !== undefined) return intervalWords[interval.kind];
  return section.beds.find(holds)?.lithology;
}

/** Groups searched in the sample: those with a find first, then the barren ones. */
function searchWords(analysis: Analysis, section: Section, sample: Sample): string {
  const searched = new Set(section.searches.filter((s) => s.sample === sample.name).map((s) => s.group));
  if (searched.size === 0) return "not searched";
  const groups = new Map(analysis.taxa.map(({ taxon, group }) => [taxon, group]));
  const found = new Map<string, number>();
  for (const find of section.occurrences) {
    if (find.sample !== sample.name || find.count === 0) continue;
    const group = analysis.study.taxa.get(find.taxon)?.group ?? groups.get(find.taxon);
    if (group !== undefined) found.set(group, (found.get(group) ?? 0) + 1);
  }
  const finds = [...searched].flatMap((group) => (found.has(group) ? [`${group} ${found.get(group)}`] : []));
  const barren = [...searched].filter((group) => !found.has(group));
  const words = finds.length === 0 ? [] : [`taxa found: ${finds.join(", ")}`];
  if (barren.length > 0) words.push(`searched, barren for ${barren.join(", ")}`);
  return words.join("; ");
}

function iridiumWords({ markers }: Analysis, section: Section, heightM: number): string | undefined {
  const measured = nearest<Measurement>(
    section.measurements.filter(({ analyte }) => analyte === "iridium"),
    heightM,
  );
  if (measured === undefined) return undefined;
  const judged = markers.profiles
    .find((profile) => profile.section === section.name && profile.analyte === "iridium")
    ?.samples.find((sample) => sample.heightM === measured.heightM);
  const flag = judged === undefined ? "" : judged.flagged ? ", above background" : ", within background";
  return `iridium ${measured.givenValue} ${measured.givenUnit}${awayWords(measured.heightM - heightM)}${flag}`;
}

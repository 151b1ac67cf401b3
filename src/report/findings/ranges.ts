import type { Analysis } from "../../core/analysis-result.ts";
import type { Role } from "../../core/study/finds-result.ts";
import type { Section } from "../../core/study/model.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { percent } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";

const roleWords: Readonly<Record<Role, string>> = {
  candidate: "Candidates: end in question",
  survivor: "Survivors, found above H",
  aftermath: "Aftermath, first found above H",
  "late-start": "Late starts",
  "too-few": "Too few horizons",
};

const roles: readonly Role[] = ["candidate", "survivor", "aftermath", "late-start", "too-few"];

/** Which taxa count in a section, and which could have lived to the main horizon. */
export function rangesFinding(analysis: Analysis, section: Section): Finding {
  const { candidates, ranges, study } = analysis;
  const here = candidates.filter((c) => c.section === section.name);
  const cautions = ranges.cautions.filter((c) => c.section === undefined || c.section === section.name);
  const counts = new Map<Role, number>();
  for (const candidate of here) counts.set(candidate.role, (counts.get(candidate.role) ?? 0) + 1);
  return {
    station: "ranges",
    section: section.name,
    sentence: sentence(analysis, section),
    numbers: roles
      .filter((role) => counts.has(role))
      .map((role) => ({ label: roleWords[role], value: String(counts.get(role)) })),
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: ranges.basis,
  };
}

export interface Reach {
  readonly taxa: number;
  readonly reaching: readonly string[];
  readonly short: readonly string[];
}

/** Which candidates' intervals by the leading method reach the main horizon at the study's confidence. */
export function reachOf({ candidates, ranges, study }: Analysis, section: Section): Reach {
  const reaching: string[] = [];
  const short: string[] = [];
  for (const candidate of candidates) {
    if (candidate.section !== section.name || candidate.role !== "candidate") continue;
    const ends = ranges.ends.filter(
      (end) => end.section === section.name && end.taxon === candidate.taxon && end.reachLevel !== undefined,
    );
    const leading = study.settings.ranges.methods
      .map((method) => ends.find((end) => end.method === method))
      .find((end) => end !== undefined);
    if (leading?.reachLevel === undefined) continue;
    (leading.reachLevel <= study.settings.confidence ? reaching : short).push(candidate.taxon);
  }
  return { taxa: reaching.length + short.length, reaching, short };
}

function sentence(analysis: Analysis, section: Section): Words {
  const main = analysis.markers.main.bySection.get(section.name);
  const counted = analysis.candidates.filter(
    (c) => c.section === section.name && c.role === "candidate",
  ).length;
  if (counted === 0) return say`No taxon of ${section.title} has an end in question.`;
  if (main === undefined)
    return say`${strong(plural(counted, "taxon", "taxa"))} of ${section.title} can be judged; the main horizon is not placed here.`;
  const { taxa, reaching } = reachOf(analysis, section);
  const level = percent(analysis.study.settings.confidence);
  return say`${strong(`${reaching.length} of ${taxa}`)} taxa whose end is in question in ${section.title} could have lived to the main horizon: their ${level} interval reaches it.`;
}

import type { Analysis } from "../../core/analysis-result.ts";
import type { RangeEnd } from "../../core/ranges/result.ts";
import type { Candidate, Role } from "../../core/study/finds-result.ts";
import type { Section } from "../../core/study/model.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { percent } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";

const roleWords: Readonly<Record<Role, string>> = {
  candidate: "Candidates: end in question",
  survivor: "Survivors: found above the main horizon",
  aftermath: "Aftermath: first found above it",
  "late-start": "Late starts: first found too high to count",
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

interface Reach {
  readonly taxa: number;
  readonly reaching: readonly string[];
  readonly short: readonly string[];
}

/** Which candidates' intervals by the leading method that tells reach the main horizon at the study's confidence. */
function reachOf({ candidates, markers, ranges, study }: Analysis, section: Section): Reach {
  const main = markers.main.bySection.get(section.name);
  const reaching: string[] = [];
  const short: string[] = [];
  const leadingTops = new Map<string, RangeEnd>();
  for (const end of ranges.ends) {
    if (end.end !== "top" || end.section !== section.name || end.reachLevel === undefined) continue;
    if (!leadingTops.has(end.taxon)) leadingTops.set(end.taxon, end);
  }
  for (const candidate of candidates) {
    if (candidate.section !== section.name || candidate.role !== "candidate") continue;
    const leading = leadingTops.get(candidate.taxon);
    if (main !== undefined && candidate.lastM >= main.positionM) reaching.push(candidate.taxon);
    if (leading?.reachLevel === undefined) continue;
    (leading.reachLevel <= study.settings.confidence ? reaching : short).push(candidate.taxon);
  }
  return { taxa: reaching.length + short.length, reaching, short };
}

function sentence(analysis: Analysis, section: Section): Words {
  const here = analysis.candidates.filter((c) => c.section === section.name);
  if (here.length === 0)
    return say`No find counts in ${section.title}: there are ${strong("no ranges")} here.`;
  const counted = here.filter((c) => c.role === "candidate").length;
  const opening = say`Of ${plural(here.length, "taxon", "taxa")} in ${section.title} ${strong(
    `${counted} ${counted === 1 ? "has its end" : "have their end"}`,
  )} in question${besideWords(here)}.`;
  if (counted === 0) return opening;
  if (analysis.markers.main.bySection.get(section.name) === undefined)
    return [...opening, ...say` The main horizon is not placed here.`];
  const { taxa, reaching } = reachOf(analysis, section);
  const level = percent(analysis.study.settings.confidence);
  return [
    ...opening,
    ...say` ${strong(`${reaching.length} of ${taxa}`)} could have lived to the main horizon: ${reaching.length === 1 ? "its" : "their"} ${level} interval reaches it.`,
  ];
}

const beside: readonly (readonly [role: Role, one: string, many: string])[] = [
  ["survivor", "survives", "survive"],
  ["aftermath", "begins above the main horizon", "begin above the main horizon"],
  ["late-start", "begins too late", "begin too late"],
  ["too-few", "has too few horizons", "have too few horizons"],
];

/** Why the others do not count: ` (7 survive, 6 begin above the main horizon)`. */
function besideWords(candidates: readonly Candidate[]): string {
  const parts = beside.flatMap(([role, one, many]) => {
    const count = candidates.filter((candidate) => candidate.role === role).length;
    return count === 0 ? [] : [`${count}\u00a0${count === 1 ? one : many}`];
  });
  return parts.length === 0 ? "" : ` (${parts.join(", ")})`;
}

import type { Analysis } from "../../core/analysis-result.ts";
import { recoveryStance } from "../../core/ranges/leading.ts";
import type { Candidate, Role } from "../../core/study/finds-result.ts";
import type { Section } from "../../core/study/model.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { inMetres, percent, pValue } from "../wordings/numbers.ts";
import { plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding, NumberLine } from "./finding.ts";
import { candidateTops, standings } from "./range-tops.ts";

const roleWords: Readonly<Record<Role, string>> = {
  candidate: "Candidates: end in question",
  survivor: "Survivors: found above the main horizon",
  aftermath: "Aftermath: first found above it",
  "late-start": "Late starts: first found too high to count",
  "too-few": "Too few horizons",
};

const roles: readonly Role[] = ["candidate", "survivor", "aftermath", "late-start", "too-few"];

/** Which taxa count in a section, what their ends say about the main horizon, and how much that leans on recovery. */
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
    numbers: [
      ...roles
        .filter((role) => counts.has(role))
        .map((role) => ({ label: roleWords[role], value: String(counts.get(role)) })),
      ...methodLines(analysis, section),
      ...leaningLines(analysis, section),
    ],
    weaknesses: cautions.map((c) => weaknessOf(c, study)),
    methods: ranges.basis,
  };
}

/** How the candidates' tops stand against the main horizon, method by method; the leading one first. */
function methodLines(analysis: Analysis, section: Section): readonly NumberLine[] {
  const main = analysis.markers.main.bySection.get(section.name);
  if (main === undefined) return [];
  const tops = candidateTops(analysis, section.name);
  const declines = declineOf(analysis, section) !== undefined;
  return tops.methods.map((method, place) => {
    const { reaches, open, short, untold } = standings(tops, method, main.positionM);
    const isTooShort = declines && recoveryStance(method) === "even-recovery";
    const notes = [
      place === 0 ? "leads" : "",
      isTooShort ? "too short where recovery declines" : "",
      untold > 0 ? `not told for ${untold}` : "",
    ].filter((note) => note !== "");
    return {
      label: `By ${method}`,
      value: `${reaches} reach, ${open} open, ${short} below`,
      ...(notes.length === 0 ? {} : { note: notes.join("; ") }),
    };
  });
}

/** How far the upper bounds move as the assumed shape of recovery changes. */
function leaningLines({ ranges, candidates }: Analysis, section: Section): readonly NumberLine[] {
  const asked = new Set(
    candidates.filter((c) => c.section === section.name && c.role === "candidate").map((c) => c.taxon),
  );
  const spreads = ranges.leanings
    .filter((one) => one.section === section.name && one.end === "top" && asked.has(one.taxon))
    .flatMap(({ nearestM, furthestM }) =>
      nearestM === undefined || furthestM === undefined ? [] : [furthestM - nearestM],
    )
    .toSorted((a, b) => a - b);
  const middle = spreads[Math.floor((spreads.length - 1) / 2)];
  if (middle === undefined) return [];
  return [
    {
      label: "Upper bounds move with the shape of recovery",
      value: `by ${inMetres(middle)} or less in half`,
      note: `from the nearest to the furthest bound, of ${plural(spreads.length, "taxon", "taxa")} with bounds`,
    },
  ];
}

/** The pre-check under the gate, where finds of the candidates together thin out upward. */
function declineOf({ ranges }: Analysis, section: Section): number | undefined {
  const found = ranges.cautions.find(
    (c) => c.code === "range-recovery-declines" && c.section === section.name,
  );
  return typeof found?.numbers?.p === "number" ? found.numbers.p : undefined;
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
  const main = analysis.markers.main.bySection.get(section.name);
  if (main === undefined) return [...opening, ...say` The main horizon is not placed here.`];
  return [...gateWords(analysis, section), ...opening, ...reachWords(analysis, section, main.positionM)];
}

/** What the pre-check says comes first: it decides which method leads. */
function gateWords(analysis: Analysis, section: Section): Words {
  const p = declineOf(analysis, section);
  if (p === undefined) return [];
  const [leading] = candidateTops(analysis, section.name).methods;
  return leading === undefined || recoveryStance(leading) === "even-recovery"
    ? say`${strong("Finds thin out upward")} (${pValue(p)}), so intervals that take recovery as even are too short. `
    : say`${strong("Finds thin out upward")} (${pValue(p)}), so ${leading}, which allows for that, leads. `;
}

function reachWords(analysis: Analysis, section: Section, mainM: number): Words {
  const tops = candidateTops(analysis, section.name);
  const [leading] = tops.methods;
  if (leading === undefined) return [];
  const { reaches, open, short, untold } = standings(tops, leading, mainM);
  const told = reaches + open + short;
  if (told === 0) return say` By ${leading} no end can be told.`;
  const level = percent(analysis.study.settings.confidence);
  const opened = open === 0 ? "" : `, ${open} of them without a bound inside the section`;
  const rest = untold === 0 ? "" : `; ${untold} cannot be told`;
  return say` By ${leading} at ${level} the intervals of ${strong(`${reaches + open} of ${told}`)} reach the main horizon${opened}; ${strong(
    `${short} ${short === 1 ? "ends" : "end"}`,
  )} below it${rest}.`;
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

import type { Analysis } from "../../core/analysis-result.ts";
import type { MarkerHorizon } from "../../core/markers/result.ts";
import type { Section } from "../../core/study/model.ts";
import { flagWords, refersToWords, weaknessOf } from "../wordings/cautions.ts";
import { inMetres, percent, position, positionInterval, significant } from "../wordings/numbers.ts";
import { say, strong, type Words } from "../wordings/words.ts";
import type { Finding, NumberLine } from "./finding.ts";

/** Where the marker horizons of a section lie, and what they rest on. */
export function markersFinding({ study, markers }: Analysis, section: Section): Finding {
  const here = markers.horizons.filter((h) => h.section === section.name);
  const main = markers.main.bySection.get(section.name);
  const found = here.filter((h) => h.source === "found");
  const flags = markers.flags.filter((flag) => flag.section === section.name);
  const cautions = markers.cautions.filter((c) => c.section === undefined || c.section === section.name);
  return {
    station: "markers",
    section: section.name,
    sentence: sentence(section, main, found),
    numbers: mainFirst(here, main).flatMap((h) => horizonLines(section, h, main)),
    weaknesses: [
      ...cautions.map((c) => weaknessOf(c, study)),
      ...flags.map((f) => ({ severity: "note" as const, words: flagWords(f) })),
    ],
    methods: markers.basis,
  };
}

function sentence(section: Section, main: MarkerHorizon | undefined, found: readonly MarkerHorizon[]): Words {
  if (main === undefined)
    return say`The main horizon is ${strong("not placed")} in ${section.title}: its taxa are judged against no marker.`;
  const place = strong(position(section, main.positionM, main.highM - main.lowM));
  const interval = positionInterval(section, main.lowM, main.highM);
  const within = main.level === 1 ? "within " : `${percent(main.level)}: `;
  const opening = say`In ${section.title} the main horizon lies at ${place} (${within}${interval}), `;
  const beside = found.find((h) => h !== main && h.horizon === main.horizon);
  if (main.source !== "found") {
    const own = say`as ${main.source}.`;
    if (beside === undefined) return [...opening, ...own];
    return [...opening, ...own, ...besideWords(beside, main)];
  }
  return [...opening, ...say`found by ${main.evidence}; it dates ${refersToWords(main.refersTo)}.`];
}

/** What was found of the same horizon, and how far from where it was given. */
function besideWords({ evidence, positionM }: MarkerHorizon, main: MarkerHorizon): Words {
  const awayM = positionM - main.positionM;
  const way = awayM < 0 ? "below" : "above";
  const place = awayM === 0 ? say`at the same level` : say`${strong(inMetres(Math.abs(awayM)))} ${way} it`;
  return say` The same horizon was found ${place}, by ${evidence}.`;
}

/** The main horizon and what was found of it, then the others from above downward. */
function mainFirst(
  horizons: readonly MarkerHorizon[],
  main: MarkerHorizon | undefined,
): readonly MarkerHorizon[] {
  const rank = (h: MarkerHorizon) => (h === main ? 0 : h.horizon === main?.horizon ? 1 : 2);
  return horizons.toSorted((a, b) => rank(a) - rank(b) || b.positionM - a.positionM);
}

function horizonLines(section: Section, h: MarkerHorizon, main: MarkerHorizon | undefined): NumberLine[] {
  const title = h === main ? `${h.name} (main horizon)` : h.name;
  const lines: NumberLine[] = [
    {
      label: title,
      value: position(section, h.positionM, h.highM - h.lowM),
      note: `${positionInterval(section, h.lowM, h.highM)}, ${h.source}, ${refersToWords(h.refersTo)}`,
    },
  ];
  if (h.enrichment !== undefined)
    lines.push({ label: "Enrichment", value: `${significant(h.enrichment)}\u00a0×` });
  if (h.fluence !== undefined)
    lines.push({
      label: "Fluence",
      value: `${significant(h.fluence.value)}\u00a0ng/cm²`,
      note: `${significant(h.fluence.low)} to ${significant(h.fluence.high)}`,
    });
  if (h.mixing !== undefined)
    lines.push({
      label: "Mixing length",
      value: `${significant(100 * h.mixing.lengthM)}\u00a0cm`,
      note: `${significant(100 * h.mixing.lowM)} to ${significant(100 * h.mixing.highM)}; base of the smear ${position(section, h.mixing.baseM, h.mixing.lengthM)}`,
    });
  return lines;
}

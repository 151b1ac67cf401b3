import type { Analysis } from "../../core/analysis-result.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { inMetres, metres, offset, position } from "../wordings/numbers.ts";
import { list, plural, say, strong, type Words } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";

/** How the sections hang together. */
export function fenceFinding(analysis: Analysis): Finding {
  const { study, alignment } = analysis;
  const { datum } = alignment;
  return {
    station: "fence",
    sentence: sentence(analysis),
    numbers: alignment.ties.map((tie) => {
      const section = study.sections.find((s) => s.name === tie.section);
      return {
        label: `${section?.title ?? tie.section}, ${tie.horizon}`,
        value: section === undefined ? metres(tie.positionM) : position(section, tie.positionM),
        ...(tie.horizon === datum ? {} : { note: `${offset(tie.residual)}\u00a0m against the common scale` }),
      };
    }),
    weaknesses: alignment.cautions.map((c) => weaknessOf(c, study)),
    methods: alignment.basis,
  };
}

function sentence({ study, alignment }: Analysis): Words {
  const { sections, datum, horizons } = alignment;
  const titleOf = (name: string) => study.sections.find((section) => section.name === name)?.title ?? name;
  if (study.sections.length === 0) return say`There is ${strong("no section")} to line up.`;
  if (study.sections.length === 1) return say`There is ${strong("one section")}: nothing to line up.`;
  if (sections.length === 0 || datum === undefined)
    return say`The sections are ${strong("not lined up")}: no horizon is shared between them yet.`;
  if (sections.length === 1)
    return say`Only ${titleOf(sections[0].section)} has ${strong(datum)}: the others ${strong("cannot be lined up")} with it yet.`;
  const others = horizons.length > 1 ? ` and ${list(horizons.filter((h) => h !== datum))}` : "";
  const leastCertainM = Math.max(...sections.flatMap((section) => section.sigmasM));
  return say`${strong(plural(sections.length, "section"))} hang on ${strong(datum)}${others}; the least certain pick is good to ${strong(
    `\u00b1${inMetres(leastCertainM)}`,
  )} (one standard deviation).`;
}

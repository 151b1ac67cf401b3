import type { Analysis } from "../../core/analysis-result.ts";
import { weaknessOf } from "../wordings/cautions.ts";
import { metres, offset, position } from "../wordings/numbers.ts";
import { list, plural, say, strong } from "../wordings/words.ts";
import type { Finding } from "./finding.ts";

/** How the sections hang together. */
export function fenceFinding({ study, alignment }: Analysis): Finding {
  const { sections, datum, horizons } = alignment;
  const sentence =
    sections.length === 0 || datum === undefined
      ? say`The sections are ${strong("not lined up")}: no horizon is shared between them yet.`
      : say`${strong(plural(sections.length, "section"))} ${sections.length === 1 ? "hangs" : "hang"} on ${strong(datum)}${
          horizons.length > 1 ? ` and ${list(horizons.filter((h) => h !== datum))}` : ""
        }; the least certain pick is good to ${strong(`\u00b1${metres(Math.max(...sections.flatMap((s) => s.sigmasM)))} m`)} (one standard deviation).`;
  return {
    station: "fence",
    sentence,
    numbers: alignment.ties.map((tie) => {
      const section = study.sections.find((s) => s.name === tie.section);
      return {
        label: `${section?.title ?? tie.section}, ${tie.horizon}`,
        value: section === undefined ? metres(tie.positionM) : position(section, tie.positionM),
        ...(tie.horizon === datum ? {} : { note: `${offset(tie.residual)} m against the common scale` }),
      };
    }),
    weaknesses: alignment.cautions.map((c) => weaknessOf(c, study)),
    methods: alignment.basis,
  };
}

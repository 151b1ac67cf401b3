import { toCommon } from "../../core/alignment/flatten.ts";
import type { Analysis } from "../../core/analysis-result.ts";
import { normalQuantile } from "../../core/numeric/normal.ts";
import type { Section } from "../../core/study/model.ts";
import { given } from "../wordings/rows.ts";
import { declare } from "./result-table.ts";

export const alignmentTable = declare({
  name: "alignment",
  title: "Sections on one scale",
  rows: alignedRows,
  columns: ({ text, number }) => [
    text("section", "section", (r) => r.section.name),
    number("position_m", "stratigraphic height, m", (r) => r.heightM),
    number("position_given", "the same in the section's own axis and unit", (r) =>
      given(r.section, r.heightM),
    ),
    text("side", "below or above, at a hiatus", (r) => r.side),
    number("common", "position on the common scale", (r) => r.common),
    number("low", "lower end of its interval", (r) => r.low),
    number("high", "upper end of its interval", (r) => r.high),
    number("level", "level of the interval", (r) => r.level),
    text("unit", "unit of the common scale", () => "m"),
  ],
});

export const tiesTable = declare({
  name: "ties",
  title: "Horizons that tie the sections",
  rows: (a) => a.alignment.ties,
  columns: ({ text, number }) => [
    text("section", "section", (t) => t.section),
    text("horizon", "shared horizon", (t) => t.horizon),
    number("position_m", "stratigraphic height, m", (t) => t.positionM),
    number("common", "position on the common scale, m", (t) => t.common),
    number("residual", "how much thicker this section is from the datum to here, m", (t) => t.residual),
  ],
});

function alignedRows({ study, alignment }: Analysis) {
  const level = study.settings.confidence;
  const z = normalQuantile((1 + level) / 2);
  return study.sections.flatMap((section) => {
    const own = alignment.sections.find((s) => s.section === section.name);
    if (own === undefined) return [];
    return levelsOf(section, own.heightsM).flatMap((heightM) => {
      const { common, sigma, commonHigh } = toCommon(own, heightM, { beyond: alignment.beyond });
      const row = (side: "" | "below" | "above", at: number) => ({
        section,
        heightM,
        side,
        common: at,
        low: at - z * sigma,
        high: at + z * sigma,
        level,
      });
      return commonHigh === undefined ? [row("", common)] : [row("below", common), row("above", commonHigh)];
    });
  });
}

/** Every sample, contact and shared horizon of a section, from below upward. */
function levelsOf(section: Section, horizons: readonly number[]): number[] {
  const samples = section.samples.map((sample) => sample.heightM);
  const contacts = section.beds.flatMap((bed) => [bed.baseM, bed.topM]);
  return [...new Set([...samples, ...contacts, ...horizons])].toSorted((a, b) => a - b);
}

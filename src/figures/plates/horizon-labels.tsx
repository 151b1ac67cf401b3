import type { Analysis } from "../../core/analysis-result.ts";
import type { MarkerHorizon } from "../../core/markers/result.ts";
import { formatGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";
import { type HeightScale, isInFrame, spanOf } from "../height-scale.ts";
import { spaceOut } from "../layout/space-out.ts";
import type { LegendEntry } from "../legend.tsx";
import { HorizonLine, type HorizonMark } from "../marks/horizon-line.tsx";
import { round } from "../numbers.ts";
import { PlateText } from "../plate-text.tsx";
import { fitText, textWidth } from "../text.ts";
import { COLOURS, TEXT } from "../theme.ts";
import { roundedWords } from "./rounded-words.ts";
import type { SectionFrame } from "./section-frame.ts";

/** A horizon as a plate draws it: its line, and two lines of words beside it. */
export interface DrawnHorizon extends HorizonMark {
  readonly name: string;
  /** Own position, or age. */
  readonly detail: string;
}

interface HorizonOptions {
  /** Draw the placing of the main horizon that was not chosen too, and the base of the smear. */
  readonly hasRivals?: boolean;
}

/** The horizons of a section, the main one first. */
export function drawnHorizons(
  analysis: Analysis,
  { section, main }: SectionFrame,
  { hasRivals = false }: HorizonOptions = {},
): readonly DrawnHorizon[] {
  const others = analysis.markers.horizons.filter(
    (horizon) =>
      horizon.section === section.name &&
      !isSame(horizon, main) &&
      (hasRivals || horizon.horizon !== main?.horizon),
  );
  return [
    ...(main ? [drawn(main, section, "main")] : []),
    ...others.map((horizon) => drawn(horizon, section, "other")),
    ...(hasRivals ? smearBases([main, ...others], section) : []),
  ];
}

function smearBases(
  horizons: readonly (MarkerHorizon | undefined)[],
  section: Section,
): readonly DrawnHorizon[] {
  return horizons.flatMap((horizon) => {
    if (horizon?.mixing === undefined || horizon.refersTo === "base-of-smear") return [];
    const { baseM, lengthM } = horizon.mixing;
    const detail = `${formatGiven(baseM, section)}, mixed over ${roundedWords(100 * lengthM)} cm`;
    return [
      { name: horizon.horizon, label: "base of the smear", detail, heightM: baseM, rank: "other" as const },
    ];
  });
}

function isSame(a: MarkerHorizon, b: MarkerHorizon | undefined): boolean {
  return b !== undefined && a.name === b.name && a.positionM === b.positionM && a.source === b.source;
}

const LONGEST = 128;
const DETAIL = TEXT.unit;

function drawn(horizon: MarkerHorizon, section: Section, rank: HorizonMark["rank"]): DrawnHorizon {
  const { positionM, lowM, highM, horizon: name, source } = horizon;
  const label = `${name} (${source})`;
  return {
    name,
    label: fitText(label, LONGEST, TEXT.labelStrong),
    detail: fitText(detailOf(horizon, section), LONGEST, DETAIL),
    heightM: positionM,
    lowM,
    highM,
    rank,
  };
}

const REFERS: Readonly<Record<MarkerHorizon["refersTo"], string>> = {
  "event-surface": "event surface, ",
  "base-of-smear": "base of the smear, ",
  contact: "contact, ",
  level: "",
};

function detailOf({ name, positionM, refersTo }: MarkerHorizon, section: Section): string {
  const given = section.horizons.find(
    (candidate) => candidate.name === name && candidate.heightM === positionM,
  );
  const position = `${REFERS[refersTo]}${formatGiven(positionM, section)}`;
  if (given?.ageMa === undefined) return position;
  const error = given.ageSigmaMa === undefined ? "" : ` ± ${trimmed(2 * given.ageSigmaMa)}`;
  return `${trimmed(given.ageMa)}${error} Ma, ${position}`;
}

function trimmed(value: number): string {
  return String(Number(value.toFixed(3)));
}

const LINE = 8.4;
const GAP = 2.6;
const LEAD = 10;

/** Room the labels need at the right of the body, in points. */
export function horizonLabelsWidth(horizons: readonly DrawnHorizon[]): number {
  const widths = horizons.flatMap(({ label, detail }) => [
    textWidth(label, TEXT.labelStrong),
    textWidth(detail, DETAIL),
  ]);
  return widths.length === 0 ? 0 : LEAD + Math.max(...widths);
}

interface HorizonsProps {
  /** Left and right end of the lines; the labels stand to the right. */
  readonly left: number;
  readonly right: number;
  readonly y: HeightScale;
  readonly horizons: readonly DrawnHorizon[];
}

/** Lines across the plate with their intervals, and labels at the right that never touch. */
export function Horizons({ left, right, y, horizons }: HorizonsProps) {
  const shown = horizons.filter((horizon) => isInFrame(y, horizon.heightM));
  const { top, bottom } = spanOf(y);
  const step = 2 * LINE + GAP;
  const kept = shown.slice(0, Math.max(1, Math.floor((bottom - top) / step)));
  const places = spaceOut(
    kept.map((horizon) => y(horizon.heightM)),
    step,
    [top + LINE, bottom - LINE],
  );
  return (
    <g>
      {shown.toReversed().map((horizon, i) => (
        <g key={`${horizon.label} ${horizon.heightM} ${i}`} data-horizon={horizon.name}>
          <HorizonLine x={left} width={right - left} y={y} horizon={{ ...horizon, label: "" }} />
        </g>
      ))}
      {kept.map((horizon, i) => (
        <HorizonWords
          key={`${horizon.label} ${horizon.heightM} ${i}`}
          {...{ horizon, right, y }}
          middle={places[i]}
        />
      ))}
    </g>
  );
}

interface HorizonWordsProps {
  readonly horizon: DrawnHorizon;
  readonly right: number;
  readonly y: HeightScale;
  readonly middle: number;
}

function HorizonWords({ horizon, right, y, middle }: HorizonWordsProps) {
  const colour = horizon.rank === "main" ? COLOURS.rust : COLOURS.ink;
  const lead = `M${round(right + 1)} ${round(y(horizon.heightM))}L${round(right + LEAD - 2)} ${round(middle)}`;
  return (
    <g data-horizon={horizon.name}>
      <path d={lead} fill="none" stroke={colour} strokeWidth={0.4} />
      <PlateText x={right + LEAD} y={middle - 1} style={TEXT.labelStrong} colour={colour}>
        {horizon.label}
      </PlateText>
      <PlateText x={right + LEAD} y={middle + LINE - 1.4} style={DETAIL} colour={COLOURS.soft}>
        {horizon.detail}
      </PlateText>
    </g>
  );
}

export function horizonLegend(horizons: readonly DrawnHorizon[]): readonly LegendEntry[] {
  return [
    ...(horizons.some((horizon) => horizon.rank === "main")
      ? [{ sign: { kind: "main-horizon" }, label: "main horizon and its interval" } as const]
      : []),
    ...(horizons.some((horizon) => horizon.rank === "other")
      ? [{ sign: { kind: "other-horizon" }, label: "other horizon" } as const]
      : []),
  ];
}

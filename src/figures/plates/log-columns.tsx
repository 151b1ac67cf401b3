import type { Analysis } from "../../core/analysis-result.ts";
import { FORMATION_WIDTH, FormationColumn, namedRock } from "../columns/formation-column.tsx";
import { LithologyColumn, lithologyPatterns } from "../columns/lithology-column.tsx";
import {
  type SearchedGroup,
  SearchRail,
  searchRailPatterns,
  searchRailWidth,
} from "../columns/search-rail.tsx";
import { HeightAxis, heightAxisWidth } from "../height-axis.tsx";
import type { LegendEntry } from "../legend.tsx";
import { lithologyLegend } from "../lithology/lithology-legend.ts";
import { COLOURS } from "../theme.ts";
import type { PlacedColumn, PlateColumn } from "./plate-columns.ts";
import { groupEntry, searchedGroups } from "./searched-groups.ts";
import type { SectionFrame } from "./section-frame.ts";

const LOG_WIDTH = 24;
const AXIS_GAP = 4;

/** The vertical axis, with the second reading at its left in small quiet figures. */
export function axisColumns(frame: SectionFrame): readonly PlateColumn[] {
  const axes = [
    ...(frame.second ? [{ key: "second-axis", ...frame.second, isQuiet: true }] : []),
    { key: "axis", ...frame.axis, isQuiet: false },
  ];
  return axes.map(({ key, scale, reading, isQuiet }) => {
    const width = heightAxisWidth(scale, reading);
    return {
      key,
      width,
      gap: AXIS_GAP,
      draw: (x) => <HeightAxis x={x + width} y={scale} reading={reading} isQuiet={isQuiet} />,
    };
  });
}

/** Formations, members and the log itself; nothing where no beds were logged. */
export function logColumns(plateId: string, { section, y, hidden }: SectionFrame): readonly PlateColumn[] {
  const { beds } = section;
  const names = [
    { key: "formation", units: namedRock(beds.map((bed) => ({ ...bed, name: bed.formation ?? "" }))) },
    { key: "member", units: namedRock(beds.map((bed) => ({ ...bed, name: bed.member ?? "" }))) },
  ];
  const named = names
    .filter(({ units }) => units.length > 0)
    .map(
      ({ key, units }): PlateColumn => ({
        key,
        width: FORMATION_WIDTH,
        gap: 0,
        draw: (x) => <FormationColumn x={x} y={y} units={units} />,
      }),
    );
  if (beds.length === 0 && hidden.length === 0) return named;
  const log: PlateColumn = {
    key: "log",
    width: LOG_WIDTH,
    gap: 6,
    draw: (x) => <LithologyColumn {...{ plateId, x: x + 2, y, beds, hidden }} width={LOG_WIDTH - 2} />,
    legend: [...rockLegend(beds, hidden), ...contactLegend(beds)],
    patterns: lithologyPatterns(beds, hidden),
  };
  return [...named, log];
}

function rockLegend(beds: SectionFrame["section"]["beds"], hidden: SectionFrame["hidden"]) {
  return lithologyLegend(
    beds.map((bed) => bed.lithology),
    hidden.map(({ kind }) => kind),
  );
}

function contactLegend(beds: SectionFrame["section"]["beds"]): readonly LegendEntry[] {
  const kinds = new Set(beds.map((bed) => bed.baseContact).filter((kind) => kind !== undefined));
  return [...kinds]
    .filter((contact) => contact !== "sharp")
    .map((contact) => ({ sign: { kind: "contact", contact }, label: `${contact} contact` }));
}

/** Who looked where: a lane per group of the study that was looked for in this section. */
export function railColumn(plateId: string, analysis: Analysis, frame: SectionFrame): readonly PlateColumn[] {
  const groups = searchedGroups(analysis, frame.section);
  if (groups.length === 0) return [];
  const { y, hidden } = frame;
  return [
    {
      key: "rail",
      width: searchRailWidth(groups.length),
      draw: (x) => <SearchRail {...{ plateId, x, y, groups, hidden }} />,
      legend: railLegend(groups),
      patterns: searchRailPatterns(hidden),
    },
  ];
}

function railLegend(groups: readonly SearchedGroup[]): readonly LegendEntry[] {
  const colour = COLOURS.soft;
  return [
    ...groups.map(({ name, sign }) => groupEntry(name, sign)),
    { sign: { kind: "found", colour }, label: "searched, found" },
    { sign: { kind: "barren", colour }, label: "searched, none found" },
  ];
}

/** Horizon lines begin beside the axis, so that its figures stay clear. */
export function lineLeft(placed: readonly PlacedColumn[]): number {
  const axis = placed.find((column) => column.key === "axis");
  return axis === undefined ? 0 : axis.x + axis.width;
}

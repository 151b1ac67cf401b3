import { recogniseColumns } from "../../study/columns.ts";
import { sections as declaration } from "../../study/tables/sections.ts";
import { type DarwinPlaces, eventId } from "./darwin-core-places.ts";
import { type DarwinRow, filledTerms } from "./darwin-core-rows.ts";
import { csvOf } from "./quoted-csv.ts";

/**
 * sections.csv of an archive whose events have parent events, or whose positions are measurements: names, coordinates, and
 * the axis and unit where all positions of a section share them. Undefined where the archive says nothing of its sections.
 */
export function sectionsText(
  events: readonly DarwinRow[],
  places: DarwinPlaces,
  headerLines: number,
): Uint8Array | undefined {
  const held = sectionsHeld(places);
  const parents = events.filter((row) => places.parents.has(eventId(row)) && held.has(eventId(row)));
  const scales = scalesOf(places);
  const listed = new Set(parents.map(eventId));
  const others = [...held].filter((name) => name !== "" && !listed.has(name));
  if (parents.length === 0 && scales.size === 0) return undefined;
  const known = recogniseColumns(filledTerms(parents), declaration).filter(
    ({ column }) => column !== undefined && !["section", "name", "bottom", "top"].includes(column),
  );
  const lines: (readonly string[])[] = [
    ["section", "name", "axis", "unit", ...known.map(({ column }) => column ?? "")],
  ];
  for (const row of parents) {
    while (lines.length < row.row + (headerLines > 0 ? 0 : 1) - 1) lines.push([""]);
    const id = eventId(row);
    const value = (term: string) => row.values.get(term) ?? "";
    lines.push([id, value("locality"), ...scaleOf(scales, id), ...known.map(({ header }) => value(header))]);
  }
  for (const name of others) lines.push([name, "", ...scaleOf(scales, name), ...known.map(() => "")]);
  return csvOf(lines);
}

/** Sections that hold samples or finds; an event above them (a survey, a project) is none. */
const sectionsHeld = ({ sections, parents }: DarwinPlaces): ReadonlySet<string> =>
  new Set([...sections].flatMap(([event, section]) => (parents.has(event) ? [] : [section])));

type Scales = ReadonlyMap<string, ReadonlySet<string>>;

/** Axis and unit of a section's measured positions, as `axis|unit`. */
function scalesOf({ positions, sections, events }: DarwinPlaces): Scales {
  const scales = new Map<string, Set<string>>();
  for (const [of, { axis, unit }] of positions) {
    const section = sections.get(of) ?? sections.get(events.get(of) ?? "");
    if (section === undefined) continue;
    const own = scales.get(section) ?? new Set<string>();
    scales.set(section, own.add(`${axis}|${unit}`));
  }
  return scales;
}

/** Blank where positions differ in axis or unit, or state none: nothing is assumed. */
function scaleOf(scales: Scales, section: string): readonly [string, string] {
  const [only, ...more] = scales.get(section) ?? [];
  if (only === undefined || more.length > 0) return ["", ""];
  const [axis, unit] = only.split("|");
  return [axis, unit];
}

import type { VerticalScale } from "../../figures/plates/drawing.ts";
import type { Station } from "../../report/findings/finding.ts";
import { type RangesPlace, rangesPlaceOf, writeRangesPlace } from "../ranges/ranges-place.ts";

/** The steps of the job, in working order. */
export const STATIONS: readonly { readonly id: Station; readonly title: string }[] = [
  { id: "tables", title: "Tables" },
  { id: "markers", title: "Markers" },
  { id: "fence", title: "Fence" },
  { id: "ranges", title: "Ranges" },
  { id: "timing", title: "Timing" },
];

export const SCALES: readonly VerticalScale[] = ["from-horizon", "own", "common"];

/** Where a person is: everything that belongs in the page's address. */
export interface Place {
  readonly station: Station;
  readonly section?: string;
  readonly set?: string;
  readonly scale: VerticalScale;
  /** At Tables: which sheet, which of its rows (as a spreadsheet counts), and the words looked for. */
  readonly table?: string;
  readonly row?: number;
  readonly find?: string;
  readonly ranges: RangesPlace;
}

/** The place an address names; what it does not name, or names wrongly, is the default. */
export function placeOf(hash: string): Place {
  const [path = "", query = ""] = hash.replace(/^#\/?/, "").split("?", 2);
  const words = new URLSearchParams(query);
  const text = (key: string) => words.get(key) || undefined;
  const row = Number(words.get("row"));
  return {
    station: STATIONS.find(({ id }) => id === path)?.id ?? "timing",
    section: text("section"),
    set: text("set"),
    scale: SCALES.find((scale) => scale === words.get("scale")) ?? "from-horizon",
    table: text("table"),
    row: Number.isInteger(row) && row > 0 ? row : undefined,
    find: text("find"),
    ranges: rangesPlaceOf(words),
  };
}

/** The address of a place: `#timing?section=...&set=...`. */
export function hashOf(place: Place): string {
  const isTables = place.station === "tables";
  const words = new URLSearchParams();
  const add = (key: string, value: string | number | undefined) => {
    if (value !== undefined && value !== "") words.set(key, String(value));
  };
  add("section", place.section);
  add("set", place.set);
  if (place.scale !== "from-horizon") add("scale", place.scale);
  if (isTables) {
    add("table", place.table);
    add("row", place.row);
    add("find", place.find);
  }
  writeRangesPlace(words, place.ranges);
  const query = words.toString();
  return `#${place.station}${query === "" ? "" : `?${query}`}`;
}

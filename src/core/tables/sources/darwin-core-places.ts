import type { StatedPosition } from "./darwin-core-positions.ts";
import { type DarwinRow, isFilled } from "./darwin-core-rows.ts";

/** Terms that name the section, the first that is filled. */
export const sectionTerms = ["parentEventID", "locality", "locationID"];

/** How the rows of an archive hang together. */
export interface DarwinPlaces {
  readonly hasEvents: boolean;
  /** Section of an event, or of an occurrence where there are no events. */
  readonly sections: ReadonlyMap<string, string>;
  /** Events that other events belong to: they are sections, not samples. */
  readonly parents: ReadonlySet<string>;
  /** Event of an occurrence. */
  readonly events: ReadonlyMap<string, string>;
  /** Positions measured on events and occurrences. */
  readonly positions: ReadonlyMap<string, StatedPosition>;
}

export const eventId = ({ id, values }: DarwinRow): string => (values.get("eventID") ?? id).trim() || id;

export function sectionOf(rows: readonly DarwinRow[]): (row: DarwinRow) => string {
  const term = sectionTerms.find((term) => isFilled(rows, term)) ?? "parentEventID";
  return ({ values }) => (values.get(term) ?? "").trim();
}

export function placesOf(
  events: readonly DarwinRow[],
  occurrences: readonly DarwinRow[],
  positions: ReadonlyMap<string, StatedPosition>,
): DarwinPlaces {
  const ids = new Set(events.map(eventId));
  const parents = new Set(
    events.flatMap(({ values }) => values.get("parentEventID") ?? []).filter((id) => ids.has(id)),
  );
  const rows = events.length > 0 ? events : occurrences;
  const section = sectionOf(rows);
  const sections = new Map(
    rows.flatMap((row) => [row.id, eventId(row)].map((id) => [id, section(row)] as const)),
  );
  const ofOccurrence = new Map(
    occurrences.flatMap(({ id, values }) => {
      const event = (values.get("eventID") ?? "").trim() || (events.length > 0 ? id : "");
      const own = (values.get("occurrenceID") ?? "").trim() || id;
      return event === "" || ids.has(own) ? [] : [[own, event] as const];
    }),
  );
  return { hasEvents: events.length > 0, sections, parents, events: ofOccurrence, positions };
}

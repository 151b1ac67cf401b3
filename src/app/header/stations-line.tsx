import type { KeyboardEvent, ReactElement } from "react";
import type { Station } from "../../report/findings/finding.ts";
import { usePage } from "../state/page-context.ts";
import { hashOf, STATIONS } from "../state/place.ts";
import { readState, STATE_WORDS, type StationState, stationState } from "../state/station-state.ts";
import styles from "./stations-line.module.css";

/** The line of work: every station with how far it is, told by shape and in words. */
export function StationsLine(): ReactElement {
  const { state, open, study } = usePage();
  const current = state.place.station;

  const stateOf = (station: Station): StationState => {
    if (open !== undefined) return stationState(station, open);
    return station === "tables" && study.readOut ? readState(study.readOut.study) : "waiting";
  };
  return (
    <nav className={styles.nav} aria-label="Stations">
      <ol className={styles.line}>
        {STATIONS.map(({ id, title }, index) => (
          <li key={id}>
            <a
              href={hashOf({ ...state.place, station: id })}
              aria-current={id === current ? "page" : undefined}
              aria-keyshortcuts={String(index + 1)}
              ref={id === current ? bringIntoView : undefined}
              onKeyDown={walk}
            >
              <StateSign state={stateOf(id)} />
              <span className={styles.title} data-title={title}>
                {title}
              </span>
              <span className={styles.words}>, {STATE_WORDS[stateOf(id)]}</span>
            </a>
          </li>
        ))}
      </ol>
    </nav>
  );
}

/** On a narrow page the line scrolls. */
function bringIntoView(link: HTMLElement | null): void {
  link?.scrollIntoView({ block: "nearest", inline: "center" });
}

/** Left and right arrows walk along the line. */
function walk(event: KeyboardEvent<HTMLElement>): void {
  const by = event.key === "ArrowRight" ? 1 : event.key === "ArrowLeft" ? -1 : 0;
  if (by === 0) return;
  const links = [...(event.currentTarget.closest("ol")?.querySelectorAll("a") ?? [])];
  const next = links[links.findIndex((link) => link === document.activeElement) + by];
  if (next === undefined) return;
  event.preventDefault();
  next.focus();
}

function StateSign({ state }: { readonly state: StationState }): ReactElement {
  return (
    <svg className={styles[state]} width="11" height="11" viewBox="0 0 11 11" aria-hidden="true">
      <title>{STATE_WORDS[state]}</title>
      {state === "done" && <circle cx="5.5" cy="5.5" r="4" fill="currentColor" />}
      {state === "look" && (
        <path
          d="M5.5 1.3L10 9.500H1z"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.6"
          strokeLinejoin="round"
        />
      )}
      {state === "waiting" && (
        <circle
          cx="5.5"
          cy="5.5"
          r="3.600"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.2"
          strokeDasharray="2 1.600"
        />
      )}
    </svg>
  );
}

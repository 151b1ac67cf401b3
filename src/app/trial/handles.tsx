import { type KeyboardEvent, type PointerEvent, type ReactElement, useRef } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { MarkerHorizon } from "../../core/markers/result.ts";
import type { Section } from "../../core/study/model.ts";
import type { Panel } from "../../figures/plates/drawing.ts";
import { position } from "../../report/wordings/numbers.ts";
import { extentOf, stepped } from "../plate/use-reading.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { askedWords } from "./asked-words.ts";
import styles from "./trial.module.css";
import { useTrial } from "./use-trial.ts";

interface HandlesProps {
  readonly open: Opened;
  readonly panels: readonly Panel[];
  readonly pixelsPerPoint: number;
}

/** What a hand can push on the plate of one section: its horizons, and at Timing one level asked about. */
export function Handles({ open, panels, pixelsPerPoint }: HandlesProps): ReactElement | null {
  const { state } = usePage();
  const trial = useTrial();
  const { focus, analysis } = open;
  const { section, station, set } = focus;
  const [panel] = panels;
  if (section === undefined || panel === undefined || panels.length > 1 || panel.section !== section.name)
    return null;
  const at = { panel, section, pixelsPerPoint };
  const level = state.trial.level?.section === section.name ? state.trial.level : undefined;
  return (
    <>
      {movable(analysis, panel, pixelsPerPoint).map((horizon) => (
        <Handle
          key={horizon.horizon}
          {...at}
          label={`Place ${horizon.horizon}`}
          kind={isMain(horizon, analysis) ? "main" : "other"}
          heightM={horizon.positionM}
          x={panel.right}
          move={(heightM) => trial.moveHorizon(section, horizon.horizon, heightM)}
          letGo={trial.letGo}
        />
      ))}
      {station === "timing" && set !== undefined && level !== undefined && (
        <>
          <LevelLine
            {...at}
            heightM={level.heightM}
            words={askedWords(analysis, section, { ...level, set: set.set })}
          />
          <Handle
            {...at}
            label="One level asked about"
            kind="level"
            heightM={level.heightM}
            x={panel.right - 26 / pixelsPerPoint}
            move={(heightM) => trial.askLevel(section, heightM)}
            letGo={trial.letGo}
          />
        </>
      )}
    </>
  );
}

interface At {
  readonly panel: Panel;
  readonly section: Section;
  readonly pixelsPerPoint: number;
}

interface HandleProps extends At {
  readonly label: string;
  readonly kind: "main" | "other" | "level";
  readonly heightM: number;
  readonly x: number;
  readonly move: (heightM: number) => void;
  readonly letGo: () => void;
}

function Handle({ panel, section, pixelsPerPoint, label, kind, heightM, x, move, letGo }: HandleProps) {
  const from = useRef<number>(undefined);
  const [lowest, highest] = extentOf(panel);
  const y = panel.scale(heightM);
  if (y < panel.top - 0.5 || y > panel.bottom + 0.5) return null;
  /** Points down the sheet, wherever the page has moved it. */
  const pointed = ({ clientY, currentTarget }: PointerEvent<HTMLElement>) =>
    (clientY - (currentTarget.parentElement?.getBoundingClientRect().top ?? 0)) / pixelsPerPoint;
  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    event.stopPropagation();
    event.currentTarget.setPointerCapture(event.pointerId);
    from.current = pointed(event) - y;
  };
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    if (from.current === undefined) return;
    event.stopPropagation();
    const next = panel.scale.invert(pointed(event) - from.current);
    move(Math.min(highest, Math.max(lowest, next)));
  };
  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    if (event.key === "Escape") letGo();
    const next = stepped(event, panel, heightM);
    if (next === undefined && event.key !== "Escape") return;
    event.preventDefault();
    event.stopPropagation();
    event.nativeEvent.stopPropagation();
    if (next !== undefined) move(next);
  };
  return (
    <div
      className={`${styles.handle} ${styles[kind] ?? ""}`}
      style={{ left: x * pixelsPerPoint, top: y * pixelsPerPoint }}
      // oxlint-disable-next-line jsx-a11y/prefer-tag-over-role -- a range input has no place at a height
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-orientation="vertical"
      aria-valuemin={lowest}
      aria-valuemax={highest}
      aria-valuenow={heightM}
      aria-valuetext={position(section, heightM)}
      title={`${label}: drag, or up and down arrows`}
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={() => {
        from.current = undefined;
      }}
      onKeyDown={onKeyDown}
    />
  );
}

function LevelLine({
  panel,
  pixelsPerPoint,
  heightM,
  words,
}: At & { readonly heightM: number; readonly words: string }): ReactElement | null {
  const y = panel.scale(heightM);
  if (y < panel.top || y > panel.bottom) return null;
  const place = { top: y * pixelsPerPoint };
  return (
    <>
      <div className={styles.levelLine} style={place} aria-hidden="true" />
      <output className={styles.levelWords} style={{ ...place, left: panel.right * pixelsPerPoint - 40 }}>
        {words}
      </output>
    </>
  );
}

const isMain = (horizon: MarkerHorizon, { markers }: Analysis): boolean =>
  markers.main.bySection.get(horizon.section)?.horizon === horizon.horizon;

const ORDER: readonly MarkerHorizon["source"][] = ["manual", "given", "found"];
const TARGET = 24;

/** One handle a horizon, the main one first; those that would lie under another are moved by their field alone. */
function movable(analysis: Analysis, { section, scale }: Panel, pixelsPerPoint: number) {
  const here = analysis.markers.horizons.filter((h) => h.section === section);
  const ordered = here.toSorted(
    (a, b) =>
      Number(isMain(b, analysis)) - Number(isMain(a, analysis)) ||
      ORDER.indexOf(a.source) - ORDER.indexOf(b.source),
  );
  const kept: MarkerHorizon[] = [];
  for (const horizon of ordered) {
    const y = scale(horizon.positionM);
    const isFree = kept.every(
      (other) =>
        other.horizon !== horizon.horizon && Math.abs(scale(other.positionM) - y) * pixelsPerPoint >= TARGET,
    );
    if (isFree) kept.push(horizon);
  }
  return kept;
}

import { type KeyboardEvent, type ReactElement, useState } from "react";
import { givenToHeight, heightToGiven } from "../../core/study/heights.ts";
import type { Section } from "../../core/study/model.ts";
import margin from "../margin/margin.module.css";
import { heightOf } from "../state/level.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { askedWords } from "./asked-words.ts";
import styles from "./trial.module.css";
import { useTrial } from "./use-trial.ts";

const STATIONS: ReadonlySet<string> = new Set(["markers", "ranges", "timing"]);

/** The twins of what can be dragged on a plate: each a field that follows the hand and can be typed in. */
export function TrialFields({ open }: { readonly open: Opened }): ReactElement | null {
  const { section, station } = open.focus;
  if (section === undefined || !STATIONS.has(station)) return null;
  return (
    <section className={margin.part}>
      <h2>Try another choice</h2>
      <div className={styles.fields}>
        <ConfidenceField open={open} />
        <HorizonFields open={open} section={section} />
        {station === "timing" && <LevelField open={open} section={section} />}
      </div>
    </section>
  );
}

const LEAST = 0.5;
const MOST = 0.999;

function ConfidenceField({ open }: { readonly open: Opened }): ReactElement {
  const { tryOut } = useTrial();
  const { confidence } = open.analysis.study.settings;
  const set = (value: number) => {
    if (value > 0 && value < 1) tryOut({ path: ["confidence"], value });
  };
  return (
    <div className={styles.field}>
      <label htmlFor="try-confidence">Confidence of intervals</label>
      <NumberField id="try-confidence" value={confidence} step={0.01} take={set} />
      <input
        type="range"
        aria-label="Confidence of intervals, sliding"
        min={LEAST}
        max={MOST}
        step={0.005}
        value={confidence}
        onChange={(event) => set(Number(event.currentTarget.value))}
      />
    </div>
  );
}

interface FieldsProps {
  readonly open: Opened;
  readonly section: Section;
}

function HorizonFields({ open, section }: FieldsProps): ReactElement {
  const { moveHorizon } = useTrial();
  const here = open.analysis.markers.horizons.filter((h) => h.section === section.name);
  const names = [...new Set(here.map(({ horizon }) => horizon))];
  const main = open.analysis.markers.main.bySection.get(section.name);
  return (
    <>
      {names.map((name) => {
        const own = here.filter(({ horizon }) => horizon === name);
        const shown =
          (main?.horizon === name ? main : undefined) ??
          own.find(({ source }) => source === "manual") ??
          own[0];
        const id = `try-horizon-${name}`;
        return (
          shown && (
            <div key={name} className={styles.field}>
              <label htmlFor={id}>
                {name}, {unitWords(section)}
              </label>
              <NumberField
                id={id}
                value={shownNumber(heightToGiven(shown.positionM, section))}
                step={STEP[section.unit]}
                take={(value) => moveHorizon(section, name, givenToHeight(value, section))}
              />
            </div>
          )
        );
      })}
    </>
  );
}

function LevelField({ open, section }: FieldsProps): ReactElement {
  const { state } = usePage();
  const { askLevel, forgetLevel } = useTrial();
  const { analysis, focus } = open;
  const level = state.trial.level?.section === section.name ? state.trial.level : undefined;
  const ask = () => {
    const read = state.reading && heightOf(analysis, section.name, state.reading);
    const main = analysis.markers.main.bySection.get(section.name)?.positionM;
    askLevel(section, read ?? main ?? (section.bottomM + section.topM) / 2);
  };
  if (level === undefined)
    return (
      <button type="button" className={styles.plain} onClick={ask}>
        Ask about one level
      </button>
    );
  return (
    <div className={styles.field}>
      <label htmlFor="try-level">One level, {unitWords(section)}</label>
      <NumberField
        id="try-level"
        value={shownNumber(heightToGiven(level.heightM, section))}
        step={STEP[section.unit]}
        take={(value) => askLevel(section, givenToHeight(value, section))}
      />
      <p className={styles.fact}>{askedWords(analysis, section, { ...level, set: focus.set?.set ?? "" })}</p>
      <button type="button" className={styles.plain} onClick={forgetLevel}>
        Ask no more
      </button>
    </div>
  );
}

const STEP = { m: 0.01, cm: 1, mm: 5, ft: 0.05 } as const;

const unitWords = ({ axis, unit }: Section): string => (axis === "depth" ? `${unit} depth` : unit);

const shownNumber = (value: number): number => Number(value.toFixed(4));

interface NumberFieldProps {
  readonly id: string;
  readonly value: number;
  readonly step: number;
  readonly take: (value: number) => void;
}

/** A number that is taken as it is typed, where it is one; what is being typed is left alone. */
function NumberField({ id, value, step, take }: NumberFieldProps): ReactElement {
  const { letGo } = useTrial();
  const [typed, setTyped] = useState<string>();
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key !== "Escape") return;
    setTyped(undefined);
    letGo();
  };
  return (
    <input
      id={id}
      type="number"
      step="any"
      value={typed ?? value}
      onKeyDown={(event) => {
        const by = event.key === "ArrowUp" ? 1 : event.key === "ArrowDown" ? -1 : 0;
        if (by === 0) return onKeyDown(event);
        event.preventDefault();
        setTyped(undefined);
        return take(shownNumber(value + by * step * (event.shiftKey ? 10 : 1)));
      }}
      onBlur={() => setTyped(undefined)}
      onChange={({ currentTarget: { value: now } }) => {
        setTyped(now);
        if (now.trim() !== "" && Number.isFinite(Number(now))) take(Number(now));
      }}
    />
  );
}

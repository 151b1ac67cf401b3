import { type PointerEvent, useMemo } from "react";
import type { Section } from "../../core/study/model.ts";
import type { Drawing, Panel } from "../../figures/plates/drawing.ts";
import { heightOf, levelAt } from "../state/level.ts";
import { type Opened, usePage } from "../state/page-context.ts";

const STEPS_PER_FRAME = 400;
const LARGE_STEP = 10;

export interface Reading {
  /** The panel of the section in focus, and the height of the reading line there. */
  readonly panel?: Panel;
  readonly section?: Section;
  readonly heightM?: number;
  readonly setHeight: (heightM: number) => void;
  readonly onKeyDown: (event: KeyboardEvent) => void;
  readonly onPointer: (event: PointerEvent<HTMLElement>, pixelsPerPoint: number) => void;
}

/** The one height that all plates share, as this plate sees it. */
export function useReading({ panels }: Drawing, { analysis, focus }: Opened): Reading {
  const { state, dispatch } = usePage();
  const section = focus.section;
  const panel = panels.find((candidate) => candidate.section === section?.name) ?? panels[0];
  return useMemo(() => {
    const name = panel?.section;
    const heightM =
      name === undefined || state.reading === undefined ? undefined : heightOf(analysis, name, state.reading);
    const setHeight = (height: number) => {
      if (name !== undefined) dispatch({ kind: "read", level: levelAt(analysis, name, height) });
    };
    const own = { panel, section: analysis.study.sections.find((candidate) => candidate.name === name) };
    return {
      ...own,
      heightM,
      setHeight,
      onKeyDown: (event) => {
        if (panel === undefined) return;
        const next = stepped(event, panel, heightM);
        if (next === undefined) return;
        event.preventDefault();
        setHeight(next);
      },
      onPointer: (event, pixelsPerPoint) => {
        if (panel === undefined) return;
        const y = (event.clientY - event.currentTarget.getBoundingClientRect().top) / pixelsPerPoint;
        if (y >= panel.top && y <= panel.bottom) setHeight(panel.scale.invert(y));
      },
    };
  }, [analysis, dispatch, panel, state.reading]);
}

/** Where an arrow key takes the line: a four-hundredth of the frame in round numbers, ten times that with Shift. */
export function stepped(
  event: Pick<KeyboardEvent, "key" | "altKey" | "ctrlKey" | "metaKey" | "shiftKey">,
  panel: Panel,
  heightM: number | undefined,
): number | undefined {
  const up = event.key === "ArrowUp" ? 1 : event.key === "ArrowDown" ? -1 : 0;
  if (up === 0 || event.altKey || event.ctrlKey || event.metaKey) return undefined;
  const [lowest, highest] = extentOf(panel);
  if (heightM === undefined) return (lowest + highest) / 2;
  const step = roundStep((highest - lowest) / STEPS_PER_FRAME) * (event.shiftKey ? LARGE_STEP : 1);
  const next = Math.round((heightM + up * step) / step) * step;
  return Math.min(Math.max(next, lowest), highest);
}

export function extentOf({ scale }: Panel): readonly [lowest: number, highest: number] {
  const domain = scale.domain();
  return [Math.min(...domain), Math.max(...domain)];
}

/** The nearest of 1, 2 or 5 times a power of ten. */
function roundStep(step: number): number {
  const power = 10 ** Math.floor(Math.log10(step));
  const leading = step / power;
  return power * (leading < 1.5 ? 1 : leading < 3.5 ? 2 : leading < 7.5 ? 5 : 10);
}

import { setTitle } from "../../report/wordings/set-title.ts";
import { rangesActions } from "../ranges/ranges-actions.ts";
import { bundledStudy } from "../study/bundled-study.ts";
import { heightOf } from "./level.ts";
import type { Opened, PageContents } from "./page-context.ts";
import { SCALES, STATIONS } from "./place.ts";
import { scaleTitle } from "./scale-title.ts";
import { tableActions } from "./table-actions.ts";
import { moveFrame } from "./zoom.ts";

/** One thing a person can do: menus, keys and the Go to list all read it from here. */
export interface Action {
  readonly id: string;
  readonly label: string;
  readonly group: string;
  /** The key outside of fields, as `event.key` names it, or `Control+` and that. */
  readonly shortcut?: string;
  readonly otherShortcut?: string;
  readonly isAvailable: boolean;
  readonly act: () => void;
}

export function actionsOf(page: PageContents): readonly Action[] {
  return [
    ...stationActions(page),
    ...plateActions(page),
    ...rangesActions(page),
    ...tableActions(page),
    ...focusActions(page),
    ...pageActions(page),
  ];
}

function stationActions({ go, state, study }: PageContents): Action[] {
  return STATIONS.map(({ id, title }, index) => ({
    id: `station-${id}`,
    label: title,
    group: "Stations",
    shortcut: String(index + 1),
    isAvailable: study.readOut !== undefined && state.place.station !== id,
    act: () => go({ station: id }),
  }));
}

function plateActions({ state, dispatch, open }: PageContents): Action[] {
  const isPlate = open?.focus.section !== undefined && open.focus.station !== "tables";
  const zoom = (factor: number) => {
    if (open === undefined) return;
    const now = { focus: open.focus, frame: state.frame, analysis: open.analysis };
    dispatch({
      kind: "framed",
      frame: moveFrame(now, { factor, aboutM: readingHeight(open, state.reading) }),
    });
  };
  const plate = { group: "Plate" };
  return [
    {
      ...plate,
      id: "nearer",
      label: "Come nearer",
      shortcut: "+",
      isAvailable: isPlate,
      act: () => zoom(0.6),
    },
    {
      ...plate,
      id: "further",
      label: "Go further away",
      shortcut: "-",
      isAvailable: isPlate && state.frame !== undefined,
      act: () => zoom(1 / 0.6),
    },
    {
      ...plate,
      id: "whole",
      label: "Whole section",
      shortcut: "0",
      isAvailable: isPlate && state.frame !== undefined,
      act: () => dispatch({ kind: "framed", frame: undefined }),
    },
  ];
}

function readingHeight({ analysis, focus }: Opened, reading: PageContents["state"]["reading"]) {
  const { section } = focus;
  if (reading === undefined || section === undefined) return undefined;
  const heightM = heightOf(analysis, section.name, reading);
  return heightM !== undefined && heightM >= section.bottomM && heightM <= section.topM ? heightM : undefined;
}

function focusActions({ go, open }: PageContents): Action[] {
  if (open === undefined) return [];
  const { analysis, focus } = open;
  return [
    ...analysis.study.sections.map((section) => ({
      id: `section-${section.name}`,
      label: section.title,
      group: "Sections",
      isAvailable: section !== focus.section,
      act: () => go({ section: section.name }),
    })),
    ...focus.sets.map(({ set, taxa }) => ({
      id: `set-${set}`,
      label: `${setTitle(set)} (${taxa.length})`,
      group: "Sets of taxa",
      isAvailable: set !== focus.set?.set,
      act: () => go({ set, station: "timing" }),
    })),
    ...SCALES.map((scale) => ({
      id: `scale-${scale}`,
      label: scaleTitle(scale, focus.section),
      group: "Vertical scale",
      isAvailable: scale !== focus.scale,
      act: () => go({ scale }),
    })),
  ];
}

function pageActions({ state, dispatch, study }: PageContents): Action[] {
  const page = { group: "Page" };
  return [
    {
      ...page,
      id: "margin",
      label: state.isMarginOpen ? "Close the margin" : "Open the margin",
      shortcut: "m",
      isAvailable: true,
      act: () => dispatch({ kind: "margin-turned" }),
    },
    {
      ...page,
      id: "theme",
      label: isDark(state.theme) ? "Light page" : "Dark page",
      isAvailable: true,
      act: () => dispatch({ kind: "theme-set", theme: isDark(state.theme) ? "light" : "dark" }),
    },
    {
      ...page,
      id: "example",
      label: "The study beside this page",
      isAvailable: true,
      act: () => study.open("the study beside this page", bundledStudy),
    },
    {
      ...page,
      id: "cancel",
      label: "Cancel the work",
      isAvailable: state.work.kind === "busy",
      act: study.cancel,
    },
  ];
}

export function isDark(theme: PageContents["state"]["theme"]): boolean {
  return theme === "dark" || (theme === "system" && matchMedia("(prefers-color-scheme: dark)").matches);
}

import { createContext, type Dispatch, useContext } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Finding } from "../../report/findings/finding.ts";
import type { Keeping } from "../keeping/use-keeping.ts";
import type { OpenStudy } from "../study/use-study.ts";
import type { Focus } from "./focus.ts";
import type { PageEvent, PageState } from "./page-state.ts";
import type { Place } from "./place.ts";

/** What every part of the page may read and do. */
export interface PageContents {
  readonly state: PageState;
  readonly dispatch: Dispatch<PageEvent>;
  /** Goes to a place; what is not named stays. */
  readonly go: (change: Partial<Place>) => void;
  readonly study: OpenStudy;
  readonly keeping: Keeping;
  /** Absent until a first study has been worked out. */
  readonly open?: Opened;
}

/** A study worked out, and what is in focus. */
export interface Opened {
  readonly analysis: Analysis;
  readonly focus: Focus;
  readonly all: readonly Finding[];
  /** Present while settings are tried that are not the study's. */
  readonly trying?: Trying;
}

/** What the study is while something else is tried, and how far that has been worked out. */
export interface Trying {
  readonly was: Analysis;
  /** Its finding for what is in focus. */
  readonly wasFinding?: Finding;
  /** False while only what has a closed form has followed. */
  readonly isWhole: boolean;
  /** Why the settings tried cannot be; then the study is shown as it is. */
  readonly refused?: string;
}

const Context = createContext<PageContents | undefined>(undefined);

export const PageProvider = Context.Provider;

export function usePage(): PageContents {
  const contents = useContext(Context);
  if (contents === undefined) throw new Error("usePage: expected to be called inside the page");
  return contents;
}

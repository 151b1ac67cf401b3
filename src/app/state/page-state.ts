import type { TimingAsked } from "../../figures/plates/timing-columns.tsx";
import { allUndone, type EditStep, type History, redone, undone, withStep } from "../tables/history.ts";
import { type AskedLevel, NO_TRIAL, type Trial } from "../trial/trial.ts";
import type { Level } from "./level.ts";
import type { Place } from "./place.ts";

export type Theme = "system" | "light" | "dark";

/** What the worker is doing, or how its last work ended. */
export type Work =
  | { readonly kind: "idle" }
  | {
      readonly kind: "busy";
      readonly name: string;
      /** Whether it is something that is only tried: told where it is tried. */
      readonly isTrial: boolean;
      readonly step: string;
      readonly share: number;
    }
  | { readonly kind: "cancelled"; readonly name: string }
  | { readonly kind: "failed"; readonly message: string };

/** The part of the section a plate shows, lower end first. */
export interface Frame {
  readonly low: Level;
  readonly high: Level;
}

/** All that the page remembers besides the study's bytes and its analysis. */
export interface PageState {
  readonly place: Place;
  readonly reading?: Level;
  readonly frame?: Frame;
  readonly isMarginOpen: boolean;
  readonly isGoToOpen: boolean;
  /** Whether the section log stands beside the tables. */
  readonly isLogOpen: boolean;
  readonly theme: Theme;
  readonly work: Work;
  /** The text in the field for pasted tables; undefined where the field is closed. */
  readonly pasted?: string;
  /** Every edit of the study's tables and settings. */
  readonly history: History;
  readonly trial: Trial;
  /** What the timing plate shows beside its ranges. */
  readonly beside: Beside;
}

export type Beside = Pick<TimingAsked, "shows" | "scenario">;

export type PageEvent =
  | { readonly kind: "placed"; readonly place: Place }
  | { readonly kind: "read"; readonly level: Level }
  | { readonly kind: "framed"; readonly frame: Frame | undefined }
  | { readonly kind: "margin-turned" }
  | { readonly kind: "log-turned" }
  | { readonly kind: "go-to-turned"; readonly isOpen: boolean }
  | { readonly kind: "pasted"; readonly text: string | undefined }
  | { readonly kind: "theme-set"; readonly theme: Theme }
  | { readonly kind: "work-began"; readonly name: string; readonly isTrial?: boolean }
  | { readonly kind: "work-went-on"; readonly step: string; readonly share: number }
  | { readonly kind: "study-opened"; readonly history: History }
  | { readonly kind: "edited"; readonly step: EditStep }
  | { readonly kind: "tried"; readonly trial: Trial }
  | { readonly kind: "level-asked"; readonly level: AskedLevel | undefined }
  | { readonly kind: "let-go" }
  | { readonly kind: "kept"; readonly step: EditStep }
  | { readonly kind: "beside-shown"; readonly beside: Beside }
  | { readonly kind: "undone" }
  | { readonly kind: "redone" }
  | { readonly kind: "all-undone" }
  | { readonly kind: "history-set"; readonly history: History }
  | { readonly kind: "work-ended" }
  | { readonly kind: "work-cancelled" }
  | { readonly kind: "work-failed"; readonly message: string }
  | { readonly kind: "message-read" };

/** Whether something is tried that was neither kept nor let go. */
export const isTrying = ({ changes, level, isKept }: Trial): boolean =>
  isKept !== true && (changes.length > 0 || level !== undefined);

export function step(state: PageState, event: PageEvent): PageState {
  switch (event.kind) {
    case "placed":
      return { ...state, place: event.place };
    case "read":
      return { ...state, reading: event.level };
    case "framed":
      return { ...state, frame: event.frame };
    case "margin-turned":
      return { ...state, isMarginOpen: !state.isMarginOpen };
    case "log-turned":
      return { ...state, isLogOpen: !state.isLogOpen };
    case "go-to-turned":
      return { ...state, isGoToOpen: event.isOpen };
    case "pasted":
      return { ...state, pasted: event.text };
    case "theme-set":
      return { ...state, theme: event.theme };
    case "work-began":
      return {
        ...state,
        work: {
          kind: "busy",
          name: event.name,
          isTrial: event.isTrial === true,
          step: "reading the tables",
          share: 0,
        },
      };
    case "work-went-on":
      return state.work.kind === "busy"
        ? { ...state, work: { ...state.work, step: event.step, share: event.share } }
        : state;
    case "study-opened":
      return { ...state, history: event.history, reading: undefined, frame: undefined, trial: NO_TRIAL };
    case "edited":
      return { ...state, history: withStep(state.history, event.step) };
    case "tried":
      return { ...state, trial: event.trial };
    case "level-asked":
      return { ...state, trial: { ...state.trial, level: event.level } };
    case "let-go":
      return { ...state, trial: NO_TRIAL };
    case "kept":
      return {
        ...state,
        history: withStep(state.history, event.step),
        trial: { changes: state.trial.changes, isKept: true },
      };
    case "beside-shown":
      return { ...state, beside: event.beside };
    case "undone":
      return isTrying(state.trial)
        ? { ...state, trial: NO_TRIAL }
        : { ...state, history: undone(state.history), trial: NO_TRIAL };
    case "redone":
      return { ...state, history: redone(state.history) };
    case "all-undone":
      return { ...state, history: allUndone(state.history), trial: NO_TRIAL };
    case "history-set":
      return { ...state, history: event.history, trial: NO_TRIAL };
    case "work-ended":
      return { ...state, work: { kind: "idle" } };
    case "work-cancelled":
      return state.work.kind === "busy" && !state.work.isTrial
        ? { ...state, work: { kind: "cancelled", name: state.work.name } }
        : state.work.kind === "busy"
          ? { ...state, work: { kind: "idle" } }
          : state;
    case "work-failed":
      return { ...state, work: { kind: "failed", message: event.message } };
    case "message-read":
      return { ...state, work: { kind: "idle" } };
    default:
      return event satisfies never;
  }
}

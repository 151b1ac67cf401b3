import type { Edit } from "./edits.ts";

/** What a person did at once: one step back takes all of it. */
export interface EditStep {
  readonly label: string;
  readonly edits: readonly Edit[];
}

/** All steps in their order, and how many of them hold; those beyond can be done again. */
export interface History {
  readonly steps: readonly EditStep[];
  readonly held: number;
}

export const NO_HISTORY: History = { steps: [], held: 0 };

/** A step more; what had been undone is gone. A step that changes nothing is none. */
export const withStep = (history: History, step: EditStep): History =>
  step.edits.every((edit) => edit.kind === "cell" && edit.was === edit.now)
    ? history
    : { steps: [...history.steps.slice(0, history.held), step], held: history.held + 1 };

export const undone = (history: History): History =>
  history.held === 0 ? history : { ...history, held: history.held - 1 };

export const redone = (history: History): History =>
  history.held === history.steps.length ? history : { ...history, held: history.held + 1 };

/** The tables as they were given; every step can be done again. */
export const allUndone = (history: History): History =>
  history.held === 0 ? history : { ...history, held: 0 };

export const heldEdits = ({ steps, held }: History): readonly Edit[] =>
  steps.slice(0, held).flatMap(({ edits }) => edits);

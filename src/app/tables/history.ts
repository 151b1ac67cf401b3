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
export const withStep = ({ steps, held }: History, step: EditStep): History =>
  step.edits.every((edit) => edit.kind === "cell" && edit.was === edit.now)
    ? { steps, held }
    : { steps: [...steps.slice(0, held), step], held: held + 1 };

export const undone = ({ steps, held }: History): History => ({ steps, held: Math.max(0, held - 1) });

export const redone = ({ steps, held }: History): History => ({
  steps,
  held: Math.min(steps.length, held + 1),
});

/** The tables as they were given; every step can be done again. */
export const allUndone = ({ steps }: History): History => ({ steps, held: 0 });

export const heldEdits = ({ steps, held }: History): readonly Edit[] =>
  steps.slice(0, held).flatMap(({ edits }) => edits);

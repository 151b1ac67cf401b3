import { useMemo } from "react";
import type { SettingChange } from "../../core/study/changed-settings.ts";
import type { Section } from "../../core/study/model.ts";
import { position } from "../../report/wordings/numbers.ts";
import { usePage } from "../state/page-context.ts";
import { keptStep, NEW_CHOICES } from "./kept-step.ts";
import { pickChange, roundedHeight, withTried } from "./trial.ts";

/** What a hand can do with a choice before it is one. */
export interface TrialActions {
  readonly tryOut: (change: SettingChange) => void;
  readonly moveHorizon: (section: Section, horizon: string, heightM: number) => void;
  readonly askLevel: (section: Section, heightM: number) => void;
  readonly forgetLevel: () => void;
  readonly letGo: () => void;
  readonly keep: (reason: string) => void;
}

export function useTrial(): TrialActions {
  const { state, dispatch, study } = usePage();
  const { trial, history } = state;
  return useMemo(() => {
    const { workedOut } = study;
    const tryOut = (change: SettingChange) => {
      if (workedOut === undefined) return;
      const now = withTried(trial, change, workedOut.analysis.study.settings);
      dispatch({ kind: "tried", trial: { ...now, isKept: undefined } });
    };
    return {
      tryOut,
      moveHorizon: (section, horizon, heightM) => {
        if (workedOut === undefined) return;
        const tried = trial.changes.find(({ path }) => path.join(".") === "boundary.picks");
        tryOut(pickChange(workedOut.analysis, section, { horizon, heightM, picks: tried?.value }));
      },
      askLevel: (section, heightM) =>
        dispatch({
          kind: "level-asked",
          level: { section: section.name, heightM: roundedHeight(heightM, section) },
        }),
      forgetLevel: () => dispatch({ kind: "level-asked", level: undefined }),
      letGo: () => dispatch({ kind: "let-go" }),
      keep: (reason) => {
        if (workedOut === undefined) return;
        const { analysis, tables } = workedOut;
        const { settings, sections } = analysis.study;
        const { level } = trial;
        const section = sections.find(({ name }) => name === level?.section);
        const named =
          level && section ? withTried(trial, levelPick(section, level.heightM), settings) : trial;
        if (!tables.some(({ table }) => table === "choices"))
          study.addFile(NEW_CHOICES.file, NEW_CHOICES.text);
        const step = keptStep({ changes: named.changes, settings, tables, history, reason });
        dispatch({ kind: "tried", trial: named });
        dispatch({ kind: "kept", step });
      },
    };

    /** A level asked about that is kept becomes a horizon placed by hand, beside those that the trial moves. */
    function levelPick(section: Section, heightM: number): SettingChange {
      const tried = trial.changes.find(({ path }) => path.join(".") === "boundary.picks");
      const horizon = `level ${position(section, heightM).replaceAll("\u00a0", " ")}`;
      if (workedOut === undefined) return { path: [] };
      return pickChange(workedOut.analysis, section, { horizon, heightM, picks: tried?.value });
    }
  }, [trial, history, study, dispatch]);
}

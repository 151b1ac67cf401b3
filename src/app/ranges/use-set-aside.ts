import { useCallback } from "react";
import type { Mark } from "../plate/mark.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { asideStep } from "./set-aside.ts";

/** Sets aside what a mark stands for, or takes it back; tells whether there was anything to do. */
export function useSetAside({ analysis }: Opened, section: string): (mark: Mark) => boolean {
  const { state, dispatch, study } = usePage();
  const { history } = state;
  const workedOn = study.workedOut?.history ?? history;
  return useCallback(
    (mark) => {
      const step = asideStep(mark, { analysis, section, workedOn, history });
      if (step === undefined) return false;
      dispatch({ kind: "edited", step });
      return true;
    },
    [analysis, section, workedOn, history, dispatch],
  );
}

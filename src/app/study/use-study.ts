import { type Dispatch, useEffect, useMemo, useRef, useState } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { Problem } from "../../core/study/problem.ts";
import { pageRunner } from "../../run/page.ts";
import type { PageEvent } from "../state/page-state.ts";
import { type GivenStudy, NotAStudy } from "./given-study.ts";

const startWorker = () =>
  new Worker(new URL("../../run/page-worker.ts", import.meta.url), { type: "module" });

export interface OpenStudy {
  /** The last analysis that was worked out; it stays until the next one is. */
  readonly analysis: Analysis | undefined;
  /** Loads a study and works it out; the latest request wins. */
  readonly open: (name: string, load: (signal: AbortSignal) => Promise<GivenStudy>) => void;
  readonly cancel: () => void;
}

export function useStudy(dispatch: Dispatch<PageEvent>): OpenStudy {
  const [analysis, setAnalysis] = useState<Analysis>();
  const runner = useMemo(() => pageRunner(startWorker), []);
  const current = useRef<AbortController>(undefined);

  useEffect(
    () => () => {
      current.current?.abort();
      void runner.close();
    },
    [runner],
  );

  const { open, cancel } = useMemo(() => {
    const open: OpenStudy["open"] = (name, load) => {
      current.current?.abort();
      const controller = new AbortController();
      current.current = controller;
      dispatch({ kind: "work-began", name });
      void work(load, controller.signal).catch((error: unknown) => {
        if (controller.signal.aborted) return;
        dispatch({ kind: "work-failed", message: error instanceof Error ? error.message : String(error) });
      });
    };
    const work = async (load: (signal: AbortSignal) => Promise<GivenStudy>, signal: AbortSignal) => {
      const given = await load(signal);
      const onProgress = sparingly((step, share) => {
        if (!signal.aborted) dispatch({ kind: "work-went-on", step, share });
      });
      const result = await runner.analyse(given, { signal, onProgress });
      if (signal.aborted) return;
      if (result.study.sheets.length === 0)
        throw new NotAStudy(nothingRead(given.name, result.study.problems));
      setAnalysis(result);
      dispatch({ kind: "work-ended" });
    };
    const cancel = () => {
      current.current?.abort();
      dispatch({ kind: "work-cancelled" });
    };
    return { open, cancel };
  }, [dispatch, runner]);
  return useMemo(() => ({ analysis, open, cancel }), [analysis, open, cancel]);
}

/** Lets through a new step, or one more hundredth of the same. */
function sparingly(tell: (step: string, share: number) => void): typeof tell {
  let last = { step: "", hundredth: -1 };
  return (step, share) => {
    const hundredth = Math.floor(100 * share);
    if (step === last.step && hundredth === last.hundredth) return;
    last = { step, hundredth };
    tell(step, share);
  };
}

function nothingRead(name: string, problems: readonly Problem[]): string {
  const [first] = problems;
  const reason = first === undefined ? "" : ` ${first.file}: expected ${first.expected}. ${first.mend}`;
  return `${name} is not a study: none of its files could be read as a table.${reason}`;
}

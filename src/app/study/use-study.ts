import { type Dispatch, useEffect, useMemo, useRef, useState } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import type { SettingChange } from "../../core/study/changed-settings.ts";
import type { Study } from "../../core/study/model.ts";
import { pageRunner } from "../../run/page.ts";
import type { PageEvent } from "../state/page-state.ts";
import { settingEdit } from "../tables/edits.ts";
import { type History, NO_HISTORY, withStep } from "../tables/history.ts";
import { withSetting } from "./chosen-settings.ts";
import { type GivenStudy, NotAStudy } from "./given-study.ts";
import {
  editedFiles,
  keptWork,
  nothingRead,
  prepared,
  type ReadOut,
  readOutOf,
  type Unread,
} from "./read-out.ts";

const startWorker = () =>
  new Worker(new URL("../../run/page-worker.ts", import.meta.url), { type: "module" });

/** A study that is worked out: as its last analysis found it. */
export interface WorkedOut extends ReadOut {
  readonly analysis: Analysis;
}

/** Settings tried on a study that is worked out, and what they come to. */
export interface TriedOut {
  readonly changes: readonly SettingChange[];
  readonly base: WorkedOut;
  readonly analysis: Analysis;
}

export interface OpenStudy {
  /** The open study as it was last read: its tables can be worked in before it is worked out. */
  readonly readOut: ReadOut | undefined;
  /** The open study as it was last worked out; it stays until it is again, or another one is read. */
  readonly workedOut: WorkedOut | undefined;
  /** Loads a study and works it out; the latest request wins. */
  readonly open: (name: string, load: (signal: AbortSignal) => Promise<GivenStudy>) => void;
  /** Works the open study out again with the edits that its history holds; never stands before a study being opened. */
  readonly rework: (history: History) => void;
  /** What the last settings tried came to. */
  readonly tried: TriedOut | undefined;
  /** Works the study out with settings that are only tried; it stays as it is. */
  readonly tryOut: (base: WorkedOut, changes: readonly SettingChange[]) => void;
  /** Gives up working out what is tried. */
  readonly stopTrying: () => void;
  /** Puts a table that the study lacks among its files; the next working out reads it. */
  readonly addFile: (name: string, text: string) => void;
  /** Changes the study's settings, keeps them with it and reads it again at once; edits stay. */
  readonly settle: (change: SettingChange) => void;
  readonly cancel: () => void;
}

interface AnalysisDue {
  readonly given: GivenStudy;
  readonly files: GivenStudy["files"];
}

interface AnalysisWatch {
  readonly signal: AbortSignal;
  readonly onRead?: (study: Study) => void;
}

export function useStudy(dispatch: Dispatch<PageEvent>): OpenStudy {
  const [readOut, setReadOut] = useState<ReadOut>();
  const [workedOut, setWorkedOut] = useState<WorkedOut>();
  const latest = useRef<ReadOut>(undefined);
  const runner = useMemo(() => pageRunner(startWorker), []);
  const current = useRef<AbortController>(undefined);
  const isOpening = useRef(false);
  const busyWith = useRef<"study" | "trial">(undefined);
  const [tried, setTried] = useState<TriedOut>();
  /** The edits that were last asked to be worked out. */
  const asked = useRef(NO_HISTORY);
  /** The study with settings that are not worked out yet. */
  const settled = useRef<GivenStudy>(undefined);

  useEffect(
    () => () => {
      current.current?.abort();
      void runner.close();
    },
    [runner],
  );

  const actions = useMemo(() => {
    const start = <T>(
      { name, isTrial = false }: { readonly name: string; readonly isTrial?: boolean },
      work: (signal: AbortSignal) => Promise<T>,
      take: (result: T) => void,
    ) => {
      current.current?.abort();
      const controller = new AbortController();
      current.current = controller;
      busyWith.current = isTrial ? "trial" : "study";
      dispatch({ kind: "work-began", name, isTrial });
      return work(controller.signal).then(
        (result) => {
          if (controller.signal.aborted) return;
          busyWith.current = undefined;
          take(result);
          dispatch({ kind: "work-ended" });
        },
        (error: unknown) => {
          if (controller.signal.aborted) return;
          isOpening.current = false;
          busyWith.current = undefined;
          settled.current = undefined;
          dispatch({ kind: "work-failed", message: error instanceof Error ? error.message : String(error) });
        },
      );
    };
    const begin = (name: string, load: (signal: AbortSignal) => Promise<Unread>) =>
      start({ name }, async (signal) => workOut(await load(signal), signal), setWorkedOut);
    const show = (read: ReadOut) => {
      latest.current = read;
      if (settled.current === read.given) settled.current = undefined;
      setReadOut(read);
      if (!isOpening.current) return;
      isOpening.current = false;
      asked.current = read.history;
      setWorkedOut(undefined);
      dispatch({ kind: "study-opened", history: read.history });
    };
    const analyse = async ({ given, files }: AnalysisDue, { signal, onRead }: AnalysisWatch) => {
      const onProgress = sparingly((step, share) => {
        if (!signal.aborted) dispatch({ kind: "work-went-on", step, share });
      });
      const result = await runner.analyse({ name: given.name, files }, { signal, onProgress, onRead });
      if (result.study.sheets.length === 0)
        throw new NotAStudy(nothingRead(given.name, result.study.problems));
      return result;
    };
    /** Reads and works out; what was read is shown first. */
    const workOut = async (due: Unread, signal: AbortSignal): Promise<WorkedOut> => {
      const { unread, files } = await prepared(due);
      const shown: Promise<ReadOut>[] = [];
      const showRead = async (study: Study) => {
        const read = await readOutOf(unread, study);
        if (!signal.aborted && study.sheets.length > 0) show(read);
        return read;
      };
      const onRead = (study: Study) => void shown.push(showRead(study));
      const analysis = await analyse({ given: unread.given, files }, { signal, onRead });
      const [read = readOutOf(unread, analysis.study)] = shown;
      return { ...(await read), analysis };
    };
    const open: OpenStudy["open"] = (name, load) => {
      isOpening.current = true;
      settled.current = undefined;
      void begin(name, async (signal) => {
        const kept = await keptWork(await load(signal));
        return { ...kept, opened: kept.history };
      });
    };
    const rework: OpenStudy["rework"] = (history) => {
      const now = latest.current;
      if (now === undefined || isOpening.current) return;
      asked.current = history;
      const { key, opened, sheets, tables } = now;
      const given = settled.current;
      const due =
        given === undefined
          ? { given: now.given, sheets, tables }
          : { given, sheets: undefined, tables: undefined };
      void begin(now.study.name, async () => ({ ...due, key, opened, history }));
    };
    const settle: OpenStudy["settle"] = (change) => {
      const now = latest.current;
      if (now === undefined || isOpening.current) return;
      settled.current = withSetting(settled.current ?? now.given, change);
      rework(asked.current);
    };
    const tryOut: OpenStudy["tryOut"] = (base, changes) => {
      if (busyWith.current === "study") return;
      const step = { label: "trying", edits: changes.map(settingEdit) };
      const { given, tables, history } = base;
      const work = async (signal: AbortSignal) => {
        const files = await editedFiles(given, tables, withStep(history, step));
        return analyse({ given, files }, { signal });
      };
      const { name } = base.analysis.study;
      void start({ name, isTrial: true }, work, (analysis) => setTried({ changes, base, analysis }));
    };
    const stopTrying = () => {
      if (busyWith.current !== "trial") return;
      busyWith.current = undefined;
      current.current?.abort();
      dispatch({ kind: "work-ended" });
    };
    const addFile: OpenStudy["addFile"] = (name, text) => {
      const now = settled.current ?? latest.current?.given;
      if (now === undefined) return;
      const files = new Map([...now.files, [name, new TextEncoder().encode(text)]]);
      settled.current = { ...now, files, isSettled: true };
    };
    const cancel = () => {
      current.current?.abort();
      isOpening.current = false;
      busyWith.current = undefined;
      dispatch({ kind: "work-cancelled" });
    };
    return { open, rework, settle, cancel, tryOut, stopTrying, addFile };
  }, [dispatch, runner]);
  return useMemo(() => ({ readOut, workedOut, tried, ...actions }), [readOut, workedOut, tried, actions]);
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

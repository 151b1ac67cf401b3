import { useEffect } from "react";
import type { History } from "../tables/history.ts";
import type { OpenStudy } from "./use-study.ts";

/** A person who types on is not interrupted. */
const PAUSE_MS = 400;

/** Works the study out again, a moment after its last edit; the result before stays in view until then. */
export function useReworking(history: History, { rework, readOut }: OpenStudy): void {
  const isRead = readOut === undefined || readOut.history === history;
  useEffect(() => {
    if (isRead) return undefined;
    const timer = setTimeout(() => rework(history), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [history, isRead, rework]);
}

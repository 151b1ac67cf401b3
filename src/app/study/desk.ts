import { type Remote, wrap } from "comlink";
import type { Desk } from "./desk-worker.ts";

let started: Remote<Desk> | undefined;

/** The worker that reads and writes tables; started when it is first needed. */
export function desk(): Remote<Desk> {
  started ??= wrap<Desk>(new Worker(new URL("./desk-worker.ts", import.meta.url), { type: "module" }));
  return started;
}

import type { Alignment } from "./alignment/result.ts";
import type { Markers } from "./markers/result.ts";
import type { Ranges } from "./ranges/result.ts";
import type { Candidate, Find, LocalTaxon } from "./study/finds-result.ts";
import type { Study } from "./study/model.ts";
import type { Timing } from "./timing/result.ts";

/** The whole flow's result: every later layer draws, words or writes from this and nothing else. */
export interface Analysis {
  readonly study: Study;
  readonly markers: Markers;
  readonly alignment: Alignment;
  readonly finds: readonly Find[];
  readonly taxa: readonly LocalTaxon[];
  readonly candidates: readonly Candidate[];
  readonly ranges: Ranges;
  readonly timing: Timing;
}

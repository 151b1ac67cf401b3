import { sameLevelM } from "../legs.ts";
import type { Origin, Sample } from "../model.ts";
import type { Assembly, SectionFrame } from "./context.ts";
import { isHalfSlab, type Slab, type SlabCells, slabOf } from "./position.ts";
import type { SampleLists } from "./read-samples.ts";

/** Where a find or measurement stands: in a sample, or at a position. */
export interface Place extends Slab {
  readonly sample?: Sample;
}

export interface PlaceSearch {
  readonly origin: Origin;
  readonly samples: SampleLists;
  readonly assembly: Assembly;
}

/** The place of a row that names a sample, a position, or both; both must agree. */
export function placeOf(
  cells: SlabCells & { readonly sample?: string },
  frame: SectionFrame,
  { origin, samples, assembly }: PlaceSearch,
): Place | undefined {
  const hasOwnPlace = cells.position !== undefined || (cells.base !== undefined && cells.top !== undefined);
  if (cells.sample === undefined) return slabOf(cells, frame, { origin, assembly });
  const known = samples.bySection.get(frame.name);
  const sample = known?.get(cells.sample);
  const told = { ...origin, column: "sample", found: cells.sample };
  if (!sample) {
    if (hasOwnPlace && !samples.areListed) slabOf(cells, frame, { origin, assembly });
    else if (!samples.areListed) assembly.problems.add("sample-without-position", told);
    else {
      const meant = samples.meant(frame.name, cells.sample);
      const subject = JSON.stringify([frame.name, cells.sample, meant.now && origin.row]);
      assembly.problems.addOnce(subject, "unknown-sample", { ...told, ...meant });
    }
    return undefined;
  }
  const { baseM, topM, heightM } = sample;
  if (isHalfSlab(cells, { origin, assembly })) return undefined;
  if (!hasOwnPlace) return { baseM, topM, heightM, sample };
  const own = slabOf(cells, frame, { origin, assembly });
  if (!own) return undefined;
  if (own.heightM < baseM - sameLevelM || own.heightM > topM + sameLevelM) {
    const detail = `row ${sample.origin.row} of ${sample.origin.file}`;
    assembly.problems.add("sample-elsewhere", { ...told, detail });
    return undefined;
  }
  return cells.base === undefined ? { baseM, topM, heightM, sample } : { ...own, sample };
}

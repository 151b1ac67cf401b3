import type { Coded } from "../coded.ts";
import type { Origin } from "../model.ts";
import { type Assembly, hintsIn, type ReadSheet, type SectionFrame } from "./context.ts";
import type { MeantName } from "./meant-name.ts";

/** The sections of a study, each with what converts its positions; those that cannot be used with the reason. */
export interface Frames {
  readonly usable: ReadonlyMap<string, SectionFrame>;
  readonly leftOut: ReadonlyMap<string, string>;
  /** The section that an unlisted name is likely to mean. */
  readonly meant: (section: string) => MeantName;
}

/** The frame a row's section has, or undefined with the problem told. */
export function frameFor(
  section: string,
  origin: Origin,
  { frames, read, assembly }: FrameSearch,
): SectionFrame | undefined {
  const frame = frames.usable.get(section);
  if (!frame) {
    tellMissing(section, origin, { frames, read, assembly });
    return undefined;
  }
  return isContradicted(frame, origin, { frames, read, assembly }) ? undefined : frame;
}

export interface FrameSearch {
  readonly frames: Frames;
  readonly read: ReadSheet;
  readonly assembly: Assembly;
}

/** Gives each row the frame of its section, looked up once where it can be used; what is wrong with another is told row by row. */
export function frameReader(
  { values, codes }: Coded<string>,
  originAt: (index: number) => Origin,
  search: FrameSearch,
): (index: number) => SectionFrame | undefined {
  const known: (SectionFrame | undefined)[] = values.map(() => undefined);
  return (index) => {
    const code = codes[index];
    known[code] ??= frameFor(values[code], originAt(index), search);
    return known[code];
  };
}

function tellMissing(section: string, origin: Origin, { frames, assembly }: FrameSearch): void {
  const reason = frames.leftOut.get(section);
  const place = { ...origin, column: "section", found: section };
  if (reason !== undefined) {
    assembly.problems.addOnce(section, "section-left-out", { ...place, detail: reason });
  } else {
    assembly.problems.add("unlisted-section", { ...place, ...frames.meant(section) });
  }
}

/** A header that names another axis or unit than the section's: nothing is converted on a guess. */
function isContradicted(frame: SectionFrame, origin: Origin, { read, assembly }: FrameSearch): boolean {
  for (const { header, axis, unit } of hintsIn(read, frame.name)) {
    const isOther = (axis ?? frame.axis) !== frame.axis || (unit ?? frame.unit) !== frame.unit;
    if (!isOther) continue;
    const detail = `${frame.axis} in ${frame.unit}, as section ${frame.name} says`;
    assembly.problems.addOnce(frame.name, "axis-contradicted", {
      ...origin,
      column: header,
      found: header,
      detail,
    });
    return true;
  }
  return false;
}

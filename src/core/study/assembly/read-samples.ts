import { valueAt } from "../coded.ts";
import { sameLevelM } from "../legs.ts";
import type { Origin, Sample } from "../model.ts";
import { samples } from "../tables/samples.ts";
import { type Assembly, originOf, type SectionFrame } from "./context.ts";
import { type FrameSearch, type Frames, frameReader } from "./frame-for.ts";
import { type MeantName, meantNames } from "./meant-name.ts";
import { lengthOf, type SlabCells, slabOf } from "./position.ts";
import { type ReadCells, readCells } from "./rows.ts";

/** The samples of each section by name, and whether a table lists them. */
export interface SampleLists {
  readonly bySection: ReadonlyMap<string, ReadonlyMap<string, Sample>>;
  readonly areListed: boolean;
  /** The sample of a section that an unknown name is likely to mean. */
  readonly meant: (section: string, sample: string) => MeantName;
}

/** Samples of samples.csv; without it, the samples that finds and measurements name with a position. */
export function readSamples(frames: Frames, assembly: Assembly): SampleLists {
  const read = assembly.sheets.get("samples");
  const bySection = new Map<string, Map<string, Sample>>();
  for (const name of frames.usable.keys()) bySection.set(name, new Map());
  if (!read) {
    deriveSamples(bySection, frames, assembly);
    return { bySection, areListed: false, meant: meantIn(bySection) };
  }
  const table = readCells(samples, assembly);
  if (table) readListed(table, bySection, { frames, read, assembly });
  return { bySection, areListed: true, meant: meantIn(bySection) };
}

function readListed(
  { columns, usable }: ReadCells<typeof samples>,
  bySection: Derived,
  search: FrameSearch,
): void {
  const { assembly } = search;
  const originAt = (index: number): Origin => originOf(search.read, index);
  const frameOf = frameReader(columns.section, originAt, search);
  for (const index of usable) {
    const origin = originAt(index);
    const frame = frameOf(index);
    const leg = valueAt(columns.leg, index);
    const slab = frame && slabOf(slabAt(columns, index, leg), frame, { origin, assembly });
    const known = frame && bySection.get(frame.name);
    if (!frame || !slab || !known) continue;
    const sample: Writable<Sample> = {
      name: valueAt(columns.sample, index),
      baseM: slab.baseM,
      topM: slab.topM,
      heightM: slab.heightM,
      notes: valueAt(columns.notes, index) ?? "",
      origin,
    };
    const densityGCm3 = valueAt(columns.density_g_cm3, index);
    const positionErrorM = lengthOf(valueAt(columns.position_error, index), frame);
    if (leg !== undefined) sample.leg = leg;
    if (densityGCm3 !== undefined) sample.densityGCm3 = densityGCm3;
    if (positionErrorM !== undefined) sample.positionErrorM = positionErrorM;
    addSample(sample, known, assembly);
  }
}

type Writable<T> = { -readonly [K in keyof T]: T[K] };

const slabAt = (
  { position, base, top, thickness }: ReadCells<typeof samples>["columns"],
  index: number,
  leg: string | undefined,
): SlabCells => ({
  position: valueAt(position, index),
  base: valueAt(base, index),
  top: valueAt(top, index),
  thickness: valueAt(thickness, index),
  ...(leg === undefined ? {} : { leg }),
});

function meantIn(bySection: SampleLists["bySection"]): SampleLists["meant"] {
  const finders = new Map<string, (sample: string) => MeantName>();
  return (section, sample) => {
    const find = finders.get(section) ?? meantNames(bySection.get(section)?.keys() ?? []);
    finders.set(section, find);
    return find(sample);
  };
}

/** A sample met again on another leg at the same level counts once; anything else of the same name is told. */
function addSample(sample: Sample, known: Map<string, Sample>, assembly: Assembly): void {
  const first = known.get(sample.name);
  if (!first) {
    known.set(sample.name, sample);
    return;
  }
  const isMetAgain =
    first.leg !== sample.leg &&
    Math.abs(first.baseM - sample.baseM) <= sameLevelM &&
    Math.abs(first.topM - sample.topM) <= sameLevelM;
  if (isMetAgain) return;
  const ofFile = first.origin.file === sample.origin.file ? "" : ` of ${first.origin.file}`;
  assembly.problems.add("redefined", {
    ...sample.origin,
    column: "sample",
    found: sample.name,
    detail: `sample ${sample.name} (first in row ${first.origin.row}${ofFile})`,
  });
}

type Derived = Map<string, Map<string, Sample>>;

/** Points where finds and measurements name both a sample and where it lies. Problems are told when those rows are read. */
function deriveSamples(bySection: Derived, frames: Frames, assembly: Assembly): void {
  for (const table of ["occurrences", "measurements"] as const) {
    const read = assembly.sheets.get(table);
    if (!read) continue;
    const at = (name: string) => read.sheet.columns.indexOf(name);
    const columns = {
      section: at("section"),
      sample: at("sample"),
      position: at("position"),
      base: at("base"),
      top: at("top"),
      leg: at("leg"),
    };
    let index = -1;
    for (const cells of read.sheet.rows) {
      index += 1;
      const text = (column: keyof typeof columns) => (cells[columns[column]] ?? "").trim().normalize("NFC");
      const frame = frames.usable.get(text("section"));
      const name = text("sample");
      const known = frame && bySection.get(frame.name);
      if (!frame || !known || name === "" || known.has(name)) continue;
      const origin = { file: read.sheet.file, row: read.sheet.rowNumbers[index] };
      const slab = quietSlab(text, frame, { origin, assembly });
      if (slab) known.set(name, { name, ...slab, notes: "", origin });
    }
  }
}

function quietSlab(
  text: (column: "position" | "base" | "top" | "leg") => string,
  frame: SectionFrame,
  place: { readonly origin: Origin; readonly assembly: Assembly },
) {
  const number = (column: "position" | "base" | "top") =>
    /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/.test(text(column)) ? Number(text(column)) : undefined;
  const leg = text("leg");
  const cells: SlabCells = {
    position: number("position"),
    base: number("base"),
    top: number("top"),
    ...(leg === "" ? {} : { leg }),
  };
  const silent = {
    ...place.assembly,
    problems: { add: () => {}, addOnce: () => {}, isFull: () => true, problems: () => [] },
  };
  return slabOf(cells, frame, { origin: place.origin, assembly: silent });
}

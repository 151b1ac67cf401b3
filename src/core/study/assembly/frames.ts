import { givenToHeight } from "../heights.ts";
import { levelRegister } from "../legs.ts";
import type { Axis, LengthUnit, Origin } from "../model.ts";
import { columnsOf } from "../sheet-rows.ts";
import { sections } from "../tables/sections.ts";
import {
  type Assembly,
  hintsIn,
  originOf,
  present,
  type ReadSheet,
  type Row,
  type SectionFrame,
} from "./context.ts";
import type { Frames } from "./frame-for.ts";
import { meantNames } from "./meant-name.ts";
import { readLegs } from "./read-legs.ts";
import { rowsOf } from "./rows.ts";

/** The name that the results give to all sections together. */
export const reservedSection = "joint";

interface Scale {
  readonly axis: Axis;
  readonly unit: LengthUnit;
}

/** Finds every section with its axis and unit: from sections.csv, column headers, or the settings; nothing is assumed. */
export function readFrames(assembly: Assembly): Frames {
  const listed = assembly.sheets.get("sections");
  const usable = new Map<string, SectionFrame>();
  const leftOut = new Map<string, string>();
  if (listed) readListed(assembly, { listed, usable, leftOut });
  else readNamed(assembly, usable, leftOut);
  return readLegs({ usable, leftOut, meant: meantSections(usable, assembly) }, assembly);
}

/** A listed section that no row names has its own name in doubt: it is no certain mend. */
function meantSections(usable: ReadonlyMap<string, SectionFrame>, assembly: Assembly): Frames["meant"] {
  const find = meantNames(usable.keys());
  let named: ReadonlySet<string> | undefined;
  return (section) => {
    const { now, ...meant } = find(section);
    if (now === undefined) return meant;
    named ??= new Set(
      [...assembly.sheets].flatMap(([table, read]) =>
        table === "sections" ? [] : [...namesIn(read).keys()],
      ),
    );
    return named.has(now) ? { ...meant, now } : meant;
  };
}

interface Listing {
  readonly listed: ReadSheet;
  readonly usable: Map<string, SectionFrame>;
  readonly leftOut: Map<string, string>;
}

function readListed(assembly: Assembly, { listed, usable, leftOut }: Listing): void {
  for (const name of namesIn(listed).keys()) {
    leftOut.set(name, "its row in sections.csv has an error");
  }
  for (const row of rowsOf(sections, assembly)) {
    const { section } = row.cells;
    if (usable.has(section)) {
      assembly.problems.add("redefined", {
        ...row.origin,
        column: "section",
        found: section,
        detail: `section ${section}`,
      });
      continue;
    }
    if (isReserved(section, row.origin, { assembly, leftOut })) continue;
    const frame = frameOf(row, listed, assembly);
    if (!frame) continue;
    usable.set(section, frame);
    leftOut.delete(section);
  }
}

function frameOf(row: Row<typeof sections>, listed: ReadSheet, assembly: Assembly): SectionFrame | undefined {
  const { cells, origin } = row;
  const named = { axis: cells.axis, unit: cells.unit };
  const scale = scaleOf(cells.section, named, { assembly, origin, own: listed });
  if (!scale) return undefined;
  const height = (position: number | undefined) =>
    position === undefined ? undefined : givenToHeight(position, scale);
  const bottomM = height(cells.bottom);
  const topM = height(cells.top);
  if (bottomM !== undefined && topM !== undefined && !(topM > bottomM)) {
    const found = `bottom ${cells.bottom}, top ${cells.top}`;
    assembly.problems.add("top-below-base", { ...origin, column: "top", found });
    return undefined;
  }
  const declared = {
    title: cells.name ?? cells.section,
    datum: cells.datum ?? "",
    source: cells.source ?? "",
    origin,
    ...present({ densityGCm3: cells.density_g_cm3, bottomM, topM }),
  };
  return { name: cells.section, ...scale, legs: new Map(), level: levelRegister(), declared };
}

/** Without sections.csv: one section per distinct name in the tables. */
function readNamed(
  assembly: Assembly,
  usable: Map<string, SectionFrame>,
  leftOut: Map<string, string>,
): void {
  const names = new Map<string, Origin>();
  for (const read of assembly.sheets.values()) {
    for (const [name, origin] of namesIn(read)) if (!names.has(name)) names.set(name, origin);
  }
  for (const [name, origin] of names) {
    if (isReserved(name, origin, { assembly, leftOut })) continue;
    const scale = scaleOf(name, {}, { assembly, origin });
    if (!scale) leftOut.set(name, "its axis and unit are not stated");
    else {
      const declared = { title: name, datum: "", source: "" };
      usable.set(name, { name, ...scale, legs: new Map(), level: levelRegister(), declared });
    }
  }
}

/** The name that the results give to all sections together cannot be a section's own. */
function isReserved(
  name: string,
  origin: Origin,
  { assembly, leftOut }: { readonly assembly: Assembly; readonly leftOut: Map<string, string> },
): boolean {
  if (name !== reservedSection) return false;
  assembly.problems.add("reserved-section", { ...origin, column: "section", found: name });
  leftOut.set(name, "it needs another name");
  return true;
}

/** The section names of a sheet, each with the row it is first met in. */
function namesIn(read: ReadSheet): ReadonlyMap<string, Origin> {
  const { sheet } = read;
  const names = new Map<string, Origin>();
  const isAboutSections = sheet.table !== "claims" && sheet.table !== "choices" && sheet.table !== "taxa";
  const column = isAboutSections ? sheet.columns.indexOf("section") : -1;
  if (column === -1) return names;
  const { values, codes } = columnsOf(sheet.rows, sheet.columns.length)[column];
  const seen = new Uint8Array(values.length);
  for (let index = 0; index < codes.length; index++) {
    if (seen[codes[index]] === 1) continue;
    seen[codes[index]] = 1;
    const name = values[codes[index]].trim().normalize("NFC");
    if (name !== "" && !names.has(name)) names.set(name, originOf(read, index));
  }
  return names;
}

interface ScaleSearch {
  readonly assembly: Assembly;
  readonly origin: Origin;
  readonly own?: ReadSheet;
}

/** Axis and unit: as its row says, else as the headers of the tables that hold it agree, else as the settings say. */
function scaleOf(section: string, said: Partial<Scale>, search: ScaleSearch): Scale | undefined {
  const { assembly, origin } = search;
  if (said.axis !== undefined && said.unit !== undefined) return { axis: said.axis, unit: said.unit };
  const sheets = [...assembly.sheets.values()].filter(
    (read) => read === search.own || namesIn(read).has(section),
  );
  const hints = sheets.flatMap((read) => hintsIn(read, section));
  const axes = new Set(hints.flatMap(({ axis }) => axis ?? []));
  const units = new Set(hints.flatMap(({ unit }) => unit ?? []));
  const axis = said.axis ?? only(axes) ?? assembly.settings.sections.axis;
  const unit = said.unit ?? only(units) ?? assembly.settings.sections.unit;
  if (axis !== undefined && unit !== undefined) return { axis, unit };
  const detail = axes.size > 1 || units.size > 1 ? "The headers contradict each other." : undefined;
  assembly.problems.add("axis-unknown", { ...origin, column: "section", found: section, detail });
  return undefined;
}

const only = <T>(values: ReadonlySet<T>): T | undefined => (values.size === 1 ? [...values][0] : undefined);

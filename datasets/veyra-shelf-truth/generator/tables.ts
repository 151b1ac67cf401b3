import { csv, type Row } from "./csv.ts";
import { drawsFor } from "./draws.ts";
import { horizonRows } from "./horizon-rows.ts";
import { occurrenceRows } from "./naming.ts";
import type { ExampleSample } from "./sampling.ts";
import { lengthText, ownText, upwardFromM } from "./scale.ts";
import { type SectionData, sectionData } from "./section-data.ts";
import type { TrueSection, Truth } from "./truth.ts";

/** A table of the study: its columns in order, and the rows that a section brings. */
interface TableMaker {
  readonly columns: string;
  readonly rows: (data: SectionData, truth: Truth) => Row[];
}

/** The reading of a leg at a level, linear between its rows. */
function readingAt(section: TrueSection, leg: string, upward: number): number {
  const rows = section.legs.find((candidate) => candidate.leg === leg)?.readings ?? [];
  const upper = Math.max(
    1,
    rows.findIndex(([, position]) => position >= upward),
  );
  const [low, high] = [rows[upper - 1], rows[upper]];
  if (low === undefined || high === undefined) throw new RangeError(`leg ${leg}: no rows about ${upward}`);
  return low[0] + ((upward - low[1]) * (high[0] - low[0])) / (high[1] - low[1]);
}

function cellAt(section: TrueSection, leg: string | undefined, upward: number): string {
  return leg === undefined ? ownText(section, upward) : readingAt(section, leg, upward).toFixed(2);
}

function samplePlace(section: TrueSection, sample: ExampleSample): Row {
  const cell = (upward: number) => cellAt(section, sample.leg, upward);
  const form = sample.kind === "bulk" ? section.bulk.form : "base-top";
  if (form === "base-top") return { base: cell(sample.base), top: cell(sample.top) };
  const position = cell((sample.base + sample.top) / 2);
  return form === "point"
    ? { position }
    : { position, thickness: lengthText(section, sample.top - sample.base) };
}

const sections: TableMaker = {
  columns: "section name axis unit datum bottom top density_g_cm3 source",
  rows: ({ section }) => [
    {
      section: section.section,
      name: section.name,
      axis: section.axis,
      unit: section.unit,
      datum: section.datum,
      bottom: ownText(section, upwardFromM(section, section.bottomM)),
      top: ownText(section, upwardFromM(section, section.topM)),
      density_g_cm3: "2.35",
      source: section.axis === "depth" ? "core log, S. Quandry" : "field book 2 and 3, I. Verrold",
    },
  ],
};

const legs: TableMaker = {
  columns: "section leg reading position",
  rows: ({ section }) =>
    section.legs.flatMap(({ leg, readings }) =>
      readings.map(([reading, position]) => ({
        section: section.section,
        leg,
        reading: reading.toFixed(2),
        position: position.toFixed(2),
      })),
    ),
};

const intervals: TableMaker = {
  columns: "section kind base top notes",
  rows: ({ section }) => section.intervals.map((interval) => ({ section: section.section, ...interval })),
};

const beds: TableMaker = {
  columns:
    "section base top lithology base_contact facies bioturbation carbonate_percent formation member notes",
  rows: ({ section, beds }) =>
    beds.map((bed) => ({
      section: section.section,
      base: ownText(section, bed.base),
      top: ownText(section, bed.top),
      lithology: bed.lithology,
      base_contact: bed.baseContact,
      facies: bed.facies,
      bioturbation: bed.bioturbation,
      carbonate_percent: bed.carbonatePercent,
      formation: bed.formation,
      member: bed.member,
      notes: bed.notes,
    })),
};

const samples: TableMaker = {
  columns: "section sample leg position base top thickness density_g_cm3 notes",
  rows: ({ section, samples }) =>
    samples.map((sample) => ({
      section: section.section,
      sample: sample.code,
      leg: sample.leg,
      ...samplePlace(section, sample),
      density_g_cm3: sample.kind === "slab" ? sample.densityGCm3.toFixed(2) : undefined,
      notes: sample.notes,
    })),
};

const searches: TableMaker = {
  columns: "section sample group effort effort_unit counting counted_to",
  rows: ({ section, searches }) =>
    searches.map(({ sample, group, effort }) => ({
      section: section.section,
      sample: sample.code,
      group: group.group,
      effort,
      effort_unit: group.effortUnit,
      counting: group.counting,
      counted_to: group.search === "bulk" ? 300 : undefined,
    })),
};

const occurrences: TableMaker = {
  columns: "section sample taxon count qualifier reworked doubtful",
  rows: ({ section, finds, index }, truth) => {
    const draws = drawsFor(truth.seed, index, "naming");
    return finds.flatMap((find) => occurrenceRows(find, section, draws));
  },
};

const measurements: TableMaker = {
  columns:
    "section sample analyte value unit error error_kind detection_limit trials amount amount_unit method",
  rows: ({ section, measurements }) =>
    measurements.map((measurement) => ({
      section: section.section,
      sample: measurement.sample.code,
      analyte: measurement.analyte,
      value: measurement.value,
      unit: measurement.unit,
      error: measurement.error,
      error_kind: measurement.errorKind,
      detection_limit: measurement.detectionLimit,
      trials: measurement.trials,
      amount: measurement.amount,
      amount_unit: measurement.amountUnit,
      method: measurement.method,
    })),
};

const horizons: TableMaker = {
  columns:
    "section horizon kind position below above shape age_ma age_error_ma age_error_kind dating_method laboratory notes",
  rows: (data, truth) => horizonRows(truth, data),
};

const bySection: Readonly<Record<string, TableMaker>> = {
  sections,
  legs,
  intervals,
  beds,
  samples,
  searches,
  occurrences,
  measurements,
  horizons,
};

function taxaTable(truth: Truth): string {
  const rows = truth.taxa.flatMap((taxon): Row[] => {
    const group = truth.groups.find((candidate) => candidate.group === taxon.group);
    const row = {
      group: taxon.group,
      mixing_length_m: group?.mixingLengthM,
      guild: taxon.guild,
      feeding: taxon.feeding,
    };
    if (taxon.synonym === undefined) return [{ ...row, taxon: taxon.name }];
    const older = { ...row, taxon: taxon.synonym, accepted: taxon.name, notes: "older name, same shells" };
    return [{ ...row, taxon: taxon.name }, older];
  });
  return csv("taxon group accepted mixing_length_m guild feeding notes".split(" "), rows);
}

/** The tables that the generator writes, by file name. */
export function studyTables(truth: Truth): Map<string, string> {
  const data = truth.sections.map((section, index) => sectionData(truth, section, index));
  const tables = new Map<string, string>();
  for (const [name, { columns, rows }] of Object.entries(bySection)) {
    tables.set(
      `${name}.csv`,
      csv(
        columns.split(" "),
        data.flatMap((one) => rows(one, truth)),
      ),
    );
  }
  return tables.set("taxa.csv", taxaTable(truth));
}

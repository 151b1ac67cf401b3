import { legWordings } from "./leg-wordings.ts";
import type { Problem } from "./problem.ts";
import { settingPath } from "./setting-path.ts";
import { sourceWordings } from "./source-wordings.ts";
import { caution, error, nearest, type ProblemPlace, type Wording } from "./wording.ts";

const column = (place: ProblemPlace) =>
  place.column === undefined ? "this column" : `column ${place.column}`;
/** The one table of wordings: every problem's expectation and mend, by code. */
const wordings = {
  ...sourceWordings,
  ...legWordings,
  "unknown-unit": (p) => error(p.detail ?? "a known unit", `Write one of the units listed.${nearest(p)}`),
  "ambiguous-ppt": () =>
    error(
      "a mass fraction in ppt (1e-12), never parts per thousand",
      "Write per mil for parts per thousand.",
    ),
  "blank-cell": (p) => error(`something in ${column(p)}`, `Fill ${column(p)} in, or take the row out.`),
  "one-of": (p) => error(`${p.detail}`, `Fill in ${p.detail}.`),
  "not-a-number": (p) =>
    error(
      `a number in ${column(p)}`,
      `Write digits with a decimal ${p.detail ?? "point"}, without a unit or other signs; leave it blank where there is none.`,
    ),
  "not-finite": (p) =>
    error(`a finite number in ${column(p)}`, "Leave the cell blank where there is no number."),
  "not-an-integer": (p) => error(`a whole number in ${column(p)}`, "Write a whole number."),
  "out-of-limits": (p) => error(`a number ${p.detail} in ${column(p)}`, "Correct the number."),
  "not-in-list": (p) => error(`one of ${p.detail}`, `Write one of these words.${nearest(p)}`),
  "not-yes-or-no": () => error("yes or no", "Write yes or no, or leave the cell blank."),
  "duplicate-row": (p) =>
    caution("each row once", `The same row stands in row ${p.detail}; it is used once.`),
  redefined: (p) =>
    error(
      `one row for ${p.detail}`,
      "It is given twice with different content: take one row out or rename one. The first is used.",
    ),
  "axis-unknown": (p) =>
    error(
      `the axis (height or depth) and unit (m, cm, mm, ft) of section ${p.found}`,
      `State them in sections.csv, in a column header such as "height (m)" or "depth_ft", in the settings sections.axis and sections.unit, or for one file under ${settingPath(["tables", p.file, "columns"])} (axis, unit).${p.detail ? ` ${p.detail}` : ""}`,
    ),
  "axis-contradicted": (p) =>
    error(
      `${p.detail}`,
      "Make the header and the section agree: its rows in this file are left out until then.",
    ),
  "unlisted-section": (p) =>
    error("a section of sections.csv", `Add the section to sections.csv or correct the name.${nearest(p)}`),
  "claim-elsewhere": (p) =>
    caution(
      "a section of the study, joint for all of them, or a blank",
      `The claim is kept and compared with nothing: correct the section's name.${nearest(p)}`,
    ),
  "reserved-section": () =>
    error(
      "a section of another name",
      "joint stands for all sections together in the results: rename the section.",
    ),
  "section-left-out": (p) =>
    error(`a section that can be used`, `Mend section ${p.found} first: ${p.detail}.`),
  "top-below-base": (p) => error("top above base", p.detail ?? "Exchange base and top, or correct them."),
  "half-slab": () =>
    error("both base and top, or neither", "Fill in the one that lacks, or take the other out."),
  "position-outside-slab": () =>
    error(
      "a position between base and top",
      "Correct the position, base or top, or leave the position blank.",
    ),
  "last-below-first": (p) =>
    error("last above first", p.detail ?? "Exchange first and last, or correct them."),
  "unknown-sample": (p) =>
    error(
      "a sample of this section in samples.csv",
      `Add the sample to samples.csv or correct its name.${nearest(p)}`,
    ),
  "sample-without-position": () =>
    error(
      "a position for the sample",
      "Add samples.csv with the sample's position, or give the position in the row.",
    ),
  "sample-elsewhere": (p) =>
    error(
      `the position of its sample (${p.detail})`,
      "Correct the sample or the position, or leave the position blank.",
    ),
  "count-zero": () => caution("a find", "A count of 0 is read as looked for and not found, never as a find."),
  "find-twice": (p) =>
    caution(
      "each taxon once in a sample",
      `Row ${p.detail} names it too: take one out, or add the two counts up. They are one horizon as they stand.`,
    ),
  "count-against-abundance": () =>
    caution(
      "a count and an abundance that both say found, or both not found",
      "Correct one of them. The count decides whether it is a find.",
    ),
  "one-level": () =>
    caution(
      "finds at two or more levels",
      "All finds stand at one level: no range can be estimated from them.",
    ),
  "one-occurrence": () => caution("two or more finds", "One find alone gives no range."),
  "find-in-hidden-rock": (p) =>
    caution(
      `a find outside ${p.detail}`,
      "It is set aside: correct its position, or base and top in intervals.csv.",
    ),
  "not-searched": (p) =>
    caution(
      `a search for ${p.detail} in this sample`,
      "Add the row to searches.csv if the group was looked for; until then the find counts for continuous methods only.",
    ),
  "searches-derived": () =>
    caution(
      "searches.csv",
      "Every sample is taken as searched for every group found in its section; add searches.csv to say who looked for what.",
    ),
  ungrouped: (p) => caution("a row in taxa.csv with a group", `Taken as group ungrouped: ${p.detail}.`),
  "value-missing": () => caution("a value", "The row has no value and is not used."),
  "trace-zero": () =>
    caution(
      "a value above 0 in a trace element",
      "Does 0 mean not detected? Then write bdl and the detection_limit, or <limit. It is used as 0 until then.",
    ),
  "isotope-scale-mixed": (p) =>
    error(
      `one scale for an isotope ratio in a section (${p.detail})`,
      "Convert the values to one scale; these are left out until then. Scales are never mixed.",
    ),
  "isotope-scale-unsaid": (p) =>
    caution(
      `the scale of the other rows (${p.detail})`,
      "Write the scale beside per mil, such as \u2030 VPDB. It is taken as the same until then.",
    ),
  "below-detection-limit": (p) =>
    caution(
      `a value of at least its detection_limit (${p.detail})`,
      "Does it stand for not detected? Then write bdl, or <limit. It is used as the number it is until then.",
    ),
  "no-detection-limit": () =>
    error("a detection_limit beside bdl", "Give the detection_limit of the row, or write <limit."),
  "nd-ambiguous": () =>
    error(
      "a value, bdl or a blank",
      "nd can mean two things: write bdl (with its detection_limit) for not detected, or leave the cell blank for not determined.",
    ),
  "trace-limits": () =>
    error("numbers for a trace", "Write detection limit..quantitation limit, such as 0.02..0.05."),
  "not-a-reading": () =>
    error(
      "a number, <0.05, >5 or 0.02..0.05",
      "Write the value in one of these forms, with a decimal point.",
    ),
  "not-a-polarity": () => error("N or R", "Write N (normal) or R (reversed), or leave the cell blank."),
  "interval-reversed": () => error("the lower number first", "Exchange the two numbers."),
  "more-successes": () => error("no more successes than trials", "Correct value or trials."),
  "error-kind-missing": (p) =>
    error(
      `${p.detail ?? "error_kind"} beside the error`,
      "Say what the error is: 1s, 2s, 1s%, 2s%, 95% or se.",
    ),
  "negative-age": () =>
    error("an age of 0 or more", "Ages are million years before present: write them without a sign."),
  "outside-section": (p) =>
    caution(
      `a position within the section (${p.detail})`,
      "Correct the position, or bottom and top in sections.csv.",
    ),
  "accepted-unlisted": (p) =>
    caution("a taxon with a row of its own", `Add a row for the accepted name to taxa.csv.${nearest(p)}`),
  "accepted-circle": (p) =>
    caution(
      "accepted names that end at one name",
      `${p.detail}: each keeps its own name until one of them accepts none.`,
    ),
  "beds-overlap": () =>
    caution("a base at the top of the bed below", "Correct base or top: two beds share this rock."),
  "beds-gap": () =>
    caution(
      "beds that follow on each other",
      "Correct base or top, or tell in intervals.csv what hides the rock between.",
    ),
  "samples-overlap": (p) =>
    caution(
      `samples ${p.detail} that share no rock`,
      "Correct base and top, or the thickness. Both are used as they stand: what both hold counts twice.",
    ),
  "ages-out-of-order": (p) =>
    caution(
      `ages in ${p.detail} that do not increase upward by more than twice their error`,
      "Correct the age, its error or the position of one of the two.",
    ),
  "horizon-order": (p) =>
    caution(
      `${p.detail}`,
      "Correct a position or a name; where one name stands for two horizons, give them two names. Both are used as they stand.",
    ),
  "unknown-qualifier": () =>
    caution(
      "a sign of open nomenclature (cf., aff., ?, ex gr., sp., spp., indet., sp. nov., s.l., s.s.)",
      "Write one of these signs; until then the find counts as if the cell were blank.",
    ),
  "similar-name": (p) =>
    caution(
      `one spelling of each ${p.detail}`,
      `${p.nearest} is written almost the same. If both are one ${p.detail}, write it alike everywhere${
        p.detail === "taxon"
          ? " or accept one for the other in taxa.csv; if they are two taxa, write its own name as accepted for one"
          : ""
      }. They stay apart until then.`,
    ),
  "impact-ambiguous": (p) =>
    error(
      `one impact horizon, or the main one named in boundary.horizon`,
      `Set boundary.horizon to one of ${p.detail}; if two names mean one horizon, declare it in boundary.same. No main horizon is used until then.`,
    ),
  "main-horizon-unknown": (p) =>
    error(
      p.detail ?? "a horizon of horizons.csv or boundary.same, or a found one such as iridium-1",
      `Correct the name or add the horizon: no section has a main horizon until then.${nearest(p)}`,
    ),
  "set-taxon-unknown": (p) =>
    caution(
      `a taxon of the study in set ${p.detail}`,
      `It adds nothing to the set: correct its name.${nearest(p)}`,
    ),
  "settings-unreadable": () => error("JSON", "Correct settings.json; the defaults are used until then."),
  "unknown-setting": (p) =>
    error("a known setting", `Take it out or correct its path; it is not used.${nearest(p)}`),
  "bad-setting": (p) =>
    error(p.detail ?? "another value", "Correct the value; the default is used until then."),
  "package-unreadable": () =>
    caution("a data package description in JSON", "Correct or take out datapackage.json; it is not used."),
} satisfies Record<string, Wording>;

export type ProblemCode = keyof typeof wordings;

const longestShown = 200;

/** A cell shortened for a message. */
export function excerpt(text: string): string {
  if (text.length <= longestShown) return text;
  return `${text.slice(0, longestShown)}… (${text.length} characters)`;
}

/** A problem in the words of its code. */
export function problem(code: ProblemCode, place: ProblemPlace): Problem {
  const wording: Wording = wordings[code];
  const { severity, expected, mend } = wording(place);
  const { file, row, column, now } = place;
  return {
    severity,
    code,
    file,
    ...(row === undefined ? {} : { row }),
    ...(column === undefined ? {} : { column }),
    found: excerpt(place.found),
    expected,
    mend: now === undefined || place.nearest !== undefined ? mend : `${mend} Here: ${excerpt(now)}`,
    ...(row === undefined || column === undefined || now === undefined
      ? {}
      : { fix: { file, row, column, now } }),
  };
}

import type { Caution } from "../../core/basis.ts";
import type { Flag, RefersTo } from "../../core/markers/result.ts";
import type { Study } from "../../core/study/model.ts";
import type { Weakness } from "../findings/finding.ts";
import { inMetres, metres, offset, percent, pValue, significant } from "./numbers.ts";
import { scenarioPhrase, variantWords } from "./scenarios.ts";
import { name, plural, say, strong, type Words } from "./words.ts";

/** What a caution's sentence may draw on. */
interface Told {
  readonly section: string;
  readonly subject: string;
  /** A number behind the caution; 0 where absent. */
  readonly n: (key: string) => number;
  readonly text: (key: string) => string;
}

const taxa = ({ n }: Told) => strong(plural(n("taxa"), "taxon", "taxa"));

const recoverySource = (source: string) =>
  ({ table: "recovery.csv", effort: "search effort", facies: "facies", trend: "a fitted trend" })[source] ??
  source;

/** The one table of wordings for everything that weakens a result. */
const wordings: Readonly<Record<string, (told: Told) => Words>> = {
  "zero-set-aside": ({ subject, n }) =>
    say`${plural(n("measurements"), "value")} of ${subject} given as 0 set aside: a trace element is below a limit, not absent.`,
  "overlapping-slabs": ({ subject, n }) =>
    say`${plural(n("pairs"), "pair")} of samples measured for ${subject} overlap; the rock between them is counted twice.`,
  "mixing-misfit": ({ subject, n }) =>
    say`Box mixing fits ${subject} poorly (${pValue(n("p"))}); its intervals are widened ${significant(n("inflation"), 2)} times.`,
  "profile-too-short": ({ subject, n }) =>
    say`${subject} was measured in ${plural(n("samples"), "sample")}, fewer than the ${n("needed")} a background needs.`,
  "no-main-horizon": () =>
    say`No impact horizon is given and no iridium horizon was found: there is no main horizon.`,
  "same-horizon-missing": ({ subject, text }) =>
    say`${subject}, declared to be ${text("name")} in boundary.same, was not found here.`,
  "main-horizon-ambiguous": (told) =>
    say`More than one impact horizon is given (${givenNames(told)}): name the main one in boundary.horizon.`,
  "horizon-twice": ({ subject, n }) =>
    say`${subject} stands ${n("count")} times in this section; the lowest or best measured is used.`,
  "boundary-horizon-unknown": ({ subject }) =>
    say`${subject}, named in boundary.horizon, is placed in no section.`,
  "given-found-differ": ({ subject, text, n }) =>
    say`The found ${text("found")} lies ${offset(n("differenceM"))}\u00a0m from the given ${subject}, more than two standard deviations.`,
  "horizon-placed-by-hand": ({ subject, text, n }) =>
    say`${subject} was placed by hand, ${offset(n("differenceM"))}\u00a0m from the ${text("source")} one; what follows stands on the pick.`,
  "pick-not-placed": ({ section, subject }) =>
    say`${subject} was placed by hand in ${section}, a section that is not there.`,
  "main-horizon-found": () =>
    say`No impact horizon is given: the found iridium horizon of largest fluence is taken for the main one.`,
  "main-horizon-by-section": ({ n }) =>
    say`No impact horizon is given: each of ${plural(n("sections"), "section")} is judged against its own iridium horizon, until boundary.same declares them one.`,
  "horizons-cross": ({ section, text }) =>
    say`${text("lower")} lies below ${text("upper")} in ${section} but above it in ${text("other")}: sections cannot be lined up on both.`,
  "datum-not-shared": () =>
    say`The sections share no main horizon yet: declare the found horizons one in boundary.same to line them up.`,
  "alignment-order-refused": ({ subject }) =>
    say`${subject} cannot be placed in one upward order on the common scale: align on fewer horizons.`,
  "section-without-datum": ({ section, subject }) => say`${section} has no ${subject} and is not lined up.`,
  "range-base-not-placed": ({ subject }) =>
    say`${subject}, the working base of ranges, is not placed here; first finds are used.`,
  "range-base-above-finds": (told) =>
    say`${taxa(told)} found below the working base keep their first find as base.`,
  "range-finds-outside-searches": (told) =>
    say`${plural(told.n("finds"), "find")} of ${taxa(told)} lie outside samples searched for their group and do not count in the method of sampled horizons.`,
  "range-unequal-effort": ({ text }) =>
    say`Efforts of searches cannot be compared (${text("groups")}); the method of sampled horizons takes detection as equal.`,
  "range-few-horizons": (told) =>
    say`${taxa(told)} with four horizons or fewer: such intervals mostly reflect the assumption.`,
  "range-reaches-top": (told) =>
    say`${taxa(told)} found up to the highest sample, where the upper end is open.`,
  "range-published-only": (told) => say`${taxa(told)} known from a published range alone, without the finds.`,
  "range-bound-above-section": (told) =>
    say`The interval of ${taxa(told)} ends above the section, where nobody searched.`,
  "range-bound-in-gap": (told) =>
    say`The interval of ${taxa(told)} ends inside rock that could not be searched; it is drawn to the top of it.`,
  "range-bound-open": (told) =>
    say`The interval of ${taxa(told)} is open by the method of sampled horizons: no barren horizon above closes it.`,
  "range-recovery-declines": ({ text, n }) =>
    say`${strong("Finds thin out upward")} (${pValue(n("p"))}): intervals by methods of constant recovery are too short, and ${text("method")} leads.`,
  "range-recovery-unavailable": ({ subject, text }) =>
    say`Recovery of ${subject} cannot be had from ${recoverySource(text("source"))} (${text("reason")}): it is taken as constant.`,
  "range-recovery-contradicted": (told) =>
    say`${plural(told.n("finds"), "find")} of ${taxa(told)} (${told.subject}) lie where ${recoverySource(told.text("source"))} says that nothing could be found.`,
  "range-recovery-misfit": ({ subject, text, n }) =>
    say`Finds of ${subject} do not fit the recovery taken from ${recoverySource(text("source"))} (${pValue(n("p"))}, ${n("finds")} finds): intervals rest on a shape that the finds contradict.`,
  "timing-recovery-not-shared": ({ text }) =>
    say`Recovery from ${recoverySource(text("source"))} differs between groups: sets of several groups (${text("names")}) are judged with constant recovery, those of one group with its own.`,
  "timing-uninformative-taxa": (told) =>
    say`${taxa(told)} with a single informative find left out of the tests; their finds still bound the common level from below.`,
  "timing-ties": (told) =>
    say`${taxa(told)} share the highest last find; the test rejects a little less often for it.`,
  "timing-aligned-too-well": ({ n }) =>
    say`Last finds agree better than chance allows (${pValue(n("p"))}): look for coarse sampling, a surface, or taxa chosen by their ends.`,
  "timing-one-level-rejected": ({ n }) =>
    say`One level is rejected (${pValue(n("p"))}): the common level among the numbers holds only if one is accepted all the same.`,
  "timing-no-common-end": () => say`No level could be the end of all of them at this confidence.`,
  "timing-box-rarest": ({ text, n }) =>
    say`The longest duration rests on ${name(text("taxon"))}, with ${n("horizons")} horizons.`,
  "timing-box-all-taxa": ({ n }) =>
    say`Fewer than two taxa have ${n("horizons")} horizons, so the longest duration uses all of them and is wide.`,
  "timing-recovery-declines": ({ n }) =>
    say`${strong("Finds thin out upward")} (${pValue(n("p"))}): methods of uniform recovery put ends too low and reject one level too often.`,
  "timing-less-effort-above": ({ text, n }) =>
    say`${strong(`Samples just above the highest find are small`)} for ${text("group")} (${significant(n("above"))} against ${significant(
      n("below"),
    )} ${text("unit")} below): taxa may go unseen there and the common level be put too low.`,
  "timing-reaches-top": ({ text, n }) =>
    say`${plural(n("taxa"), "candidate")} found up to the highest sample (${name(text("names"))}); the answer stands with and without.`,
  "timing-turns-on-top": ({ n }) =>
    say`The answer turns on taxa that reach the top: ${pValue(n("all"))} with them, ${pValue(n("other"))} without.`,
  "timing-isolated-finds": ({ text, n }) =>
    say`${plural(n("taxa"), "highest find")} out of keeping with those below (${name(text("names"))}), as reworked or leaked ones would be; the answer stands with and without.`,
  "timing-turns-on-isolated": ({ n }) =>
    say`The answer turns on isolated highest finds: ${pValue(n("all"))} with them, ${pValue(n("other"))} without.`,
  "timing-trimmed-finds": ({ text, n }) =>
    say`Finds of ${plural(n("taxa"), "candidate")} above the main horizon, up to the reworking ceiling, left out (${name(text("names"))}); the answer stands with and without.`,
  "timing-turns-on-trimming": ({ n }) =>
    say`The answer turns on finds below the reworking ceiling: ${pValue(n("all"))} without them, ${pValue(n("other"))} with them.`,
  "timing-clustered-at-surfaces": ({ n }) =>
    say`${n("count")} of ${plural(n("taxa"), "last find")} cluster just below surfaces (${pValue(n("p"))}): a pulse there may be the record breaking off.`,
  "timing-surface-not-placed": ({ text }) =>
    say`${text("name")}, named in timing.surfaces.horizons, is not placed here.`,
  "timing-steps-overlap": ({ text, n }) =>
    say`${plural(n("taxa"), "taxon", "taxa")} declared in both steps, ${name(text("names"))}, enter neither.`,
  "timing-steps-incomplete": ({ text, n }) =>
    say`${plural(n("taxa"), "name")} in timing.steps match no candidate or group here: ${name(text("names"))}.`,
  "timing-survivors": ({ text, n }) =>
    say`${plural(n("taxa"), "survivor")} never ${n("taxa") === 1 ? "enters" : "enter"} a test: ${name(text("names"))}.`,
  "timing-most-survive": ({ n }) =>
    say`${strong("Most taxa live on")} above the main horizon (${n("survivors")}, against ${n("taxa")} whose end is in question): those not found above it look as if they ended near it, wherever they did.`,
  "timing-late-starts": ({ text, n }) =>
    say`${plural(n("taxa"), "late start")} left out: ${name(text("names"))}.`,
  "timing-too-few-horizons": ({ text, n }) =>
    say`${plural(n("taxa"), "taxon", "taxa")} with too few horizons left out: ${name(text("names"))}.`,
  "timing-window-widened": ({ n }) =>
    say`timing.window does not span the last finds and was widened to ${metres(n("lowM"))} to ${metres(n("highM"))} m of height.`,
  "scenario-order-changes": ({ text }) =>
    say`${strong("Which scenario comes first turns on what is taken for granted")}: as declared ${scenarioPhrase(text("best"))}, otherwise ${changesWords(text("changes"))}.`,
  "scenario-pulses-too-near": ({ n }) =>
    say`Pulses nearer than about ${inMetres(n("limitM"))} cannot be told apart by such data; two would lie ${inMetres(n("medianM"))} apart.`,
  "scenario-mass-at-edge": ({ n }) =>
    say`${percent(n("mass"))} of the probability of the one level lies at the top of timing.window: the window decides the answer.`,
  "scenario-leans-on-recovery": ({ text, n }) =>
    say`Finds thin out upward (${pValue(n("p"))}): the comparison of scenarios, with ${scenarioPhrase(text("best"))} first, leans on constant recovery.`,
  "scenario-horizon-favoured": ({ n }) =>
    say`One level at a horizon comes first also because its level is given: with levels free, two pulses against one stand at ${significant(n("ratio"), 2)} to 1, and an earlier pulse beside one at the horizon is ${strong("not excluded")}.`,
  "scenario-level-mixed": ({ text, n }) =>
    say`Sediment is mixed over about ${inMetres(n("lengthM"))} at ${text("horizon")}: elsewhere last finds, and a level or pulse that rests on them, may lie several times that above where taxa ended.`,
  "joint-horizon-not-shared": () =>
    say`The sections are not answered together: declare their main horizons one in boundary.same.`,
  "joint-sections-left-out": ({ text, n }) =>
    say`${text("names")} ${n("sections") === 1 ? "is" : "are"} left out of what is said of the sections together: ${leftOutFor(text("scale"), text("horizon"))}.`,
  "joint-window-widened": ({ text }) =>
    say`timing.window does not span the last finds of ${text("names")}: where the sections are taken together it is wider than declared.`,
  "joint-sections-differ": ({ n }) =>
    say`One distance from the horizon in all sections is ${strong("rejected")} (${pValue(n("p"))}): what is said of them together holds only if it is accepted all the same.`,
  "joint-sections-likely-differ": ({ n }) =>
    say`A level of its own in every section is the likelier (${percent(n("free"))}): what is said of them together holds only if they share one all the same.`,
  "joint-between-samples": ({ text, n }) =>
    say`Taxa were looked for in samples alone: by the horizons searched the common level is ${offset(n("low"))} to ${offset(n("high"))}\u00a0${text("unit")}, beyond what finds that could lie anywhere allow.`,
  "joint-recovery-declines": ({ text }) =>
    say`${strong("Finds thin out upward")} in ${text("names")}: the level of all sections together is put too low.`,
  "joint-one-level-rejected": ({ text }) =>
    say`One level for all of these taxa is rejected in ${text("names")}, but taken for granted in what is said of the sections together.`,
  "joint-turns-on-section": ({ text, n }) =>
    say`The answer turns on ${text("without")}: without it the middle of what is likely lies at ${offset(n("median"))}\u00a0${text("unit")}.`,
  "joint-mass-at-edge": ({ n }) =>
    say`${percent(n("mass"))} of the probability of the level common to all sections lies at the top of timing.window: the window decides the answer.`,
  "joint-survivors": ({ text, n }) =>
    say`${plural(n("taxa"), "taxon lives", "taxa live")} on above the horizon in some section and never ${n("taxa") === 1 ? "enters" : "enter"} there: ${name(text("names"))}.`,
  "joint-survive-elsewhere": ({ text, n }) =>
    say`${plural(n("taxa"), "taxon that ends", "taxa that end")} in one section ${n("taxa") === 1 ? "lives" : "live"} on in another (${name(text("names"))}): ${n("taxa") === 1 ? "that end is" : "those ends are"} local.`,
  "timing-set-name-taken": ({ subject }) =>
    say`The declared set ${subject} has a reserved name and was not used.`,
  "timing-set-incomplete": ({ subject, n }) =>
    say`${n("missing")} of the ${n("taxa")} taxa declared in ${subject} are not candidates here.`,
};

/** The codes that have words: a test holds that every caution of the core has some. */
export const wordedCautions: ReadonlySet<string> = new Set(Object.keys(wordings));

/** Facts to know, told as notes; every other caution is a warning: it can change the answer. */
const notes: ReadonlySet<string> = new Set([
  "horizon-twice",
  "joint-sections-left-out",
  "joint-survivors",
  "joint-window-widened",
  "main-horizon-found",
  "profile-too-short",
  "range-base-above-finds",
  "range-bound-above-section",
  "range-bound-in-gap",
  "range-bound-open",
  "range-few-horizons",
  "range-finds-outside-searches",
  "range-published-only",
  "range-reaches-top",
  "timing-box-all-taxa",
  "timing-box-rarest",
  "timing-late-starts",
  "timing-set-incomplete",
  "timing-steps-incomplete",
  "timing-survivors",
  "timing-ties",
  "timing-too-few-horizons",
  "timing-trimmed-finds",
  "timing-uninformative-taxa",
  "timing-window-widened",
  "zero-set-aside",
]);

export function weaknessOf(caution: Caution, study: Study): Weakness {
  const severity = notes.has(caution.code) ? "note" : "warning";
  return { code: caution.code, severity, words: cautionWords(caution, study) };
}

function cautionWords(caution: Caution, study: Study): Words {
  const { numbers = {} } = caution;
  const section = study.sections.find((s) => s.name === caution.section)?.title ?? caution.section ?? "";
  const told: Told = {
    section,
    subject: caution.subject ?? "",
    n: (key) => Number(numbers[key] ?? 0),
    text: (key) => String(numbers[key] ?? ""),
  };
  return wordings[caution.code]?.(told) ?? say`${caution.code}`;
}

function leftOutFor(scale: string, horizon: string): string {
  if (scale === "common") return "not on the common scale";
  return scale === "time" ? `no ${horizon}, or no rate in timing.rates` : `no ${horizon} placed`;
}

/** `equal (gradual), confined (single)` as a person reads it. */
const changesWords = (changes: string): string =>
  changes.replaceAll(
    /([a-z-]+) \(([^)]+)\)/g,
    (_, variant: string, best: string) => `${scenarioPhrase(best)} with ${variantWords(variant)}`,
  );

function givenNames({ n, text }: Told): string {
  return Array.from({ length: n("count") }, (_, i) => text(`name${i + 1}`)).join(", ");
}

/** A flag with the quantities that raised it. */
export function flagWords({ horizon, flag, numbers, consequence }: Flag): Words {
  const quantities = Object.entries(numbers).map(([key, value]) => quantityWords(key, value));
  const behind = quantities.length > 0 ? ` (${quantities.join(", ")})` : "";
  return say`${horizon}, ${flag.toLowerCase().replaceAll("_", " ")}: ${consequence}${behind}.`;
}

/** Endings of the names of quantities, and the unit each stands for. */
const unitEndings: readonly (readonly [RegExp, string])[] = [
  [/GCm3$/, " g/cm\u00b3"],
  [/CmPerKa$/, " cm/ka"],
  [/Cm$/, " cm"],
  [/Ma$/, " Ma"],
  [/M$/, " m"],
];

/** `thickestCm: 3` as `thickest 3 cm`, `sameLithology: 24` as `same lithology 24`. */
function quantityWords(key: string, value: number): string {
  const [ending, unit] = unitEndings.find(([pattern]) => pattern.test(key)) ?? [/$^/, ""];
  const words = key.replace(ending, "").replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
  return `${words} ${significant(value)}${unit}`;
}

export function refersToWords(refersTo: RefersTo): string {
  return {
    "event-surface": "the event surface",
    "base-of-smear": "the base of the smear",
    contact: "a contact",
    level: "the level itself",
  }[refersTo];
}

import type { Section, Study } from "../study/model.ts";
import { type RangesInput, sectionCases } from "./cases.ts";
import { caseUnder, type Leading, leadingMethods, marked } from "./leading.ts";
import { rangeMethods } from "./methods.ts";
import { turnedBack, turnedTaper } from "./mirrored.ts";
import type { RangeCase } from "./range-case.ts";
import type { RangeMethod, Ranges, Taper } from "./result.ts";
import { taper } from "./taper.ts";

interface Followed {
  /** Taxa whose tapers follow. */
  readonly tapersOf: ReadonlySet<string>;
  /** Methods whose rows follow, at both ends; default none: the tapers alone. */
  readonly methods?: readonly RangeMethod[];
}

/** Methods whose tapers take longer than a frame: they stand until the whole is worked out. */
const slow: ReadonlySet<RangeMethod> = new Set<RangeMethod>(["declining"]);

/** The ends of one section that follow while a choice is being tried: those of the methods in view, and the tapers. */
export function followedEnds(
  section: Section,
  study: Study,
  { input, tapersOf, methods }: Followed & { readonly input: RangesInput },
): Pick<Ranges, "ends" | "tapers" | "baseTapers"> {
  const asked = withMethods(study, methods);
  const taxa = sectionCases(section, asked, input);
  const candidates = taxa.filter(({ isCandidate }) => isCandidate);
  const declared = asked.settings.ranges.methods;
  const atTop = leadingMethods(
    candidates.map(({ top }) => top),
    declared,
  );
  const atBase = leadingMethods(
    candidates.map(({ base }) => base),
    declared,
  );
  const drawn = taxa.filter(({ top }) => tapersOf.has(top.taxon.taxon));
  const tapers = tapersUnder(
    atTop,
    drawn.map(({ top }) => top),
  );
  const baseTapers = tapersUnder(
    atBase,
    drawn.map(({ base }) => base),
  ).map(turnedTaper);
  if (methods === undefined) return { ends: [], tapers, baseTapers };
  const rows = (method: RangeMethod) =>
    taxa.flatMap((each) => {
      const [top, base] = [caseUnder(atTop, each.top), caseUnder(atBase, each.base)];
      return [
        marked(atTop, top, rangeMethods[method].end(top)),
        turnedBack(marked(atBase, base, rangeMethods[method].end(base))),
      ];
    });
  return { ends: methods.flatMap(rows), tapers, baseTapers };
}

function tapersUnder(leading: Leading, cases: readonly RangeCase[]): Taper[] {
  const [method = "uniform"] = leading.methods;
  return slow.has(method) ? [] : cases.flatMap((each) => taper(caseUnder(leading, each), method) ?? []);
}

/** Without the methods that cost and that are neither in view nor could lead: a fitted recovery is one. */
function withMethods(study: Study, shown: readonly RangeMethod[] = []): Study {
  const { ranges } = study.settings;
  const [first] = ranges.methods;
  if (first === "recovery" || shown.includes("recovery")) return study;
  const methods = ranges.methods.filter((method) => method !== "recovery");
  return { ...study, settings: { ...study.settings, ranges: { ...ranges, methods } } };
}

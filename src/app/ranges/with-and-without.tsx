import { type ReactElement, useEffect, useState } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { type CountedFind, endsWithFinds } from "../../core/ranges/asked-ends.ts";
import type { RangeEnd, RangeMethod } from "../../core/ranges/result.ts";
import type { Section } from "../../core/study/model.ts";
import { endWords } from "../../report/findings/end-words.ts";
import { plural } from "../../report/wordings/words.ts";
import margin from "../margin/margin.module.css";
import type { Opened } from "../state/page-context.ts";
import type { ListedFind } from "./listed-finds.ts";

interface Asked {
  readonly section: Section;
  readonly taxon: string;
  readonly method: RangeMethod | undefined;
}

interface WithAndWithoutProps {
  readonly open: Opened;
  readonly asked: Asked;
  readonly finds: readonly ListedFind[];
}

interface Line {
  readonly label: string;
  readonly top: RangeEnd | undefined;
}

/** The upper end as it stands, with every find that does not count, and without the highest that does. */
export function WithAndWithout({ open, asked, finds }: WithAndWithoutProps): ReactElement | null {
  const { analysis } = open;
  const { section, taxon, method } = asked;
  const key = `${taxon} ${method} ${finds.map(({ row, isUsed }) => `${row}${isUsed}`).join()}`;
  const [found, setFound] = useState<{ readonly analysis: Analysis; key: string; lines: readonly Line[] }>();
  const isDue = found?.analysis !== analysis || found.key !== key;
  useEffect(() => {
    if (!isDue || method === undefined) return undefined;
    const timer = setTimeout(() =>
      setFound({ analysis, key, lines: linesOf(analysis, { section: section.name, taxon, method }, finds) }),
    );
    return () => clearTimeout(timer);
  }, [isDue, analysis, key, section, taxon, method, finds]);
  if (method === undefined || found === undefined || isDue) return null;
  return (
    <dl className={margin.numbers} aria-label="With and without finds">
      {found.lines.map(({ label, top }) => (
        <div key={label}>
          <dt>{label}</dt>
          <dd>{top === undefined ? "no find is left" : endWords(section, top)}</dd>
        </div>
      ))}
    </dl>
  );
}

interface Question {
  readonly section: string;
  readonly taxon: string;
  readonly method: RangeMethod;
}

function linesOf(analysis: Analysis, question: Question, listed: readonly ListedFind[]): readonly Line[] {
  const used = listed.filter(({ isUsed }) => isUsed);
  const others = listed.filter(({ isUsed }) => !isUsed);
  const highest = used[0]?.heightM;
  const endOf = (finds: readonly CountedFind[]) =>
    endsWithFinds(analysis, { ...question, finds: finds.toReversed() })?.top;
  return [
    { label: `By ${question.method}, as it stands`, top: endOf(used) },
    ...(others.length === 0
      ? []
      : [
          {
            label: `with ${plural(others.length, "find")} more, set aside now`,
            top: endOf(listed),
          },
        ]),
    { label: "without its highest find", top: endOf(used.filter(({ heightM }) => heightM !== highest)) },
  ];
}

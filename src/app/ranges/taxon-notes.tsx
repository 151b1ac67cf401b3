import { type ReactElement, useMemo } from "react";
import type { Section } from "../../core/study/model.ts";
import { taxonFinding } from "../../report/findings/taxon.ts";
import { percent, position } from "../../report/wordings/numbers.ts";
import { plural } from "../../report/wordings/words.ts";
import margin from "../margin/margin.module.css";
import { Why, type WhyStep } from "../margin/why.tsx";
import { WordsText } from "../margin/words-text.tsx";
import { placeOfMark } from "../plate/mark.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { FindsList } from "./finds-list.tsx";
import { listedFinds } from "./listed-finds.ts";
import styles from "./ranges.module.css";
import { heldAside } from "./set-aside.ts";
import { WithAndWithout } from "./with-and-without.tsx";

/** The taxon in focus beside the range chart: what its ends come to, why, and its finds. */
export function TaxonNotes({ open }: { readonly open: Opened }): ReactElement | null {
  const { section, ranges } = open.focus;
  if (section === undefined) return null;
  if (ranges.taxon === undefined)
    return (
      <p className={styles.quiet}>
        Click a range, or press t on a mark beneath the plate, to take a taxon in focus.
      </p>
    );
  return <InFocus open={open} section={section} taxon={ranges.taxon} />;
}

interface InFocusProps {
  readonly open: Opened;
  readonly section: Section;
  readonly taxon: string;
}

function InFocus({ open, section, taxon }: InFocusProps): ReactElement {
  const { state, go } = usePage();
  const { analysis, focus } = open;
  const finding = useMemo(() => taxonFinding(analysis, section, taxon), [analysis, section, taxon]);
  const held = useMemo(() => heldAside(state.history, section.name), [state.history, section.name]);
  const finds = listedFinds(analysis, { section: section.name, taxon, held });
  if (finding === undefined)
    return (
      <section className={`${margin.part} ${styles.focus}`}>
        <h2>In focus</h2>
        <p className={styles.words}>
          No find of <i>{taxon}</i> counts in {section.title}.
        </p>
        <FindsList finds={finds} section={section} open={open} />
      </section>
    );
  const openRow = (row: string) => () => go(placeOfMark({ kind: "row", name: row }, analysis));
  const rowsOf = (isUsed: boolean) =>
    finds
      .filter((find) => find.isUsed === isUsed)
      .map(({ row, heightM, words }) => ({
        row,
        words: isUsed ? position(section, heightM) : `${position(section, heightM)}, ${words}`,
        open: openRow(row),
      }));
  const [used, aside] = [rowsOf(true), rowsOf(false)];
  const chainOf = ({ top }: (typeof finding.methods)[number]): readonly WhyStep[] => {
    const basis = analysis.ranges.basis.find(({ method }) => method === top.method);
    return [
      ...(basis === undefined
        ? []
        : [
            { title: "Method", words: basis.statement },
            { title: "It assumes", words: basis.assumptions.join("; ") },
          ]),
      {
        title: "Inputs",
        words: `${plural(top.horizons, "horizon")} from ${position(section, top.firstM)} to ${position(section, top.lastM)}; level ${percent(top.level)}; names read ${top.identification === "strict" ? "strictly" : "inclusively"}.`,
      },
      ...(top.note === "" ? [] : [{ title: "Beside it", words: top.note }]),
      { title: `Finds used (${used.length})`, rows: used },
      ...(aside.length === 0 ? [] : [{ title: `Finds that do not count (${aside.length})`, rows: aside }]),
    ];
  };
  return (
    <section className={`${margin.part} ${styles.focus}`} aria-label={`${taxon} in focus`}>
      <h2>In focus</h2>
      <p className={styles.words} data-testid="taxon">
        <WordsText words={finding.sentence} />
      </p>
      <WithAndWithout
        open={open}
        asked={{ section, taxon, method: focus.ranges.method ?? finding.methods[0]?.top.method }}
        finds={finds}
      />
      <h2>Its upper end by every method</h2>
      {finding.methods.map((line) => (
        <Why
          key={line.label}
          label={line.label}
          value={line.value}
          chain={chainOf(line)}
          {...(line.note === undefined ? {} : { note: line.note })}
        />
      ))}
      <FindsList finds={finds} section={section} open={open} />
    </section>
  );
}

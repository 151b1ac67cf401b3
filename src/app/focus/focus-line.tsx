import type { ReactElement } from "react";
import type { Analysis } from "../../core/analysis-result.ts";
import { setTitle } from "../../report/wordings/set-title.ts";
import type { Focus } from "../state/focus.ts";
import { usePage } from "../state/page-context.ts";
import { SCALES } from "../state/place.ts";
import { scaleTitle } from "../state/scale-title.ts";
import styles from "./focus-line.module.css";
import { Picker } from "./picker.tsx";

/** What every plate is about: section, main horizon, set of taxa and vertical scale, the same at every station. */
export function FocusLine(): ReactElement {
  const { open, study } = usePage();
  return (
    <section className={styles.line} aria-label="Focus">
      {open === undefined ? (
        <span className={styles.item}>
          {study.readOut === undefined
            ? "No study is open yet."
            : "Its tables are read; it is not worked out yet."}
        </span>
      ) : (
        <Focused {...open} />
      )}
    </section>
  );
}

function Focused({ analysis, focus }: { readonly analysis: Analysis; readonly focus: Focus }): ReactElement {
  const { go } = usePage();
  const { sections } = analysis.study;
  const horizon = horizonName(analysis, focus);
  const isFence = focus.station === "fence";
  return (
    <>
      <Picker
        label={isFence && sections.length > 1 ? `All ${sections.length} sections, reading in` : "Section"}
        value={focus.section?.name ?? ""}
        choices={sections.map(({ name, title }) => ({ value: name, title }))}
        choose={(section) => go({ section })}
      />
      <span className={styles.item}>
        <span className={styles.label}>Main horizon</span>
        <span className={styles.horizon}>
          {horizon !== undefined && <span aria-hidden="true" className={styles.sign} />}
          <span className={styles.horizonName} title={horizon}>
            {horizon ?? "not placed here"}
          </span>
        </span>
      </span>
      <Picker
        label="Taxa"
        value={focus.set?.set ?? ""}
        choices={focus.sets.map(({ set, taxa }) => ({
          value: set,
          title: `${setTitle(set)} (${taxa.length})`,
        }))}
        choose={(set) => go({ set })}
      />
      <Picker
        label="Scale"
        value={focus.scale}
        choices={SCALES.map((scale) => ({ value: scale, title: scaleTitle(scale, focus.section) }))}
        choose={(value) => go({ scale: SCALES.find((scale) => scale === value) })}
      />
    </>
  );
}

function horizonName(analysis: Analysis, { section }: Focus): string | undefined {
  const here = section && analysis.markers.main.bySection.get(section.name);
  if (here === undefined) return undefined;
  return analysis.markers.main.name ?? here.name;
}

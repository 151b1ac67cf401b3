import { ChevronLeft, ChevronRight } from "lucide-react";
import type { ReactElement } from "react";
import { recoveryStance } from "../../core/ranges/leading.ts";
import type { RangeMethod } from "../../core/ranges/result.ts";
import { groupLabel, groupSigns } from "../../figures/plates/searched-groups.ts";
import { Picker } from "../focus/picker.tsx";
import type { Opened } from "../state/page-context.ts";
import { usePage } from "../state/page-context.ts";
import styles from "./ranges.module.css";
import { changedRanges, groupsInFocus } from "./ranges-actions.ts";
import type { RangesPage } from "./ranges-drawing.ts";
import { METHODS, ORDERS } from "./ranges-place.ts";

const STANCES = {
  "holds-under-decline": ", holds under decline",
  "fits-recovery": ", fits recovery",
  "even-recovery": "",
} as const;

interface ToolsProps {
  readonly open: Opened;
  readonly shown: RangesPage;
  readonly isWorking: boolean;
}

/** How the range chart is looked at: by which method, in which order, what is folded, and which page. */
export function RangesTools({ open, shown, isWorking }: ToolsProps): ReactElement {
  const page = usePage();
  const place = page.state.place.ranges;
  const { analysis, focus } = open;
  const methods = analysis.study.settings.ranges.methods;
  const leading = analysis.ranges.ends.find(({ section }) => section === focus.section?.name)?.method;
  return (
    <div className={styles.tools} role="toolbar" aria-label="Range chart">
      <div className={styles.row}>
        <button
          type="button"
          className={styles.turn}
          aria-pressed={place.isCompared}
          title="Compare methods (c)"
          onClick={() => changedRanges(page, { isCompared: !place.isCompared, page: 1 })}
        >
          Compare
        </button>
        {!place.isCompared && (
          <Picker
            label="Method"
            value={place.method ?? ""}
            choices={[
              { value: "", title: leading === undefined ? "leading" : `leading: ${leading}` },
              ...methods.map((method) => ({ value: method, title: methodTitle(method) })),
            ]}
            choose={(value) => changedRanges(page, { method: METHODS.find((method) => method === value) })}
          />
        )}
        <Picker
          label="Order"
          value={place.order}
          choices={ORDERS.map(({ id, title }) => ({ value: id, title }))}
          choose={(value) =>
            changedRanges(page, { order: ORDERS.find(({ id }) => id === value)?.id, page: 1 })
          }
        />
        <TaxonPicker open={open} />
        <Pages shown={shown} />
        <output className={styles.working}>{isWorking ? "Tapers are being worked out" : ""}</output>
      </div>
      {!place.isCompared && <FoldRow open={open} />}
    </div>
  );
}

const methodTitle = (method: RangeMethod): string => `${method}${STANCES[recoveryStance(method)]}`;

function TaxonPicker({ open }: Pick<ToolsProps, "open">): ReactElement {
  const page = usePage();
  const names = open.analysis.taxa
    .filter(({ section }) => section === open.focus.section?.name)
    .map(({ taxon }) => taxon)
    .toSorted();
  return (
    <Picker
      label="Taxon"
      value={page.state.place.ranges.taxon ?? ""}
      choices={[{ value: "", title: "none" }, ...names.map((name) => ({ value: name, title: name }))]}
      choose={(value) => changedRanges(page, { taxon: value === "" ? undefined : value })}
    />
  );
}

function Pages({ shown }: Pick<ToolsProps, "shown">): ReactElement | null {
  const page = usePage();
  const { page: at, pages } = shown;
  if (pages < 2) return null;
  return (
    <span className={styles.pages}>
      <button
        type="button"
        aria-label="Previous page of taxa"
        title="Previous page ([)"
        aria-disabled={at <= 1}
        onClick={() => at > 1 && changedRanges(page, { page: at - 1 })}
      >
        <ChevronLeft aria-hidden size={15} />
      </button>
      <span aria-live="polite">
        {at} of {pages}
      </span>
      <button
        type="button"
        aria-label="Next page of taxa"
        title="Next page (])"
        aria-disabled={at >= pages}
        onClick={() => at < pages && changedRanges(page, { page: at + 1 })}
      >
        <ChevronRight aria-hidden size={15} />
      </button>
    </span>
  );
}

/** Each group as a button that folds it into a strip of its last finds. */
function FoldRow({ open }: Pick<ToolsProps, "open">): ReactElement {
  const page = usePage();
  const { folded, isLeaningShown } = page.state.place.ranges;
  const signs = groupSigns(open.analysis);
  const turned = (group: string) =>
    folded.includes(group) ? folded.filter((other) => other !== group) : [...folded, group];
  return (
    <div className={styles.row}>
      <span className={styles.label}>Fold</span>
      {groupsInFocus({ open }).map((group) => (
        <button
          key={group}
          type="button"
          className={styles.turn}
          aria-pressed={folded.includes(group)}
          onClick={() => changedRanges(page, { folded: turned(group), page: 1 })}
        >
          <b>{signs.get(group)?.letter}</b> {groupLabel(group)}
        </button>
      ))}
      <label className={styles.check}>
        <input
          type="checkbox"
          checked={isLeaningShown}
          onChange={(event) => changedRanges(page, { isLeaningShown: event.currentTarget.checked })}
        />
        How far ends lean
      </label>
    </div>
  );
}

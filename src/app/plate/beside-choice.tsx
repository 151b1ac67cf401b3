import type { ReactElement } from "react";
import type { Scenario } from "../../core/timing/result.ts";
import { leadingLevels } from "../../figures/plates/timing-columns.tsx";
import { scenarioTitle } from "../../report/wordings/scenarios.ts";
import { type Opened, usePage } from "../state/page-context.ts";

const LASTS = "last-finds";

/** What the timing plate shows beside its ranges: the levels of a scenario, or the last finds against one common end. */
export function BesideChoice({ open }: { readonly open: Opened }): ReactElement | null {
  const { state, dispatch } = usePage();
  const { focus, analysis } = open;
  const { section, set, station } = focus;
  if (station !== "timing" || section === undefined || set === undefined) return null;
  const here = { section: section.name, set: set.set };
  const isHere = (one: typeof here) => one.section === here.section && one.set === here.set;
  const scenarios = [...new Set(analysis.timing.densities.filter(isHere).map(({ scenario }) => scenario))];
  const hasLasts = analysis.timing.lastFinds.some(isHere);
  const { shows, scenario } = state.beside;
  const chosen = scenarios.find((one) => one === scenario) ?? leadingLevels(analysis, here);
  return (
    <select
      aria-label="Beside the ranges"
      value={shows === LASTS && hasLasts ? LASTS : (chosen ?? "")}
      onChange={({ currentTarget: { value } }) =>
        dispatch({
          kind: "beside-shown",
          beside: value === LASTS ? { shows: LASTS } : { scenario: scenarios.find((one) => one === value) },
        })
      }
    >
      {chosen === undefined && <option value="">Where a level may lie</option>}
      {scenarios.map((one) => (
        <option key={one} value={one}>
          {optionWords(one)}
        </option>
      ))}
      {hasLasts && <option value={LASTS}>Last finds against one level</option>}
    </select>
  );
}

const optionWords = (scenario: Scenario): string =>
  scenario === "single" ? "Where, if one level" : `Where, if ${scenarioTitle({ scenario }).toLowerCase()}`;

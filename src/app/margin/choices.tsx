import { type ReactElement, useState } from "react";
import { Button, Dialog, DialogTrigger, Popover } from "react-aria-components";
import type { Analysis } from "../../core/analysis-result.ts";
import { knownSettingPaths } from "../../core/study/setting-path.ts";
import type { Station } from "../../report/findings/finding.ts";
import trial from "../trial/trial.module.css";
import { ChoiceChip, SettingForm } from "./choice-chip.tsx";
import { choicesFor } from "./choices-for.ts";
import styles from "./margin.module.css";

interface ChoicesProps {
  readonly analysis: Analysis;
  readonly station: Station;
}

/** The settings in force that this plate depends on, each open to be tried otherwise; dark ones were chosen for this study. */
export function Choices({ analysis, station }: ChoicesProps): ReactElement | null {
  const choices = choicesFor(station, analysis.study.settings);
  if (choices.length === 0) return null;
  return (
    <section className={styles.part}>
      <h2>Choices that matter here</h2>
      <ul className={styles.chips}>
        {choices.map((choice) => (
          <li key={choice.setting}>
            <ChoiceChip analysis={analysis} {...choice} />
          </li>
        ))}
        <li>
          <OtherSetting analysis={analysis} />
        </li>
      </ul>
      {choices.some(({ isChanged }) => isChanged) && (
        <p className={styles.legend}>Dark: chosen for this study. Light: the default.</p>
      )}
    </section>
  );
}

/** Every setting there is, one at a time. */
function OtherSetting({ analysis }: { readonly analysis: Analysis }): ReactElement {
  const [setting, setSetting] = useState("seed");
  return (
    <DialogTrigger>
      <Button className={styles.chip}>Any other setting…</Button>
      <Popover placement="top" className={trial.popover}>
        <Dialog aria-label="Try any setting">
          <div className={trial.field}>
            <label htmlFor="any-setting">Setting</label>
            <select
              id="any-setting"
              value={setting}
              onChange={(event) => setSetting(event.currentTarget.value)}
            >
              {knownSettingPaths().map((path) => (
                <option key={path}>{path}</option>
              ))}
            </select>
          </div>
          <SettingForm key={setting} analysis={analysis} setting={setting} />
        </Dialog>
      </Popover>
    </DialogTrigger>
  );
}

import { type ReactElement, useState } from "react";
import { Button, Dialog, DialogTrigger, Popover } from "react-aria-components";
import type { Analysis } from "../../core/analysis-result.ts";
import { settingField } from "../../core/study/setting-field.ts";
import { usePage } from "../state/page-context.ts";
import { isTrying } from "../state/page-state.ts";
import { valueWords } from "../trial/kept-step.ts";
import styles from "../trial/trial.module.css";
import { settingAt } from "../trial/trial.ts";
import { KeepForm } from "../trial/trial-bar.tsx";
import { useTrial } from "../trial/use-trial.ts";
import margin from "./margin.module.css";

interface ChipProps {
  readonly analysis: Analysis;
  readonly setting: string;
  readonly words: string;
  readonly isChanged: boolean;
}

/** A setting in force, which opens to be tried otherwise. */
export function ChoiceChip({ analysis, setting, words, isChanged }: ChipProps): ReactElement {
  return (
    <DialogTrigger>
      <Button className={isChanged ? `${margin.chip} ${margin.changed}` : margin.chip}>
        {words}
        {isChanged && <span className={margin.said}>, chosen for this study</span>}
      </Button>
      <Popover placement="top" className={styles.popover}>
        <Dialog aria-label={`Try ${setting}`}>
          <SettingForm analysis={analysis} setting={setting} />
        </Dialog>
      </Popover>
    </DialogTrigger>
  );
}

/** One setting as a field of its kind, what it says, and the reason where it is to be kept. */
export function SettingForm({
  analysis,
  setting,
}: {
  readonly analysis: Analysis;
  readonly setting: string;
}): ReactElement {
  const { state, open } = usePage();
  const field = settingField(setting);
  const refused = open?.trying?.refused;
  return (
    <>
      <h2>{setting}</h2>
      {field?.words !== undefined && <p>{field.words}</p>}
      <SettingField
        key={setting}
        setting={setting}
        options={field?.options}
        isNumber={field?.kind === "number"}
        value={settingAt(analysis.study.settings, setting.split("."))}
      />
      {refused !== undefined && <p className={styles.refused}>This cannot be: {refused}</p>}
      {isTrying(state.trial) && <KeepForm />}
    </>
  );
}

interface FieldProps {
  readonly setting: string;
  readonly value: unknown;
  readonly options: readonly string[] | undefined;
  readonly isNumber: boolean;
}

function SettingField({ setting, value, options, isNumber }: FieldProps): ReactElement {
  const { tryOut } = useTrial();
  const [typed, setTyped] = useState<string>();
  const take = (text: string) => tryOut({ path: setting.split("."), value: valueOf(text) });
  const shown = typed ?? valueWords(value);
  return (
    <div className={styles.field}>
      <label htmlFor="setting-field">{options ? "Choose" : isNumber ? "Number" : "Text or JSON"}</label>
      {options ? (
        <select id="setting-field" value={shown} onChange={(event) => take(event.currentTarget.value)}>
          {options.map((option) => (
            <option key={option}>{option}</option>
          ))}
        </select>
      ) : (
        <input
          id="setting-field"
          inputMode={isNumber ? "decimal" : undefined}
          value={shown}
          onChange={(event) => setTyped(event.currentTarget.value)}
          onBlur={() => typed !== undefined && take(typed)}
          onKeyDown={(event) => event.key === "Enter" && typed !== undefined && take(typed)}
        />
      )}
    </div>
  );
}

/** JSON where the text is JSON, nothing where it is blank, else the text itself. */
function valueOf(text: string): unknown {
  if (text.trim() === "") return undefined;
  try {
    const value: unknown = JSON.parse(text);
    return value;
  } catch {
    return text;
  }
}

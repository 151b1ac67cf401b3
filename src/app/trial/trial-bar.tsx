import { type FormEvent, type ReactElement, useState } from "react";
import type { SettingChange } from "../../core/study/changed-settings.ts";
import { settingPath } from "../../core/study/setting-path.ts";
import margin from "../margin/margin.module.css";
import { type Opened, usePage } from "../state/page-context.ts";
import { isTrying } from "../state/page-state.ts";
import { valueWords } from "./kept-step.ts";
import styles from "./trial.module.css";
import { settingAt } from "./trial.ts";
import { useTrial } from "./use-trial.ts";

/** What is tried against what was, until it is kept as a choice with its reason or let go. */
export function TrialBar({ open }: { readonly open: Opened }): ReactElement | null {
  const { state, study } = usePage();
  const { trial, work } = state;
  const { trying } = open;
  if (!isTrying(trial)) return null;
  const settings = (trying?.was ?? open.analysis).study.settings;
  return (
    <section className={`${margin.part} ${styles.bar}`} aria-label="Being tried">
      <h2>Being tried</h2>
      {trial.changes.length > 0 && (
        <ul>
          {trial.changes.map((change) => (
            <li key={settingPath(change.path)}>{changeWords(change, settings)}</li>
          ))}
        </ul>
      )}
      {trial.level !== undefined && <p>One level, asked about.</p>}
      <output>{trying && progressWords(trying)}</output>
      {work.kind === "busy" && work.isTrial && (
        <div className={styles.progress}>
          <progress aria-label="Working out what is tried" max={1} value={work.share} />
          <button type="button" className={styles.plain} onClick={study.cancel}>
            Cancel
          </button>
        </div>
      )}
      <KeepForm />
    </section>
  );
}

/** The reason for a choice, and the two ways on from trying it. */
export function KeepForm(): ReactElement {
  const { keep, letGo } = useTrial();
  const { open } = usePage();
  const [reason, setReason] = useState("");
  const isRefused = open?.trying?.refused !== undefined;
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (reason.trim() !== "" && !isRefused) keep(reason.trim());
  };
  return (
    <form className={styles.keep} onSubmit={submit}>
      <label>
        Reason
        <input
          value={reason}
          required
          onChange={(event) => setReason(event.currentTarget.value)}
          onKeyDown={(event) => event.key === "Escape" && letGo()}
        />
      </label>
      <button type="submit" disabled={isRefused}>
        Keep
      </button>
      <button type="button" onClick={letGo}>
        Let go
      </button>
    </form>
  );
}

function progressWords({ refused, isWhole }: NonNullable<Opened["trying"]>): string {
  if (refused !== undefined) return `This cannot be: ${refused}`;
  return isWhole
    ? "All of it is worked out."
    : "What has a closed form is shown as tried; the rest is as it was until it is worked out.";
}

function changeWords({ path, value }: SettingChange, settings: unknown): string {
  if (path.join(".") === "boundary.picks" && Array.isArray(value)) {
    const was = new Set((listAt(settings, path) ?? []).map(valueWords));
    return value
      .filter((pick) => !was.has(valueWords(pick)))
      .map((pick: unknown) => `${text(pick, "horizon")} placed at ${text(pick, "position")}`)
      .join("; ");
  }
  const was = settingAt(settings, path);
  return `${settingPath(path)} ${valueWords(value)}, was ${was === undefined ? "not set" : valueWords(was)}`;
}

const text = (value: unknown, name: string): string => valueWords(settingAt(value, [name]));

function listAt(settings: unknown, path: readonly string[]): readonly unknown[] | undefined {
  const value = settingAt(settings, path);
  return Array.isArray(value) ? value : undefined;
}

import { type ReactElement, useId } from "react";
import styles from "./focus-line.module.css";

interface PickerProps {
  readonly label: string;
  readonly value: string;
  readonly choices: readonly { readonly value: string; readonly title: string }[];
  readonly choose: (value: string) => void;
}

export function Picker({ label, value, choices, choose }: PickerProps): ReactElement {
  const id = useId();
  return (
    <span className={styles.item}>
      <label className={styles.label} htmlFor={id}>
        {label}
      </label>
      <select
        id={id}
        className={styles.select}
        value={value}
        disabled={choices.length === 0}
        onChange={(event) => choose(event.currentTarget.value)}
      >
        {choices.length === 0 && <option value="">none</option>}
        {choices.map((choice) => (
          <option key={choice.value} value={choice.value}>
            {choice.title}
          </option>
        ))}
      </select>
    </span>
  );
}

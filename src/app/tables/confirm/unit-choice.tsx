import type { ReactElement } from "react";
import type { Sheet } from "../../../core/study/model.ts";
import type { Recognition } from "../../../core/study/recognised.ts";
import type { Settings } from "../../../core/study/settings.ts";
import { usePage } from "../../state/page-context.ts";
import { pathOf } from "./choices-of-sheet.ts";
import styles from "./confirm.module.css";
import { ownUnits } from "./questions.ts";

interface UnitChoiceProps {
  readonly sheet: Sheet;
  readonly column: Recognition;
  readonly settings: Settings;
}

/** Fields for the unit of a column, and for the axis where nothing says it; blank is asked. */
export function UnitChoice({ sheet, column, settings }: UnitChoiceProps): ReactElement | null {
  const { study } = usePage();
  const { header, is, unit = "", axis = "", asks } = column;
  const set = (name: "unit" | "axis", value: string) => {
    const path = pathOf(sheet.file, settings, "columns", header.trim(), name);
    study.settle(value === "" ? { path } : { path, value });
  };
  if (ownUnits.has(is))
    return <OwnUnit key={unit} {...{ header, unit }} set={(value) => set("unit", value)} />;
  const asksAxis = asks === "axis" || asks === "axis-and-unit";
  return (
    <>
      {asksAxis && (
        <select
          aria-label={`Axis of ${header}`}
          value={axis}
          onChange={(event) => set("axis", event.currentTarget.value)}
        >
          <option value="">height or depth?</option>
          <option value="height">height</option>
          <option value="depth">depth</option>
        </select>
      )}
      <select
        aria-label={`Unit of ${header}`}
        value={unit}
        onChange={(event) => set("unit", event.currentTarget.value)}
      >
        <option value="">unit?</option>
        {["m", "cm", "mm", "ft"].map((unit) => (
          <option key={unit}>{unit}</option>
        ))}
      </select>
    </>
  );
}

interface OwnUnitProps {
  readonly header: string;
  readonly unit: string;
  readonly set: (unit: string) => void;
}

/** A unit to write: values, efforts and amounts have many. */
function OwnUnit({ header, unit, set }: OwnUnitProps): ReactElement {
  return (
    <input
      className={styles.own}
      aria-label={`Unit of ${header}`}
      defaultValue={unit}
      placeholder="unit?"
      onBlur={(event) => event.currentTarget.value !== unit && set(event.currentTarget.value.trim())}
      onKeyDown={(event) => {
        if (event.key === "Enter") event.currentTarget.blur();
      }}
    />
  );
}

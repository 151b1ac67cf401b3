import type { ReactElement } from "react";
import styles from "./plate.module.css";
import type { Pointed } from "./use-marks.ts";

/** Names the mark under the pointer or the focus, and frames all that is drawn for it. */
export function MarkLabel({
  pointed,
  keys,
}: {
  readonly pointed: Pointed | undefined;
  readonly keys?: string;
}): ReactElement | null {
  if (pointed === undefined) return null;
  const { mark, box } = pointed;
  const { isRight, ...style } = box;
  return (
    <div className={styles.mark} style={style} aria-hidden="true">
      <span className={isRight ? styles.nameLeft : styles.name}>
        {mark.kind === "taxon" ? <i>{mark.name}</i> : mark.name}
        <small>double-click: its rows{keys && `, ${keys}`}</small>
      </span>
    </div>
  );
}

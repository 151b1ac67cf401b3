import type { ReactElement, ReactNode } from "react";
import styles from "./empty.module.css";

/** Stands where something would be: what is missing, and where it would come from. */
export function Empty({
  title,
  children,
}: {
  readonly title: string;
  readonly children: ReactNode;
}): ReactElement {
  return (
    <div className={styles.empty}>
      <h2>{title}</h2>
      <p>{children}</p>
    </div>
  );
}

import { type DragEvent, type ReactElement, type ReactNode, useState } from "react";
import { usePage } from "../state/page-context.ts";
import styles from "./drop-target.module.css";
import { droppedStudy } from "./dropped-study.ts";

const carriesFiles = ({ dataTransfer }: DragEvent) => dataTransfer.types.includes("Files");

/** Takes a study dropped anywhere on the page. */
export function DropTarget({ children }: { readonly children: ReactNode }): ReactElement {
  const { study } = usePage();
  const [isOver, setIsOver] = useState(false);
  return (
    <div
      className={styles.target}
      onDragOver={(event) => {
        if (!carriesFiles(event)) return;
        event.preventDefault();
        event.dataTransfer.dropEffect = "copy";
        setIsOver(true);
      }}
      onDragLeave={(event) => {
        if (event.relatedTarget === null) setIsOver(false);
      }}
      onDrop={(event) => {
        if (!carriesFiles(event)) return;
        event.preventDefault();
        setIsOver(false);
        study.open("what was dropped", droppedStudy(event.dataTransfer));
      }}
    >
      {children}
      {isOver && (
        <div className={styles.veil}>
          <p>Let go to read this study. It stays on this machine.</p>
        </div>
      )}
    </div>
  );
}

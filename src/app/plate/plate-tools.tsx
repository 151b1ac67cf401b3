import { Download, Maximize2, ZoomIn, ZoomOut } from "lucide-react";
import { type ReactElement, useState } from "react";
import type { Drawing } from "../../figures/plates/drawing.ts";
import { type Action, actionsOf } from "../state/actions.ts";
import { type Opened, usePage } from "../state/page-context.ts";
import { BesideChoice } from "./beside-choice.tsx";
import { downloadPlate } from "./download-plate.ts";
import styles from "./plate.module.css";

const ICONS = { nearer: ZoomIn, further: ZoomOut, whole: Maximize2 } as const;

/** The keys of its frame as buttons, and the way to take it along as a file. */
export function PlateTools({
  drawing,
  open,
  again,
}: {
  readonly drawing: Drawing;
  readonly open: Opened;
  readonly again?: (fontFaces: string) => Drawing;
}): ReactElement {
  const page = usePage();
  const [failure, setFailure] = useState("");
  const actions = actionsOf(page).filter(({ id }) => id in ICONS);
  return (
    <div className={styles.tools}>
      <span className={styles.failure} role="alert">
        {failure}
      </span>
      <BesideChoice open={open} />
      {actions.map((action) => (
        <FrameButton key={action.id} action={action} />
      ))}
      <button
        type="button"
        className={styles.download}
        title={`Save ${drawing.title} as it is seen`}
        onClick={() => {
          setFailure("");
          downloadPlate(open, page.state, again).catch((error: unknown) => setFailure(String(error)));
        }}
      >
        <Download aria-hidden size={14} /> SVG
      </button>
    </div>
  );
}

function FrameButton({ action }: { readonly action: Action }): ReactElement | null {
  const { id, label, shortcut, isAvailable, act } = action;
  const Icon = id === "nearer" || id === "further" || id === "whole" ? ICONS[id] : undefined;
  if (Icon === undefined) return null;
  return (
    <button
      type="button"
      aria-label={label}
      title={`${label} (${shortcut})`}
      aria-disabled={!isAvailable}
      onClick={() => isAvailable && act()}
    >
      <Icon aria-hidden size={15} />
    </button>
  );
}

import type { ReactElement } from "react";
import type { Drawing, Panel } from "../../figures/plates/drawing.ts";
import { position } from "../../report/wordings/numbers.ts";
import { usePage } from "../state/page-context.ts";
import styles from "./plate.module.css";
import { extentOf, type Reading } from "./use-reading.ts";

interface ReadingLineProps {
  readonly drawing: Drawing;
  readonly reading: Reading;
  readonly pixelsPerPoint: number;
}

/** The reading line across every panel, with the value each panel has there. Laid over the plate, no part of it. */
export function ReadingLine({ drawing, reading, pixelsPerPoint }: ReadingLineProps): ReactElement | null {
  const { open } = usePage();
  const { panel, section, heightM } = reading;
  if (open === undefined || panel === undefined || section === undefined || heightM === undefined)
    return null;
  const y = panel.scale(heightM);
  if (y < panel.top - 0.5 || y > panel.bottom + 0.5) return null;
  const [lowest, highest] = extentOf(panel);
  return (
    <>
      <div className={styles.line} style={{ top: y * pixelsPerPoint }} aria-hidden="true" />
      {drawing.panels
        .filter((other) => other !== panel && y >= other.top && y <= other.bottom)
        .map((other) => (
          <span
            key={other.section}
            className={styles.otherTag}
            style={{ top: y * pixelsPerPoint, left: other.left * pixelsPerPoint }}
            aria-hidden="true"
          >
            {valueIn(other, y, open.analysis.study.sections)}
          </span>
        ))}
      <div
        className={styles.tag}
        style={{ top: y * pixelsPerPoint, left: drawing.panels.length > 1 ? panel.left * pixelsPerPoint : 0 }}
        // oxlint-disable-next-line jsx-a11y/prefer-tag-over-role -- a range input has no place at a height
        role="slider"
        tabIndex={0}
        aria-label="Reading line"
        aria-orientation="vertical"
        aria-valuemin={lowest}
        aria-valuemax={highest}
        aria-valuenow={heightM}
        aria-valuetext={position(section, heightM)}
      >
        {position(section, heightM).replace("depth\u00a0", "")}
      </div>
    </>
  );
}

function valueIn(panel: Panel, y: number, sections: readonly Parameters<typeof position>[0][]): string {
  const section = sections.find(({ name }) => name === panel.section);
  return section === undefined ? "" : position(section, panel.scale.invert(y)).replace("depth\u00a0", "");
}

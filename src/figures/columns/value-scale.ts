import { scaleLinear, scaleLog } from "d3";
import { textWidth } from "../text.ts";
import { TEXT } from "../theme.ts";
import type { ValueTick } from "./column-ground.tsx";
import type { ValueScale } from "./value-column.tsx";

interface ColumnScale {
  readonly scale: ValueScale;
  readonly tickLabels: readonly ValueTick[];
}

const INSET = 4;

/** A logarithmic scale across a column, ticked at powers of ten. */
export function logColumn([low, high]: readonly [number, number], width: number): ColumnScale {
  if (!(low > 0 && high > low))
    throw new RangeError(`logColumn: expected 0 < low < high, got ${low} and ${high}`);
  const scale = scaleLog([low, high], [INSET, width - INSET]).clamp(true);
  const powers = scale
    .ticks()
    .filter((value) => Math.abs(Math.log10(value) - Math.round(Math.log10(value))) < 1e-9);
  const labels = powers.map((value) => ({ value, label: String(Number(value.toPrecision(3))) }));
  return { scale, tickLabels: thinned(labels, scale) };
}

/** A linear scale across a column, with a few round ticks. */
export function linearColumn(
  [low, high]: readonly [number, number],
  width: number,
  tickCount = 2,
): ColumnScale {
  if (!(high > low)) throw new RangeError(`linearColumn: expected low < high, got ${low} and ${high}`);
  const scale = scaleLinear([low, high], [INSET, width - INSET]).clamp(true);
  const format = scale.tickFormat(tickCount);
  const tickLabels = scale
    .ticks(tickCount)
    .map((value) => ({ value, label: format(value).replace(/^-/, "−") }));
  return { scale, tickLabels: thinned(tickLabels, scale) };
}

const LABEL_GAP = 4;

/** Every label, or every second, third ... counted from the highest, so that none touches its neighbour. */
function thinned(labels: readonly ValueTick[], scale: ValueScale): readonly ValueTick[] {
  for (let every = 1; every < labels.length; every++) {
    const kept = labels.filter((_, i) => (labels.length - 1 - i) % every === 0);
    if (kept.every((tick, i) => i === 0 || !touches(kept[i - 1] ?? tick, tick, scale))) return kept;
  }
  return labels.slice(-1);
}

function touches(before: ValueTick, tick: ValueTick, scale: ValueScale): boolean {
  const halves = (textWidth(before.label, TEXT.unit) + textWidth(tick.label, TEXT.unit)) / 2;
  return scale(tick.value) - scale(before.value) < halves + LABEL_GAP;
}

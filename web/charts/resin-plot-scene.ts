import type { Ink } from './ink.ts';
import type { ResinPlot, Weight } from './resin-plot.ts';

/** A plot, the colours it is drawn in, and where the cursor stands; changed in place, then drawn again. */
export interface PlotScene {
  plot: ResinPlot;
  ink: Ink;
  cursorX: number | null;
}

export function colourOfWeight(weight: Weight, ink: Ink): string {
  if (weight === 'second') return ink.accent;
  return weight === 'given' ? ink.faint : ink.ink;
}

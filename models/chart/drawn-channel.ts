import type { ChannelLayout } from '../log/layout.ts';
import { scaledReading } from '../log/readings.ts';
import { correctionAt } from '../run/channel.ts';
import type { LoadSensor } from '../run/load.ts';
import type { Strip } from './chart.ts';
import { scanAtOrAfter } from './scan-at.ts';
import { type Conversion, converted } from './shown-unit.ts';

/** One channel as it is drawn: its figures, and how they read in the strip's unit. */
export interface DrawnChannel {
  readonly layout: ChannelLayout;
  readonly strip: Strip;
  readonly timeMs: Float64Array;
  /** [n], `NaN` where absent. */
  readonly figures: Float64Array;
  /** Strip's unit from a figure; rises or falls throughout, so that an extreme figure is an extreme value. */
  readonly shown: (figure: number) => number;
  readonly isFalling: boolean;
  /** Least and greatest figure; null where there is none. */
  readonly range: readonly [number, number] | null;
}

/** A channel with its scale, its corrections and the strip's unit taken into account. */
export function drawnChannel(
  layout: ChannelLayout,
  strip: Strip,
  timeMs: Float64Array,
  figures: Float64Array,
  conversion: Conversion,
  sensor: LoadSensor | undefined,
): DrawnChannel {
  const points = sensor?.corrections ?? [];
  const corrected = (figure: number) => {
    const reading = scaledReading(figure, layout);
    return points.length === 0 ? reading : reading + correctionAt(reading, points);
  };
  const channel = { layout, strip, timeMs };
  if (keepOrder(points)) {
    return {
      ...channel,
      figures,
      range: rangeOf(figures),
      shown: (figure) => converted(corrected(figure), conversion),
      isFalling: (layout.scale ?? 1) * conversion.slope < 0,
    };
  }
  const readings = figures.map(corrected);
  return {
    ...channel,
    figures: readings,
    range: rangeOf(readings),
    shown: (reading) => converted(reading, conversion),
    isFalling: conversion.slope < 0,
  };
}

/** Whether corrected readings rise wherever readings rise: no correction falls faster than one for one. */
function keepOrder(points: readonly (readonly [number, number])[]): boolean {
  return points.every(([at, correction], i) => {
    const before = points[i - 1];
    return before === undefined || correction - before[1] > before[0] - at;
  });
}

function rangeOf(figures: Float64Array): readonly [number, number] | null {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < figures.length; i++) {
    const figure = figures[i]!;
    if (figure < least) least = figure;
    if (figure > greatest) greatest = figure;
  }
  return least <= greatest ? [least, greatest] : null;
}

/** What a channel shows at an instant, on the straight line between its readings; null outside them. */
export function shownAt(channel: DrawnChannel, instantMs: number): number | null {
  const { timeMs, figures, shown } = channel;
  let before = -1;
  for (let i = scanAtOrAfter(timeMs, instantMs); i < timeMs.length; i++) {
    if (Number.isNaN(figures[i]!)) continue;
    if (timeMs[i] === instantMs) return shown(figures[i]!);
    for (before = i - 1; before >= 0 && Number.isNaN(figures[before]!); ) before -= 1;
    if (before < 0) return null;
    const share = (instantMs - timeMs[before]!) / (timeMs[i]! - timeMs[before]!);
    const [left, right] = [shown(figures[before]!), shown(figures[i]!)];
    return left + share * (right - left);
  }
  return null;
}

/** Lowest and highest of a channel between two instants, ends included; null where it has no reading there. */
export function extremesOf(
  channel: DrawnChannel,
  fromMs: number,
  untilMs: number,
): { lowest: number; lowestMs: number; highest: number; highestMs: number } | null {
  const { timeMs, figures, shown, isFalling } = channel;
  let least = -1;
  let greatest = -1;
  for (let i = scanAtOrAfter(timeMs, fromMs); i < timeMs.length && timeMs[i]! <= untilMs; i++) {
    const figure = figures[i]!;
    if (Number.isNaN(figure)) continue;
    if (least < 0 || figure < figures[least]!) least = i;
    if (greatest < 0 || figure > figures[greatest]!) greatest = i;
  }
  if (least < 0) return null;
  const [lowest, highest] = isFalling ? [greatest, least] : [least, greatest];
  return {
    lowest: shown(figures[lowest]!),
    lowestMs: timeMs[lowest]!,
    highest: shown(figures[highest]!),
    highestMs: timeMs[highest]!,
  };
}

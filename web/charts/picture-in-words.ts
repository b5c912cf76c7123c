import type { RunChart } from '../../models/chart/chart.ts';
import { clock } from '../words/clock.ts';
import { count, figure, listed } from '../words/figures.ts';
import { zone } from '../workshop.ts';
import { isStrong } from './draw-names.ts';

/** What the canvas shows, for whoever cannot see it; the table holds the figures. */
export function pictureInWords(chart: RunChart): string {
  const at = (hours: number) => clock(chart.zeroMs + hours * 3_600_000, zone.value);
  const temperatures = chart.lines.filter((line) => line.strip === 'temperature');
  const unit = chart.strips.find(({ strip }) => strip === 'temperature')?.unit ?? '';
  const highest = Math.max(
    ...temperatures.flatMap((line) => line.value.map((value) => value ?? Number.NEGATIVE_INFINITY)),
  );
  const strong = temperatures.filter(isStrong);
  // One gap of the log is hatched on every strip.
  const gaps = new Set(chart.hatches.filter(({ isOfAll }) => isOfAll).map(({ fromH, untilH }) => `${fromH} ${untilH}`));
  return [
    `Chart from ${at(chart.fromH)} to ${at(chart.untilH)}: ${count(temperatures.length, 'temperature')}, highest ${figure(highest, unit)}.`,
    strong.length > 0 ? `Named: ${listed(strong.map(({ label }) => label))}.` : '',
    ...chart.bands.filter(({ kind }) => kind === 'dwell').map(({ text }) => `${text}.`),
    ...chart.breaches.map((breach) => `Broken at ${at(breach.fromH)}: ${breach.text}.`),
    ...(chart.estimates.length > 0 ? ['Estimated:', ...chart.estimates] : []),
    gaps.size > 0 ? `${count(gaps.size, 'gap')} without readings.` : '',
    'The table holds the figures.',
  ]
    .filter(Boolean)
    .join(' ');
}

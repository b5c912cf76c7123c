import type { RunChart, StripAxis } from '../../models/chart/chart.ts';
import { hoursWords } from '../../models/chart/ticks.ts';
import { clockWithSeconds } from '../words/clock.ts';
import { figure } from '../words/figures.ts';
import { zone } from '../workshop.ts';
import { isStrong } from './draw-names.ts';
import { valueAt } from './value-at.ts';

/** Every value at the cursor in one column, sorted by value within its strip. */
export function Readout({ chart, atH }: { chart: RunChart; atH: number }) {
  return (
    <div class="readout" data-side={atH > (chart.fromH + chart.untilH) / 2 ? 'left' : 'right'}>
      <p>
        <b>{clockWithSeconds(chart.zeroMs + atH * 3_600_000, zone.value)}</b> {hoursWords(Math.round(atH * 60) * 60)}
      </p>
      <dl>
        {chart.strips
          .flatMap((axis) => valuesOf(chart, axis, atH))
          .map(({ name, text, isStrong }) => (
            <div key={name} class={isStrong ? 'strong' : ''}>
              <dt>{name}</dt>
              <dd>{text}</dd>
            </div>
          ))}
      </dl>
    </div>
  );
}

interface Value {
  readonly name: string;
  readonly text: string;
  readonly isStrong: boolean;
}

function valuesOf(chart: RunChart, { strip, unit }: StripAxis, atH: number): Value[] {
  return chart.lines
    .filter((line) => line.strip === strip)
    .map((line) => ({ line, value: valueAt(line, atH) }))
    .sort((a, b) => (b.value ?? Number.NEGATIVE_INFINITY) - (a.value ?? Number.NEGATIVE_INFINITY))
    .map(({ line, value }) => ({
      name: NAMES[strip] ? `${line.channel} ${NAMES[strip]}` : line.channel,
      text: value === null ? 'no reading' : figure(value, unit),
      isStrong: isStrong(line),
    }));
}

const NAMES: Readonly<Record<string, string>> = { cure: 'degree', viscosity: 'viscosity', tg: 'Tg' };

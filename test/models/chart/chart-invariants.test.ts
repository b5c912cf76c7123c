import { describe, expect, it } from 'vitest';
import type { RunChart } from '../../../models/chart/chart.ts';
import { chartOfRun } from '../../../models/chart/chart-of-run.ts';
import { picture } from './picture.ts';

const RUNS = [
  'sound',
  'clocks-go-back',
  'correction',
  'cure-estimates',
  'exactly-on-the-limit',
  'exotherm',
  'log-ends-early',
  'mixed-load',
  'needs-a-barometer',
  'open-thermocouple',
  'power-cut-accumulated',
  'step-down',
  'still-running',
  'two-bag-lines',
  'untidy',
];

/** Every number in a structure. */
function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];
}

function labelsOf(chart: RunChart, strip: string): number[] {
  return chart.lines.flatMap((line) => (line.strip === strip && line.labelAt !== null ? [line.labelAt] : []));
}

describe.each(RUNS)('the chart of the run "%s"', (name) => {
  const { chart, inputs, evaluation } = picture(name);

  it('is plain data: it survives being written and read', () => {
    expect(JSON.parse(JSON.stringify(chart))).toEqual(chart);
    expect(numbersIn(chart).every(Number.isFinite)).toBe(true);
  });

  it('lies within the log and within its axes', () => {
    for (const { fromH, untilH } of [...chart.bands, ...chart.hatches, ...chart.stretches, ...chart.dips]) {
      expect(fromH).toBeLessThanOrEqual(untilH);
      expect(fromH).toBeGreaterThanOrEqual(chart.logFromH - 1e-5);
      expect(untilH).toBeLessThanOrEqual(chart.logUntilH + 1e-5);
    }
    for (const { strip, low, high } of chart.strips) {
      for (const line of chart.lines.filter((one) => one.strip === strip)) {
        for (const value of line.value) if (value !== null) expect(value >= low && value <= high).toBe(true);
        line.hours.slice(1).forEach((h, i) => {
          expect(h).toBeGreaterThan(line.hours[i]!);
        });
      }
    }
  });

  it('shows every channel, or says why not', () => {
    const shown = new Set([...chart.lines, ...chart.notDrawn].map(({ channel }) => channel));
    for (const { channel } of inputs.readings.channels)
      if (channel.role !== 'other') expect(shown).toContain(channel.name);
  });

  it('keeps the highest and lowest reading of every channel, in its line and in its row', () => {
    for (const row of chart.table.sensors) {
      const values = chart.lines.find(({ channel }) => channel === row.channel)!.value.filter((v) => v !== null);
      expect(row.highest?.value).toBe(Math.max(...values));
      expect(row.lowest?.value).toBe(Math.min(...values));
    }
  });

  it('moves its labels apart', () => {
    for (const { strip, low, high } of chart.strips) {
      const labels = labelsOf(chart, strip).sort((a, b) => a - b);
      const apart = Math.min(0.05, 1 / Math.max(1, labels.length)) * (high - low);
      labels.slice(1).forEach((label, i) => {
        expect(label - labels[i]!).toBeGreaterThan(apart * 0.9);
      });
    }
  });

  it('lists its instants in order, from the log’s begin to its end', () => {
    const { instants } = chart.table;
    instants.slice(1).forEach(({ atH }, i) => {
      expect(atH).toBeGreaterThanOrEqual(instants[i]!.atH);
    });
    expect(instants[0]!.what).toBe('log begins');
    expect(instants.map(({ what }) => what)).toContain('log ends');
  });

  it('can be drawn for every part', () => {
    for (const part of evaluation.parts) {
      const own = chartOfRun({ ...inputs, part });
      expect(own.part).toBe(part.part);
      const strong = own.lines.filter(({ role }) => role === 'leading' || role === 'lagging');
      for (const { channel } of strong) expect(part.judgedBy).toContain(channel);
    }
  });
});

import { describe, expect, it } from 'vitest';
import type { CureCourse } from '../../../models/chart/chart-inputs.ts';
import { chartOfRun } from '../../../models/chart/chart-of-run.ts';
import { picture } from './picture.ts';

describe('the run in rows', () => {
  const { chart, inputs, evaluation } = picture('short-for-the-lagging');
  const { timeMs, channels } = inputs.readings;

  it('says when each sensor came into a dwell and left it', () => {
    const sensors = evaluation.parts[0]!.stages.find(({ name }) => name === 'dwell 2')!.sensors!;
    const entered = (name: string) => Date.parse(sensors.find(({ channel }) => channel === name)!.entered!);
    // The run is built so that the thick tool brings TC3 in some 20 min after TC1.
    expect((entered('TC3') - entered('TC1')) / 60_000).toBeCloseTo(21, 0);
    const row = chart.table.sensors.find(({ channel }) => channel === 'TC3')!;
    expect(row.role).toBe('lagging');
    expect(row.dwells[1]).toMatchObject({ stage: 'dwell 2', entered: '11:34:30' });
  });

  it('shows the extremes between entering and leaving', () => {
    const sensors = evaluation.parts[0]!.stages.find(({ name }) => name === 'dwell 2')!.sensors!;
    for (const { channel, entered, left } of sensors) {
      const values = channels.find((one) => one.channel.name === channel)!.value;
      const inside = [...values].filter(
        (_, i) => timeMs[i]! >= Date.parse(entered!) && timeMs[i]! <= Date.parse(left!),
      );
      const dwell = chart.table.sensors.find((row) => row.channel === channel)!.dwells[1]!;
      expect([dwell.lowest, dwell.highest]).toEqual([Math.min(...inside), Math.max(...inside)]);
    }
  });

  it('lists who opened and closed, and the windows', () => {
    expect(chart.table.instants.map(({ clock, what }) => `${clock} ${what}`)).toEqual([
      '08:14 log begins',
      '08:14 bag vacuum until venting: begins',
      '08:23:18 heat-on',
      '08:38 bag vacuum until venting: ends',
      '09:15:53 cure pressure: begins',
      '09:25:15 dwell 1 opens, TC3',
      '10:43:11 dwell 1 closes, TC1',
      '11:34:30 dwell 2 opens, TC3',
      '13:26:15 dwell 2 closes, TC1',
      '14:36:35 cure pressure: ends',
      '14:59:30 log ends',
    ]);
  });
});

describe('estimated cure', () => {
  const { inputs, evaluation } = picture('cure-estimates');
  const part = evaluation.parts[0]!;
  const [fromMs, untilMs] = [inputs.readings.timeMs[0]!, inputs.readings.timeMs.at(-1)!];
  // A straight line from 0 to 1, so that the degree at any instant is known by hand.
  const courses: CureCourse[] = part.judgedBy.map((channel) => ({
    channel,
    timeMs: Float64Array.of(fromMs, untilMs),
    degree: Float64Array.of(0, 1),
    tgC: Float64Array.of(-8, 192),
    ...{ viscosityPaS: null, thinnest: null, flow: null },
  }));
  const chart = chartOfRun({ ...inputs, cure: { courses, viscosity: null, voidGrowth: null } });

  it('has strips of its own, with the roles of the temperatures', () => {
    expect(chart.strips.map(({ strip }) => strip)).toEqual(['temperature', 'pressure', 'vacuum', 'cure', 'tg']);
    expect(chart.strips.find(({ strip }) => strip === 'cure')).toMatchObject({ low: 0, high: 1, ticks: [0, 0.5, 1] });
    const role = (strip: string) => chart.lines.find((line) => line.channel === 'TC3' && line.strip === strip)!.role;
    expect(role('cure')).toBe(role('temperature'));
  });

  it('marks gel on the degree’s course, written once', () => {
    const gels = chart.dots.filter(({ kind }) => kind === 'gel');
    expect(gels).toHaveLength(part.judgedBy.length);
    for (const { channel, value } of gels) {
      const gelMs = Date.parse(part.cure.find((one) => one.channel === channel)!.gelAt!);
      expect(value).toBeCloseTo((gelMs - fromMs) / (untilMs - fromMs), 4);
    }
    const written = gels.filter(({ text }) => text !== '');
    expect(written).toHaveLength(1);
    expect(written[0]!.atH).toBe(Math.max(...gels.map(({ atH }) => atH)));
    expect(written[0]!.text).toMatch(/^gel \d\d:\d\d \(TC\d\) to \d\d:\d\d \(TC\d\)$/);
  });

  it('stands in the rows as the evaluation has it', () => {
    const row = chart.table.sensors.find(({ channel }) => channel === 'TC1')!;
    expect(row.degree).toBe(part.cure.find(({ channel }) => channel === 'TC1')!.degree);
    expect(row.tg).toBeCloseTo(part.cure.find(({ channel }) => channel === 'TC1')!.tgC!, 4);
  });
});

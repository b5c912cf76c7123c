import { describe, expect, it } from 'vitest';
import type { RunChart } from '../../../models/chart/chart.ts';
import { chartOfRun } from '../../../models/chart/chart-of-run.ts';
import { picture } from './picture.ts';

// The recorded runs are built: their defects, and so what must be seen, are known by construction.
const line = (chart: RunChart, channel: string, strip = 'temperature') =>
  chart.lines.find((one) => one.channel === channel && one.strip === strip)!;
const ms = (chart: RunChart, hours: number) => chart.zeroMs + hours * 3_600_000;

describe('chartOfRun', () => {
  const short = picture('short-for-the-lagging');

  it('names the sensor that came in first leading and the one that came last lagging', () => {
    expect(line(short.chart, 'TC1')).toMatchObject({ role: 'leading', label: 'TC1 leading' });
    expect(line(short.chart, 'TC3')).toMatchObject({ role: 'lagging', label: 'TC3 lagging' });
    expect(line(short.chart, 'TC2')).toMatchObject({ role: 'judged', label: 'TC2' });
    expect(line(short.chart, 'air').role).toBe('air');
  });

  it('counts hours from heat-on, with the clock of the workshop beneath', () => {
    const { chart, evaluation } = short;
    expect(chart.zeroMs).toBe(Date.parse(evaluation.parts[0]!.heatOn!));
    expect(chart.isFromHeatOn).toBe(true);
    expect(chart.timeTicks[0]).toEqual({ atH: 0, hours: '0 h', clock: '08:23', day: '3 March 2026' });
    expect(chart.timeTicks.slice(1).every(({ day }) => day === null)).toBe(true);
  });

  it('draws a dwell’s band only between its opening and its closing, short ones with what was asked', () => {
    const { chart, evaluation } = short;
    const stage = evaluation.parts[0]!.stages.find(({ name }) => name === 'dwell 2')!;
    const band = chart.bands.find(({ text }) => text.startsWith('dwell 2'))!;
    expect(band).toMatchObject({ low: 175, high: 185, outcome: 'not-met', limit: 'dwell 2/time' });
    expect(band.text).toBe('dwell 2 · 111 of 120 min');
    expect(Math.abs(ms(chart, band.fromH) - Date.parse(stage.opens!))).toBeLessThan(10);
    expect(Math.abs(ms(chart, band.untilH) - Date.parse(stage.closes!))).toBeLessThan(10);
    expect(chart.bands.find(({ text }) => text.startsWith('dwell 1'))!.text).toBe('dwell 1 · 77 min');
  });

  it('marks who opened and who closed, on their lines', () => {
    const { marks } = short.chart;
    expect(marks.map(({ text }) => text)).toEqual([
      'heat-on',
      'dwell 1 opens, TC3',
      'dwell 1 closes, TC1',
      'dwell 2 opens, TC3',
      'dwell 2 closes, TC1',
    ]);
    expect(marks[3]!.value).toBeCloseTo(175, 3);
    expect(marks[4]!.value).toBeCloseTo(175, 3);
  });

  it('gives every finding that looks somewhere its stretch', () => {
    const { chart, evaluation } = short;
    const looking = evaluation.parts[0]!.findings.filter(({ from }) => from !== null).map(({ limit }) => limit);
    expect(chart.stretches.map(({ limit }) => limit)).toEqual(looking);
    expect(looking.length).toBeGreaterThan(10);
    expect(chart.breaches.map(({ limit, text }) => [limit, text])).toEqual([['dwell 2/time', '111 of 120 min']]);
  });

  it('draws a window where it applied, and underlines what broke it with its minutes', () => {
    const { chart, inputs } = picture('vacuum-lost');
    const vacuum = inputs.readings.channels.find(({ channel }) => channel.name === 'bag vacuum')!.value;
    const band = chart.bands.find(({ limit }) => limit === 'window/bag vacuum until venting')!;
    expect(band).toMatchObject({ strip: 'vacuum', low: 0.75, high: null, outcome: 'not-met' });
    const [breach] = chart.breaches;
    // Counted by hand in the readings: the scans of the window that read below 0.75 bar.
    const below = [...inputs.readings.timeMs].filter(
      (t, i) => vacuum[i]! < 0.75 && t >= ms(chart, band.fromH) && t <= ms(chart, band.untilH) + 1,
    );
    expect(ms(chart, breach!.fromH)).toBeLessThanOrEqual(below[0]!);
    expect(ms(chart, breach!.untilH)).toBeGreaterThanOrEqual(below.at(-1)!);
    expect(breach!.untilH - breach!.fromH).toBeLessThan((below.at(-1)! - below[0]! + 60_000) / 3_600_000);
    expect(breach!.text).toMatch(/^[\d.]+ min, 0\.56 bar$/);
  });

  it('hangs a forgiven dip under the band’s edge', () => {
    const { dips } = picture('dip-forgiven').chart;
    expect(dips).toHaveLength(1);
    expect(dips[0]).toMatchObject({ stage: 'dwell 1', level: 105, isForgiven: true });
    expect(picture('dip-too-deep').chart.dips[0]).toMatchObject({ isForgiven: false });
  });

  it('hatches a gap and draws no line across it', () => {
    const { chart } = picture('gap-in-dwell');
    const gap = chart.hatches.find(({ strip, isOfAll }) => strip === 'temperature' && isOfAll)!;
    expect(gap.untilH - gap.fromH).toBeGreaterThan(0.2);
    for (const { hours, value } of chart.lines) {
      for (let i = 1; i < hours.length; i++) {
        if (value[i] === null || value[i - 1] === null) continue;
        expect(hours[i]! <= gap.fromH + 1e-5 || hours[i - 1]! >= gap.untilH - 1e-5).toBe(true);
      }
    }
  });

  it('enters a colder dwell from above', () => {
    const { chart } = picture('step-down');
    expect(chart.marks.find(({ text }) => text === 'anneal opens, TC3')!.value).toBeCloseTo(125, 3);
    expect(chart.bands.find(({ text }) => text.startsWith('anneal'))).toMatchObject({ low: 115, high: 125 });
  });

  it('draws in the unit the cycle is written in', () => {
    const { chart } = picture('exactly-on-the-limit');
    expect(chart.strips[0]).toMatchObject({ strip: 'temperature', unit: '°F' });
    expect(chart.bands[0]).toMatchObject({ low: 350, high: 370 });
  });

  it('shows an exclusion from its instant on', () => {
    const { chart, evaluation } = picture('open-thermocouple-excluded');
    const { state, excludedFromH } = line(chart, 'TC3');
    expect(state).toBe('excluded');
    const from = evaluation.sensors.find(({ channel }) => channel === 'TC3')!.exclusion!.from;
    expect(Math.abs(ms(chart, excludedFromH!) - Date.parse(from))).toBeLessThan(10);
  });

  it('draws the courses alone before there is a cycle', () => {
    const { inputs } = short;
    const chart = chartOfRun({ ...inputs, cycle: null, evaluation: null, part: null });
    expect(chart.lines).toHaveLength(7);
    expect([chart.bands, chart.wedges, chart.marks, chart.stretches, chart.breaches]).toEqual([[], [], [], [], []]);
    expect(chart.isFromHeatOn).toBe(false);
    expect(chart.fromH).toBe(0);
    expect(chart.lines.every(({ role }) => role !== 'leading' && role !== 'lagging')).toBe(true);
  });

  it('zooms into a stretch without losing its extremes', () => {
    const { inputs, evaluation } = short;
    const { opens, closes } = evaluation.parts[0]!.stages.find(({ name }) => name === 'dwell 2')!;
    const view = { fromMs: Date.parse(opens!), untilMs: Date.parse(closes!) };
    const chart = chartOfRun({ ...inputs, view, points: 60 });
    const { timeMs, channels } = inputs.readings;
    for (const { channel, value } of channels.filter(({ channel: { role } }) => role === 'part')) {
      const inView = [...value].filter((_, i) => timeMs[i]! >= view.fromMs && timeMs[i]! <= view.untilMs);
      const drawn = line(chart, channel.name).value.filter((one) => one !== null);
      expect(Math.max(...drawn)).toBeGreaterThanOrEqual(Math.max(...inView));
      expect(Math.min(...drawn)).toBeLessThanOrEqual(Math.min(...inView));
      expect(drawn.length).toBeLessThanOrEqual(60);
    }
    const [axis] = chart.strips;
    expect(axis!.low).toBeGreaterThan(150);
    expect(axis!.high).toBeLessThan(200);
  });
});

describe('a vacuum in another kind of unit', () => {
  it('is drawn as the cycle writes it where the barometer is known', () => {
    const { chart } = picture('has-a-barometer');
    expect(chart.strips.find(({ strip }) => strip === 'vacuum')!.unit).toBe('mbar abs');
    expect(chart.bands.find(({ strip }) => strip === 'vacuum')).toMatchObject({ low: null, high: 200 });
    const first = line(chart, 'bag vacuum', 'vacuum').value[0]!;
    // 1049 mbar less what the gauge reads below ambient: by hand.
    const { inputs } = picture('has-a-barometer');
    const gauge = inputs.readings.channels.find(({ channel }) => channel.name === 'bag vacuum')!.value[0]!;
    expect(first).toBeCloseTo(1049 - gauge * 1000, 3);
  });

  it('is drawn as the recorder read it where the barometer is not, with the window’s ends but no level', () => {
    const { chart } = picture('needs-a-barometer');
    expect(chart.strips.find(({ strip }) => strip === 'vacuum')!.unit).toBe('bar');
    expect(chart.bands.find(({ strip }) => strip === 'vacuum')).toMatchObject({ low: null, high: null });
  });
});

describe('leading and lagging', () => {
  it('are the hottest and the coldest where no dwell opened', () => {
    const { chart, inputs, evaluation } = picture('stops-on-the-ramp');
    const part = evaluation.parts[0]!;
    const noDwell = { ...part, stages: part.stages.map((stage) => ({ ...stage, opens: null, sensors: [] })) };
    const own = chartOfRun({ ...inputs, part: noDwell });
    const highest = (name: string) =>
      Math.max(...inputs.readings.channels.find(({ channel }) => channel.name === name)!.value);
    const byHeat = [...part.judgedBy].sort((a, b) => highest(b) - highest(a));
    const named = (role: string) => own.lines.find((one) => one.role === role)!.channel;
    expect(highest(named('leading'))).toBe(highest(byHeat[0]!));
    expect(highest(named('lagging'))).toBe(highest(byHeat.at(-1)!));
    expect(highest(named('leading'))).toBeGreaterThan(highest(named('lagging')));
    expect(chart.lines.length).toBe(own.lines.length);
  });

  it('are nobody where one sensor is alone', () => {
    const { inputs, evaluation } = picture('sound');
    const part = { ...evaluation.parts[0]!, judgedBy: ['TC1'] };
    const roles = chartOfRun({ ...inputs, part }).lines.map(({ role }) => role);
    expect(roles).not.toContain('leading');
    expect(roles).not.toContain('lagging');
  });
});

describe('axes', () => {
  it('leave out a ceiling far above the run, which would flatten it', () => {
    const { inputs } = picture('sound');
    const axis = (ceiling: number) => chartOfRun({ ...inputs, cycle: { ...inputs.cycle!, ceiling } }).strips[0]!;
    expect(axis(190).high).toBeGreaterThan(190);
    expect(axis(900).high).toBeLessThan(250);
  });
});

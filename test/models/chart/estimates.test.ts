import { describe, expect, it } from 'vitest';
import type { RunChart } from '../../../models/chart/chart.ts';
import type { CureCourse, CureOfPart, VoidGrowth } from '../../../models/chart/chart-inputs.ts';
import { chartOfRun } from '../../../models/chart/chart-of-run.ts';
import { picture } from './picture.ts';

// Courses drawn by hand, so that every figure is known: TC1 and TC3 are the leading and the lagging sensor of the run.
const { inputs, evaluation } = picture('cure-estimates');
const fromMs = inputs.readings.timeMs[0]!;
const minute = (n: number) => fromMs + 60_000 * n;
const EVERY = [0, 20, 40, 60, 80, 100, 120];
const timeMs = Float64Array.from(EVERY, minute);
const column = (...figures: number[]) => Float64Array.from(figures);

const course = (channel: string, more: Partial<CureCourse> = {}): CureCourse => ({
  channel,
  timeMs,
  degree: column(0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6),
  tgC: null,
  viscosityPaS: column(2000, 800, 30, 4, 25, Number.NaN, Number.NaN),
  thinnest: { atMs: minute(62), viscosityPaS: 3.96 },
  flow: { fromMs: minute(30), untilMs: minute(95.9), by: 'viscosity', isFromStart: false },
  ...more,
});
const CURE: CureOfPart = {
  courses: evaluation.parts[0]!.judgedBy.map((channel) => course(channel)),
  viscosity: { validTo: 0.45, flowsBelowPaS: 100 },
  voidGrowth: null,
};
const GROWTH: VoidGrowth = {
  humidityPercent: 50,
  timeMs,
  leastPa: column(2e3, 5e4, 1e5, 2e5, 3e5, Number.NaN, Number.NaN),
  most: { atMs: minute(81), leastPa: 3.1e5 },
  gelMs: minute(95.9),
  vessel: { fromMs, untilMs: minute(95), below: [] },
};
const chartWith = (cure: Partial<CureOfPart> = {}, more: Partial<typeof inputs> = {}) =>
  chartOfRun({ ...inputs, barometerPa: 1e5, cure: { ...CURE, ...cure }, ...more });
const strong = inputs.part!.judgedBy.filter((channel) =>
  chartWith().lines.some((line) => line.channel === channel && ['leading', 'lagging'].includes(line.role)),
);
const linesOn = (chart: RunChart, strip: string) => chart.lines.filter((line) => line.strip === strip);
const hourOf = (n: number) => (minute(n) - chartWith().zeroMs) / 3_600_000;

describe('the viscosity strip', () => {
  const chart = chartWith();

  it('stands between degree and Tg, with whole decades of Pa s on a logarithmic axis', () => {
    const tgC = column(0, 10, 20, 30, 40, 50, 60);
    const whole = chartWith({ courses: CURE.courses.map((one) => ({ ...one, tgC })) });
    expect(whole.strips.map(({ strip }) => strip).slice(-3)).toEqual(['cure', 'viscosity', 'tg']);
    expect(chart.strips.find(({ strip }) => strip === 'viscosity')).toEqual({
      strip: 'viscosity',
      title: 'viscosity (estimate), Pa s',
      unit: 'Pa s',
      scale: 'log',
      low: 1,
      high: 1000,
      ticks: [1, 10, 100, 1000],
    });
    expect(chart.strips.filter(({ scale }) => scale === 'log')).toHaveLength(1);
  });

  it('shows the leading and the lagging sensor, nothing above 1000 Pa s and nothing where the law ends', () => {
    expect(strong).toHaveLength(2);
    const lines = linesOn(chart, 'viscosity');
    expect(lines.map(({ channel }) => channel)).toEqual(strong);
    for (const { value } of lines) expect(value.filter((one) => one !== null)).toEqual([800, 30, 4, 25]);
  });

  it('marks where the resin is thinnest, written once', () => {
    const dots = chart.dots.filter(({ kind }) => kind === 'thinnest');
    expect(dots).toHaveLength(2);
    for (const { atH, value } of dots) {
      expect(atH).toBeCloseTo(hourOf(62), 4);
      expect(value).toBe(3.96);
    }
    expect(dots.map(({ text }) => text).filter(Boolean)).toEqual([
      expect.stringMatching(/^thinnest \d\d:\d\d, 4 Pa s$/),
    ]);
  });

  it('draws the flow window from softening to gel, with its whole minutes', () => {
    expect(chart.flows.map(({ channel }) => channel)).toEqual(strong);
    for (const { strip, channel, fromH, untilH, text } of chart.flows) {
      expect([strip, text]).toEqual(['viscosity', `${channel} flows 65 min`]);
      expect(fromH).toBeCloseTo(hourOf(30), 4);
      expect(untilH).toBeCloseTo(hourOf(95.9), 4);
    }
  });

  it('says the same in sentences, and where the model ends', () => {
    const [first, , limits] = chart.estimates;
    expect(first).toMatch(
      new RegExp(
        `^${strong[0]} flows for 65 min from \\d\\d:\\d\\d, when its viscosity falls below 100 Pa s, to gel at \\d\\d:\\d\\d; it is thinnest at \\d\\d:\\d\\d, 4 Pa s\\.$`,
      ),
    );
    expect(limits).toBe(
      'Viscosity is that of the neat resin by its set’s law: it was fitted up to a degree of 0.45 and ends there; above 1000 Pa s it is not drawn.',
    );
  });

  it('is not there for a set without viscosity; what flows by its Tg is drawn on the degree', () => {
    const flow = { fromMs, untilMs: minute(90), by: 'glass-transition', isFromStart: true } as const;
    const courses = CURE.courses.map((one) => ({ ...one, viscosityPaS: null, thinnest: null, flow }));
    const bare = chartWith({ courses, viscosity: null });
    expect(bare.strips.map(({ strip }) => strip)).not.toContain('viscosity');
    expect(bare.flows.map(({ strip }) => strip)).toEqual(['cure', 'cure']);
    expect(bare.estimates).toHaveLength(2);
    expect(bare.estimates[0]).toMatch(
      / flows for 90 min from the first scan, warmer than its Tg already, to gel at \d\d:\d\d\.$/,
    );
  });

  it('says of a set from memory that it is, at the head of every estimate and in words', () => {
    const recalled = { ...evaluation, resin: { ...evaluation.resin!, status: 'recalled' } };
    const chartOfRecalled = chartWith({}, { evaluation: recalled });
    for (const { strip, title } of chartOfRecalled.strips.filter((axis) =>
      ['cure', 'viscosity'].includes(axis.strip),
    )) {
      expect([strip, title]).toEqual([strip, expect.stringContaining('(estimate, set from memory)')]);
    }
    expect(chartOfRecalled.estimates[0]).toContain('from memory');
    expect(chart.estimates.join(' ')).not.toContain('memory');
  });
});

describe('the guide against void growth', () => {
  const chart = chartWith({ voidGrowth: GROWTH });

  it('is a line on the pressure strip, in its unit, until gel', () => {
    const guide = linesOn(chart, 'pressure').find(({ role }) => role === 'guide')!;
    expect(chart.strips.find(({ strip }) => strip === 'pressure')!.unit).toBe('bar');
    // Absolute, less 1 bar of barometer, in bar.
    // Readings so far apart are not joined by a line.
    expect(guide.value.filter((one) => one !== null)).toEqual([-0.98, -0.5, 0, 1, 2]);
    expect(guide.hours.at(-1)).toBeCloseTo(hourOf(80), 4);
    expect(chart.strips.find(({ strip }) => strip === 'pressure')!.low).toBeLessThan(-0.98);
  });

  it('is told for what it is, with the most it came to, and that the vessel stayed above it', () => {
    const [what, fact] = chart.estimates.slice(-2);
    expect(what).toContain('at 50 % relative humidity of the lay-up (Kardos, Duduković and Dave)');
    expect(what).toMatch(/at most 2\.1 bar gauge, at \d\d:\d\d\./);
    expect(what).toContain('a guide, never a limit');
    expect(fact).toMatch(
      /^The vessel pressure stayed above the least resin pressure of 2\.1 bar gauge from \d\d:\d\d to gel at \d\d:\d\d\.$/,
    );
  });

  it('tells where the vessel lay below it, and no verdict', () => {
    const below = [
      { fromMs: minute(30), untilMs: minute(41.5) },
      { fromMs: minute(50), untilMs: minute(53) },
    ];
    const fact = chartWith({ voidGrowth: { ...GROWTH, vessel: { ...GROWTH.vessel!, below } } }).estimates.at(-1)!;
    expect(fact).toMatch(
      /^The vessel pressure lay below the least resin pressure for 14 min before gel at \d\d:\d\d: \d\d:\d\d to \d\d:\d\d, \d\d:\d\d to \d\d:\d\d\.$/,
    );
    expect(fact).not.toMatch(/conform|met|fail|reject/i);
  });

  it('is not drawn without the barometer that a gauge takes; its figure is then told as absolute', () => {
    const unknown = chartWith({ voidGrowth: { ...GROWTH, vessel: null } }, { barometerPa: null, load: null });
    expect(linesOn(unknown, 'pressure').map(({ role }) => role)).not.toContain('guide');
    expect(unknown.estimates.at(-2)).toContain('at most 3.1 bar abs');
    expect(unknown.estimates.at(-1)).toContain('The barometer of the day is not on record');
  });

  it('is told of as far as the log goes where no gel came', () => {
    expect(chartWith({ voidGrowth: { ...GROWTH, gelMs: null } }).estimates.at(-1)).toMatch(
      /to the end of the log, before gel\.$/,
    );
  });

  it('says why there is none where a humidity is on record', () => {
    const part = inputs.part!.part;
    const load = { format: 'dwellbook-load/1', parts: [{ part: part ?? 'A', humidity: 50 }], sensors: [] } as const;
    const said = chartWith({}, { load, part: { ...inputs.part!, part: load.parts[0].part } }).estimates.at(-1);
    expect(said).toBe(
      'No least resin pressure against void growth is told: it takes a set that says when the resin gels.',
    );
    expect(chartWith().estimates.join(' ')).not.toContain('void');
  });
});

import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { cureAlong } from '../../../models/cure/cure-along.ts';
import { parseResin } from '../../../models/cure/parse-resin.ts';
import { air, cycleOf, type MadeRun, minutesTo, type Vertex, vacuum } from '../../support/made-run.ts';
import { at, HEAT, HOLD, HOUR, RAMP } from '../../support/open-run.ts';

describe('what is ahead of an open run', () => {
  it('follows an air that has levelled off as a body with one time constant', () => {
    // Newton's law of cooling: T = 120 − 100 exp(−t/30), in the band of 105 °C after 30 ln(100/15) min.
    const body = Array.from({ length: 400 }, (_, i): Vertex => [i, 120 - 100 * Math.exp(-i / 30)]);
    const run: MadeRun = { cycle: HOUR, channels: { TC1: body, air: air([[0, 120]]) }, every: 0.25 };
    const expected = 30 * Math.log(100 / 15);
    const told = minutesTo(at(40, run).forecast.entry?.expectedAt)!;
    expect(Math.abs(told - expected)).toBeLessThan(2.5);
    // A straight line at the present rate would promise it sooner than it comes.
    const linear = 40 + (105 - (120 - 100 * Math.exp(-40 / 30))) / ((100 / 30) * Math.exp(-40 / 30));
    expect(Math.abs(told - expected)).toBeLessThan(Math.abs(linear - expected));
  });

  it('promises no entry from an air that is colder than the band', () => {
    const body = Array.from({ length: 400 }, (_, i): Vertex => [i, 100 - 80 * Math.exp(-i / 30)]);
    const run: MadeRun = { cycle: HOUR, channels: { TC1: body, air: air([[0, 100]]) } };
    const { entry } = at(60, run).forecast;
    expect(entry?.expectedAt).toBeNull();
    expect(entry?.because).toContain('not coming nearer');
  });

  it('estimates the cure at the end as the run itself comes to it', () => {
    const resin = parseResin(JSON.parse(readFileSync('models/cure/resins/skerry-180.json', 'utf8')));
    const cycle = cycleOf([HEAT, HOLD({ target: 180, time: { atLeast: 120 } })], {
      cure: { resin: 'skerry-180', degreeAtLeast: 0.9 },
    });
    const line: Vertex[] = [
      [0, 20],
      [80, 180],
      [197.5, 180],
    ];
    const run: MadeRun = { cycle, channels: { TC1: line }, resin };
    // In the band at minute 77.5, at the end of the dwell at minute 197.5.
    const whole = cureAlong(
      Float64Array.from(line, ([minutes]) => minutes * 60),
      Float64Array.from(line, ([, celsius]) => celsius + 273.15),
      resin,
    );
    const { cure } = at(120, run).forecast;
    expect(cure?.degreeAtEnd).toBeCloseTo(whole.alpha.at(-1)!, 4);
    expect(cure!.degreeNow).toBeLessThan(cure!.degreeAtEnd!);
    const early = at(60, run).forecast.cure;
    expect(early?.degreeAtEnd).toBeCloseTo(whole.alpha.at(-1)!, 2);
    expect(minutesTo(early?.gelExpectedAt)).toBeGreaterThan(60);
  });

  it('names a vacuum that will fall out of its window, and when', () => {
    const run: MadeRun = {
      cycle: {
        ...HOUR,
        units: { ...HOUR.units, vacuum: 'bar' },
        windows: [
          { name: 'bag vacuum', quantity: 'vacuum', atLeast: 0.75, from: { at: 'start' }, until: { at: 'end' } },
        ],
      },
      channels: {
        ...RAMP.channels,
        V1: vacuum([
          [0, 0.9],
          [20, 0.9],
          [200, 0],
        ]),
      },
    };
    // 0.005 bar/min from minute 20: 0.75 bar at minute 50.
    const [first] = at(40, run).forecast.nearing;
    expect(first?.limit).toBe('window/bag vacuum');
    expect(first?.sensor).toBe('V1');
    expect(minutesTo(first?.expectedAt)).toBeCloseTo(50, 2);
    expect(at(25, run).forecast.nearing).toEqual([]);
  });

  it('says what needs a person, and since when', () => {
    const silent: MadeRun = {
      ...RAMP,
      channels: {
        ...RAMP.channels,
        TC2: { role: 'part', unit: '°C', history: [...(RAMP.channels.TC2 as Vertex[])], absent: [[60, 300]] },
      },
    };
    const { needs } = at(90, silent).forecast;
    expect(needs.some(({ text, since }) => text.startsWith('TC2 has not been read') && minutesTo(since) === 60)).toBe(
      true,
    );
  });

  it('asks for a decision on a suspect, whether or not a finding hangs on it yet', () => {
    const stuck: MadeRun = {
      ...RAMP,
      channels: {
        ...RAMP.channels,
        TC3: [
          [0, 20],
          [10, 40],
          [200, 40],
        ],
      },
    };
    expect(at(40, stuck, []).forecast.needs.some(({ text }) => text.startsWith('Decide on TC3'))).toBe(true);
    expect(at(40, stuck).forecast.needs).toEqual([]);
  });
});

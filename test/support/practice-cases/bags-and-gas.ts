import { celsiusFrom } from '../../../models/units.ts';
import { nextUp } from '../../../server/practice/simulator/crossings.ts';
import { minutesAllIn } from '../../../server/practice/simulator/truth.ts';
import { BAGGED_AT_250, bagged } from './bagged-at-250.ts';
import { column, inAutoclave, inOven, recorder, thermocouples } from './made-of.ts';
import { CYCLE, type PracticeCase } from './practice-case.ts';
import { heatOnMin, junctionOf, least } from './read-off.ts';

/** Vacuum and pressure logged absolute, asked for below or above ambient. */

const TORR_PER_BAR = 1e5 / (101325 / 760);
const INHG_PER_BAR = 1e5 / 3386.389;

export const TORR_AGAINST_INCHES: PracticeCase = {
  name: 'torr-against-inches',
  what: 'The bag is logged in torr absolute, asked for in inches below ambient, and leaks in the dwell',
  plan: inOven({
    ...bagged(119.5, [120, 140]),
    run: 'O-3',
    startsAt: '2026-03-02T23:15:00Z',
    cycle: BAGGED_AT_250,
    isBarometerRecorded: true,
    barometerMbar: 1001,
    sensors: [0.94, 1.02, 1.1].map((position, i) => ({
      channel: `TC${i + 1}`,
      point: column('glass', { position }),
    })),
    recorder: recorder({
      vacuum: { decimals: 0, noise: 0.4 },
      absent: 'NaN',
      lineEnd: '\n',
      layout: {
        format: 'dwellbook-layout/1',
        name: 'lab logger',
        header: 1,
        time: { columns: ['stamp'], pattern: "yyyy-MM-dd'T'HH:mm:ss", zone: 'Pacific/Auckland' },
        channels: [
          ...thermocouples(3, '°C', (n) => `T${n}`),
          { column: 'p_bag', name: 'bag', role: 'vacuum', unit: 'torr abs' },
        ],
        missing: ['NaN'],
      },
    }),
  }),
  expects: (truth) => {
    const { history } = truth;
    const weakestBar = least(history.vacuumBar[0]!, history.stepS / 60, heatOnMin(truth), 200);
    const observed = Math.round(weakestBar * TORR_PER_BAR) * (INHG_PER_BAR / TORR_PER_BAR);
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'window/bag', outcome: 'not-met', observed, within: 0.15 },
        { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
      ],
    };
  },
};

export const GAS_LATE_AND_ABSOLUTE: PracticeCase = {
  name: 'gas-late-and-absolute',
  what: 'Gas came after the parts were warm; logged in kPa absolute, asked for in psi',
  args: ['--barometer', '1005 mbar'],
  plan: inAutoclave({
    run: 'L-2',
    startsAt: '2026-11-02T05:30:00Z',
    barometerMbar: 1005,
    cycle: {
      ...CYCLE,
      code: 'AC-250',
      title: 'Autoclave cure at 250 °F',
      units: { temperature: '°F', pressure: 'psi' },
      stages: BAGGED_AT_250.stages,
      windows: [
        {
          name: 'gas',
          quantity: 'pressure',
          atLeast: 40,
          from: { at: 'all-reach', value: 180 },
          until: { at: 'all-cool-to', value: 150 },
          forgive: { by: 5, for: 2 },
        },
      ],
      ceiling: 275,
    },
    programme: bagged(119.5, null).programme,
    pressure: {
      toBar: 3.2,
      barPerMin: 0.4,
      when: { at: 'minute', minute: 90 },
      release: { when: { at: 'hottest-cools-to', temperatureC: 60 }, barPerMin: 0.5 },
    },
    sensors: [0.95, 1.05].map((position, i) => ({ channel: `TC${i + 1}`, point: column('glass', { position }) })),
    recorder: recorder({
      layout: {
        format: 'dwellbook-layout/1',
        name: 'panel',
        encoding: 'utf-16be',
        delimiter: ',',
        header: 1,
        time: { columns: ['t'], pattern: 'yyyy-MM-dd HH:mm', zone: '+01:00' },
        channels: [
          ...thermocouples(2, '°F', (n) => `F${n}`),
          { column: 'P', name: 'gas', role: 'pressure', unit: 'kPa abs' },
        ],
      },
      byteOrderMark: true,
      pressure: { decimals: 1, noise: 0.1 },
    }),
  }),
  expects: (truth) => {
    if (nextUp(junctionOf(truth, 'TC1'), celsiusFrom(180, '°F'), 0)! > 80) throw new Error('the gas is not late');
    return {
      verdict: 'does-not-conform',
      exit: 1,
      findings: [
        { limit: 'window/gas', outcome: 'not-met', observed: 0, within: 0.1 },
        { limit: 'cure/time', outcome: 'met', observed: minutesAllIn(truth, 'cure', truth.channels), within: 1 },
      ],
    };
  },
};

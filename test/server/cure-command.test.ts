import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it, vi } from 'vitest';
import { emfMillivolt } from '../../models/log/thermocouple/emf.ts';
import { recalledResin, referenceSets } from '../reference/cure/reference-sets.ts';
import { dwellbook } from './built-program.ts';
import { freshFolder } from './fresh-database.ts';

// Each test starts the program several times, on a machine that may be busy with other tests.
vi.setConfig({ testTimeout: 180_000 });

const BEGINS_MS = Date.parse('2026-03-02T08:00:00Z');

interface Column {
  readonly layout: object;
  readonly read: (celsius: number) => number;
}
const PART: Column = { layout: { column: 'T1', name: 'TC1', role: 'part', unit: '°C' }, read: (celsius) => celsius };

/** Runs `dwellbook cure` along straight lines between vertices, one scan at each. */
async function cure(
  vertices: readonly (readonly [number, number])[],
  resin: object,
  columns = [PART],
  words = ['--json'],
) {
  const folder = freshFolder();
  const names = columns.map(({ layout }) => (layout as { column: string }).column);
  const rows = vertices.map(([s, celsius]) => [s, ...columns.map(({ read }) => read(celsius))].join(','));
  const write = (name: string, text: string) => {
    writeFileSync(join(folder, name), text);
    return join(folder, name);
  };
  const layout = {
    format: 'dwellbook-layout/1',
    name: 'trial',
    header: 1,
    time: { columns: ['t'], elapsed: 's', startsAt: new Date(BEGINS_MS).toISOString() },
    channels: columns.map((column) => column.layout),
  };
  const log = write('run.csv', `${['t', ...names].join(',')}\n${rows.join('\n')}\n`);
  const documents = ['--layout', write('layout.json', JSON.stringify(layout)), '--resin'];
  return dwellbook('cure', '--log', log, ...documents, write('resin.json', JSON.stringify(resin)), ...words);
}

const secondsTo = (instant: string) => (Date.parse(instant) - BEGINS_MS) / 1000;

describe('dwellbook cure', () => {
  // Source: test/reference/cure/kinetics.json (SciPy DOP853 and LSODA, agreeing to 1.2e-11); instants are written in ms.
  it.each(Object.keys(referenceSets))(
    '%s along two dwells: degree to 1e-8, instants to the millisecond',
    async (set) => {
      const { history_s_C, final_alpha, final_Tg_C, events_s } = referenceSets[set]!.cases.two_dwell!;
      const { status, stdout } = await cure(history_s_C!, recalledResin(set));
      expect(status).toBe(0);
      const [channel] = JSON.parse(stdout).channels;
      expect(Math.abs(channel.degree - final_alpha)).toBeLessThan(1e-8);
      expect(Math.abs(channel.tgC - final_Tg_C)).toBeLessThan(1e-5);
      expect(Math.abs(secondsTo(channel.gelAt) - events_s.gel!)).toBeLessThan(1e-3);
      if (channel.vitrifiesAt === null) return;
      expect(Math.abs(secondsTo(channel.vitrifiesAt) - events_s.vitrification!)).toBeLessThan(1e-3);
    },
  );

  it('reads a thermocouple recorded as emf as the temperature it stands for', async () => {
    const { history_s_C, final_alpha } = referenceSets.dusi_976!.cases.two_dwell!;
    // Straight lines in °C are none in mV: a scan every 10 s.
    const dense = Array.from({ length: 1801 }, (_, i): [number, number] => {
      const next = Math.max(
        1,
        history_s_C!.findIndex(([s]) => s >= 10 * i),
      );
      const [[s0, c0], [s1, c1]] = [history_s_C![next - 1]!, history_s_C![next]!];
      return [10 * i, c0 + ((c1 - c0) * (10 * i - s0)) / (s1 - s0)];
    });
    const thermocouple = { type: 'T', coldJunction: 'cold' };
    const columns: Column[] = [
      {
        layout: { column: 'E1', name: 'TC1', role: 'part', unit: 'mV', thermocouple },
        read: (celsius) => emfMillivolt('T', celsius) - emfMillivolt('T', 22.5),
      },
      { layout: { column: 'C', name: 'cold', role: 'other', unit: '°C' }, read: () => 22.5 },
    ];
    const { stdout } = await cure(dense, recalledResin('dusi_976'), columns);
    const { channels } = JSON.parse(stdout);
    expect(channels.map(({ channel }: { channel: string }) => channel)).toEqual(['TC1']);
    expect(Math.abs(channels[0].degree - final_alpha)).toBeLessThan(1e-8);
  });

  it('says what a set from memory is for, and names the channel along which a set stalls', async () => {
    const set = recalledResin('lls_3501_6');
    const warm = await cure(referenceSets.lls_3501_6!.cases.two_dwell!.history_s_C!, set, [PART], []);
    expect(warm.stdout).toMatch(
      /^Resin set lls_3501_6 \(recalled\): .*; recalled from memory: for tests and trials, never/,
    );
    const frozen: [number, number][] = [
      [0, -18],
      [3600, -18],
    ];
    const { status, stdout, stderr } = await cure(frozen, { ...set, initialDegree: 0.29 });
    expect([status, stdout]).toEqual([65, '']);
    expect(stderr).toMatch(
      /Along TC1: The set "lls_3501_6" gives a rate of -.* at degree 0\.29.* never passes degree 0\.26/,
    );
  });
});

import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it, vi } from 'vitest';
import { VERSION } from '../../server/contract/version.ts';
import { sha256Of, sha256OfDocument } from '../../server/store/canonical.ts';
import { dwellbook } from './built-program.ts';
import { freshFolder } from './fresh-database.ts';
import { recordedCase } from './recorded-case.ts';

// Each test starts the program several times, on a machine that may be busy with other tests.
vi.setConfig({ testTimeout: 180_000 });

const CASES = fileURLToPath(new URL('../golden/recorded/', import.meta.url));

function words(name: string, ...more: string[]): string[] {
  const file = (one: string) => join(CASES, name, one);
  return ['--log', file('run.csv'), '--layout', file('layout.json'), '--cycle', file('cycle.json'), ...more];
}

function written(name: string, text: string): string {
  const path = join(freshFolder(), name);
  writeFileSync(path, text);
  return path;
}

describe('dwellbook check', () => {
  it('ends with 0, 1 or 2 by the verdict', async () => {
    expect((await dwellbook('check', ...words('sound'))).status).toBe(0);
    expect((await dwellbook('check', ...words('too-fast'))).status).toBe(1);
    expect((await dwellbook('check', ...words('log-ends-early'))).status).toBe(2);
    expect((await dwellbook('check', ...words('still-running'), '--open')).status).toBe(2);
  });

  it('prints the evaluation with the hashes of log and cycle', async () => {
    const { stdout, stderr } = await dwellbook('check', ...words('sound'), '--json');
    const { log, cycle } = recordedCase('sound');
    const evaluation = JSON.parse(stdout);
    expect(stderr).toBe('');
    expect(evaluation.format).toBe('dwellbook-evaluation/1');
    expect(evaluation.verdict).toBe('conforms');
    expect(evaluation.log.sha256).toBe(sha256Of(log));
    expect(evaluation.cycle).toEqual({ code: cycle.code, issue: cycle.issue, sha256: sha256OfDocument(cycle) });
  });

  it('prints a table a person can read', async () => {
    const { stdout } = await dwellbook('check', ...words('too-fast'));
    expect(stdout).toMatch(/^SR-180 issue B, .+: DOES NOT CONFORM\n/);
    expect(stdout).toMatch(/NOT MET +Heat-up 2, fastest +[\d.]+ °C\/min +asked at most 3 °C\/min/);
    expect(stdout).toMatch(/met +Ceiling +[\d.]+ °C +asked at most 190 °C/);
  });

  it('takes exclusions with a reason and a name, and refuses them without', async () => {
    const named = 'TC3@2026-03-03T11:19:00Z:crushed lead (inspector)';
    const { stdout } = await dwellbook('check', ...words('sound'), '--exclude', named, '--json');
    expect(JSON.parse(stdout).sensors).toContainEqual(
      expect.objectContaining({
        channel: 'TC3',
        state: 'excluded',
        exclusion: { from: '2026-03-03T11:19:00Z', reason: 'crushed lead', by: 'inspector' },
      }),
    );
    const nameless = await dwellbook('check', ...words('sound'), '--exclude', 'TC3@2026-03-03T11:19:00Z:crushed lead');
    expect([nameless.status, nameless.stdout]).toEqual([64, '']);
    expect(nameless.stderr).toContain('--exclude');
    const unknown = await dwellbook('check', ...words('sound'), '--exclude', named.replace('TC3', 'TC9'));
    expect(unknown.status).toBe(65);
    expect(unknown.stderr).toContain('TC9');
  });

  it('ends with 64 for words it does not understand', async () => {
    for (const wrong of [
      [],
      ['chek'],
      ['check'],
      ['check', '--log', 'run.csv'],
      ['check', ...words('sound'), '--colour', 'red'],
      ['check', ...words('sound'), 'left over'],
      ['check', ...words('sound'), '--barometer', '1009 furlongs'],
      ['cure', '--every', '0'],
      ['serve', '--port', '99999'],
      ['import', '--layout', 'x.json'],
    ]) {
      const { status, stdout, stderr } = await dwellbook(...wrong);
      expect([wrong, status, stdout]).toEqual([wrong, 64, '']);
      expect(stderr).toMatch(/^dwellbook: .+/);
    }
  });

  it('ends with 65 and names file, line and what was expected', async () => {
    const bad = await dwellbook('check', ...words('bad-cell'));
    expect(bad.status).toBe(65);
    expect(bad.stderr).toMatch(/run\.csv.*line 302/);
    const missing = await dwellbook('check', ...words('sound').with(1, 'no-such.csv'));
    expect([missing.status, missing.stderr]).toEqual([65, expect.stringContaining('no-such.csv')]);
    const broken = written('cycle.json', '{\n "format": "dwellbook-cycle/1",\n "code": }\n');
    const notJson = await dwellbook('check', ...words('sound').with(5, broken));
    expect([notJson.status, notJson.stderr]).toEqual([65, expect.stringContaining('cycle.json: line 3, column 10')]);
    const { cycle, layout } = recordedCase('sound');
    const unknown = written('unknown.json', JSON.stringify({ ...cycle, cealing: 190 }));
    const unknownKey = await dwellbook('check', ...words('sound').with(5, unknown));
    expect([unknownKey.status, unknownKey.stderr]).toEqual([65, expect.stringMatching(/unknown\.json: .*cealing/)]);
    const dwells = cycle.stages.filter(({ kind }) => kind === 'dwell');
    const twoDwells = written('two.json', JSON.stringify({ ...cycle, stages: dwells, windows: [] }));
    expect((await dwellbook('check', ...words('sound').with(5, twoDwells))).status).toBe(65);
    const channels = layout.channels.map((channel, n) => (n === 0 ? { ...channel, column: 'T99' } : channel));
    const noColumn = written('layout.json', JSON.stringify({ ...layout, channels }));
    const column = await dwellbook('check', ...words('sound').with(3, noColumn));
    expect([column.status, column.stderr]).toEqual([65, expect.stringMatching(/run\.csv.*T99/)]);
  });

  it('refuses what is no log, each in its own words', async () => {
    const { log } = recordedCase('sound');
    const check = async (name: string, bytes: Uint8Array | string) => {
      const path = join(freshFolder(), name);
      writeFileSync(path, bytes);
      const { status, stderr } = await dwellbook('check', ...words('sound').with(1, path));
      expect([name, status]).toEqual([name, 65]);
      expect(stderr).toContain(name);
      return stderr;
    };
    const said = [
      await check('empty.csv', ''),
      await check('binary.csv', Buffer.from(Array.from({ length: 5000 }, (_, n) => (n * 37) % 256))),
      await check('truncated.csv', log.subarray(0, 80)),
      await check('other-unit.csv', log.toString().replace('°C', '°F')),
    ];
    expect(new Set(said.map((sentence) => sentence.replaceAll(/\S*\.csv/g, ''))).size).toBe(said.length);
  });
});

describe('dwellbook cure', () => {
  const resin = join(CASES, 'cure-estimates', 'resin.json');
  const [, log = '', , layout = ''] = words('cure-estimates');

  it('estimates along every part thermocouple, with a figure every so many seconds', async () => {
    const cure = ['cure', '--log', log, '--layout', layout, '--resin', resin];
    const { status, stdout } = await dwellbook(...cure, '--every', '600', '--json');
    expect(status).toBe(0);
    const { channels } = JSON.parse(stdout);
    expect(channels.length).toBeGreaterThan(1);
    for (const { degree, series } of channels) {
      expect(series.t.length).toBe(series.degree.length);
      expect(Date.parse(series.t[1]) - Date.parse(series.t[0])).toBe(600_000);
      expect(series.degree).toEqual([...series.degree].sort((a, b) => a - b));
      expect(degree).toBeGreaterThanOrEqual(series.degree.at(-1));
      expect(degree - series.degree.at(-1)).toBeLessThan(0.01);
    }
    const table = await dwellbook(...cure);
    expect(table.stdout).toMatch(/^Resin set .+\nchannel +degree +Tg °C +gel +vitrifies\nTC1 +0\.\d{4} /);
    expect(table.stdout).toContain('\nTC1: no uncertainty of TC1 is on record\n');
    expect(channels[0]).toMatchObject({ degreeInterval: null, tgIntervalC: null, gelInterval: null });
  });

  it('says how far each figure may be off where the uncertainty of the thermocouple is on record', async () => {
    const document = JSON.parse(readFileSync(layout, 'utf8'));
    const channels = document.channels.map((one: object) => ({ ...one, uncertainty: 2.2 }));
    const known = written('known.json', JSON.stringify({ ...document, channels }));
    const cure = ['cure', '--log', log, '--layout', known, '--resin', resin];
    const answer = JSON.parse((await dwellbook(...cure, '--json')).stdout).channels[0];
    expect(answer.degreeInterval[0]).toBeLessThan(answer.degree);
    expect(answer.tgIntervalC[1]).toBeGreaterThan(answer.tgC);
    expect(Date.parse(answer.gelInterval[1])).toBeGreaterThan(Date.parse(answer.gelAt));
    const table = await dwellbook(...cure);
    expect(table.stdout).toMatch(
      /\nTC1: degree ± 0\.\d{4}; Tg ± \d+\.\d °C; gel \S+Z to \S+Z; k = 2, from U 2\.2 °C of TC1/,
    );
  });

  it('refuses a resin set that is none, naming the key', async () => {
    const { kinetics: _kinetics, ...rest } = JSON.parse(readFileSync(resin, 'utf8'));
    const path = written('resin.json', JSON.stringify(rest));
    const { status, stderr } = await dwellbook('cure', '--log', log, '--layout', layout, '--resin', path);
    expect([status, stderr]).toEqual([65, expect.stringMatching(/resin\.json: .*kinetics/)]);
  });
});

describe('dwellbook', () => {
  it('helps, for each command', async () => {
    for (const command of ['check', 'cure', 'import', 'serve', 'practice', 'verify']) {
      const { status, stdout, stderr } = await dwellbook(command, '--help');
      expect([command, status, stderr]).toEqual([command, 0, '']);
      expect(stdout).toMatch(new RegExp(`^Usage: dwellbook ${command} .*\\n[^]*Exit status: 0 `));
    }
    expect((await dwellbook('--help')).stdout).toContain('controls no vessel');
    expect((await dwellbook('--version')).stdout).toBe(`${VERSION}\n`);
  });

  it('has the version of its package', () => {
    const { version } = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8'));
    expect(VERSION).toBe(version);
  });
});

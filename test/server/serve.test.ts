import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import Database from 'better-sqlite3';
import { describe, expect, it, vi } from 'vitest';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { readLog } from '../../models/log/read-log.ts';
import { addressOf, dwellbook, endOf, startDwellbook } from './built-program.ts';
import { freshFolder } from './fresh-database.ts';
import { recordedCase } from './recorded-case.ts';

// Each test starts the program several times, on a machine that may be busy with other tests.
vi.setConfig({ testTimeout: 180_000 });

const CASES = fileURLToPath(new URL('../golden/recorded/', import.meta.url));
const file = (name: string, one: string) => join(CASES, name, one);

async function json(address: string, body?: unknown) {
  const init = { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) };
  const response = await fetch(address, body === undefined ? {} : init);
  return { status: response.status, body: JSON.parse(await response.text()) };
}

describe('dwellbook import', () => {
  it('records a file once, and says so the second time', async () => {
    const data = freshFolder();
    const words = ['import', file('must-work', 'run.csv'), '--layout', file('must-work', 'layout.json')];
    const first = await dwellbook(...words, '--recorder', 'recorder 1', '--data', data);
    expect([first.status, first.stdout]).toEqual([0, 'Recorded as run 1; it awaits its load.\n']);
    const second = await dwellbook('import', file('must-work', 'run.csv'), '--recorder', 'recorder 1', '--data', data);
    expect([second.status, second.stdout, second.stderr]).toEqual([
      65,
      '',
      'dwellbook: run.csv is recorded already, as run 1\n',
    ]);
    const other = await dwellbook(
      'import',
      file('sound', 'run.csv'),
      '--recorder',
      'recorder 1',
      '--data',
      data,
      '--json',
    );
    expect([other.status, other.stdout]).toEqual([0, '{"run":2}\n']);
    const verified = await dwellbook('verify', '--data', data);
    expect([verified.status, verified.stdout]).toEqual([0, expect.stringMatching(/^All hold: .* 2 sources/)]);
  });

  it('keeps nothing of a file it cannot read', async () => {
    const data = freshFolder();
    const words = ['import', file('bad-cell', 'run.csv'), '--layout', file('bad-cell', 'layout.json'), '--data', data];
    const { status, stderr } = await dwellbook(...words, '--recorder', 'recorder 1');
    expect([status, stderr]).toEqual([65, expect.stringMatching(/run\.csv.*line 302/)]);
    const db = new Database(join(data, 'workshop.sqlite'), { readonly: true });
    const rows = ['files', 'runs', 'recorders', 'imports', 'audit'].map((table) =>
      db.prepare(`SELECT count(*) FROM ${table}`).pluck().get(),
    );
    db.close();
    expect(rows).toEqual([0, 0, 0, 0, 0]);
  });

  it('loses nothing acknowledged and keeps nothing half, killed at any instant', async () => {
    const data = freshFolder();
    const { log, layout } = recordedCase('must-work');
    const layoutPath = join(data, 'layout.json');
    writeFileSync(layoutPath, JSON.stringify(layout));
    const acknowledged: number[] = [];
    // The first is left alone, and tells how long one takes here.
    let wholeMs = Number.POSITIVE_INFINITY;
    for (let attempt = 0; attempt < 9; attempt += 1) {
      const path = join(data, `run-${attempt}.csv`);
      writeFileSync(path, Buffer.concat([log, Buffer.from('\n'.repeat(attempt + 1))]));
      const child = startDwellbook('import', path, '--layout', layoutPath, '--data', data, '--json');
      child.stdout?.on('data', (said: Buffer) => acknowledged.push(JSON.parse(said.toString()).run));
      const startedMs = performance.now();
      const killing = attempt === 0 ? undefined : setTimeout(() => child.kill('SIGKILL'), (wholeMs * attempt) / 8);
      await endOf(child);
      clearTimeout(killing);
      if (attempt === 0) wholeMs = performance.now() - startedMs;
    }
    const verified = await dwellbook('verify', '--data', data);
    expect(verified.status, verified.stdout + verified.stderr).toBe(0);
    const db = new Database(join(data, 'workshop.sqlite'), { readonly: true });
    expect(db.pragma('integrity_check', { simple: true })).toBe('ok');
    const runs = db.prepare('SELECT id FROM runs').pluck().all();
    const whole = db.prepare('SELECT run_id FROM run_sources WHERE scans = 806').pluck().all();
    db.close();
    expect(whole).toEqual(runs);
    expect(acknowledged.length).toBeGreaterThan(0);
    expect(runs).toEqual(expect.arrayContaining(acknowledged));
  });
});

describe('dwellbook serve', () => {
  it('makes its data folder, judges a big run in a thread of its own, and ends when told to', async () => {
    const data = join(freshFolder(), 'new', 'workshop');
    const child = startDwellbook('serve', '--port', '0', '--data', data);
    const address = await addressOf(child);
    expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
    const { layout, ...recorded } = recordedCase('must-work');
    const invented = JSON.parse(readFileSync(file('cure-estimates', 'resin.json'), 'utf8'));
    // In a real workshop an invented set is for trials; one that was fitted may stand behind a limit.
    const resin = { ...invented, source: { ...invented.source, status: 'fitted' } };
    const cycle = { ...recorded.cycle, cure: { resin: resin.code, degreeAtLeast: 0.5 } };
    await json(`${address}/api/resins`, { document: resin });
    const log = densely(recordedCase('must-work').log.toString('latin1'), 20);
    await json(`${address}/api/cycles`, { document: cycle });
    const upload = await fetch(`${address}/api/imports?name=run.csv`, {
      method: 'POST',
      headers: { 'content-type': 'application/octet-stream' },
      body: new Uint8Array(log),
    });
    const { id } = JSON.parse(await upload.text());
    const { body } = await json(`${address}/api/imports/${id}/run`, { layout });
    const load = { format: 'dwellbook-load/1', parts: [{ part: 'P-A' }], sensors: [] } as const;
    const cycleNamed = { code: cycle.code, issue: cycle.issue };
    const judging = json(`${address}/api/runs/${body.run}/load`, { load, cycle: cycleNamed });
    const set = await judging;
    expect(set.status).toBe(201);
    expect(set.body.scans * layout.channels.length).toBeGreaterThan(50_000);
    const inputs = { cycle, load, resin, exclusions: [], barometer: null, open: false };
    const engine = evaluateLog(readLog([{ name: 'run.csv', chunks: [Buffer.from(log)] }], layout), inputs);
    expect(set.body.evaluation.document.parts).toEqual(JSON.parse(JSON.stringify(engine.parts)));
    const chart = await json(`${address}/api/runs/${body.run}/chart`);
    const estimated = chart.body.lines.filter(({ strip }: { strip: string }) => strip === 'cure');
    expect(estimated.map(({ channel }: { channel: string }) => channel)).toEqual(engine.parts[0]?.judgedBy);
    for (const { value } of estimated) {
      expect(value.at(-1)).toBeCloseTo(engine.parts[0]?.cure[0]?.degree ?? Number.NaN, 1);
    }
    const refused = await json(`${address}/api/runs/${body.run}/load`, {
      load: { ...load, barometer: '9 mbar' },
      cycle: cycleNamed,
      reason: 'to see it refused in the thread',
    });
    expect([refused.status, refused.body.type]).toEqual([422, '/problems/barometer-malformed']);
    expect((await json(`${address}/api/audit/verify`)).body).toMatchObject({ holds: true, sources: 1 });
    expect(readdirSync(join(data, 'incoming'))).toEqual([]);
    child.kill('SIGTERM');
    expect(await endOf(child)).toBe(0);
    expect(existsSync(join(data, 'workshop.sqlite-wal'))).toBe(false);
  });

  it('refuses a port that is taken and a database of a later version', async () => {
    const data = freshFolder();
    const child = startDwellbook('serve', '--port', '0', '--data', data);
    const port = new URL(await addressOf(child)).port;
    const taken = await dwellbook('serve', '--port', port, '--data', freshFolder());
    expect([taken.status, taken.stderr]).toEqual([65, expect.stringContaining(`port ${port}`)]);
    child.kill('SIGTERM');
    await endOf(child);
    const db = new Database(join(data, 'workshop.sqlite'));
    db.exec(`INSERT INTO migrations VALUES ('9999-later', '${'0'.repeat(64)}', 'later')`);
    db.close();
    const newer = await dwellbook('serve', '--port', '0', '--data', data);
    expect([newer.status, newer.stderr]).toEqual([65, expect.stringContaining('9999-later')]);
  });

  it('never takes a real workshop for the practice one', async () => {
    const data = freshFolder();
    await dwellbook('import', file('sound', 'run.csv'), '--layout', file('sound', 'layout.json'), '--data', data);
    for (const words of [['practice'], ['practice', '--fresh']]) {
      const { status, stderr } = await dwellbook(...words, '--data', data, '--port', '0');
      expect([status, stderr]).toEqual([64, expect.stringContaining('real workshop')]);
    }
    expect((await dwellbook('verify', '--data', data)).stdout).toMatch(/ 1 sources/);
  });
});

/** The same run with more scans: each row again at a later second, so that the log is a big one. */
function densely(log: string, times: number): Buffer {
  const rows = log.split(/\r?\n/);
  const dense = rows.flatMap((row) => {
    const stamp = /\d\d:\d\d:(00|30)/.exec(row);
    if (stamp === null) return [row];
    const start = Number(stamp[1]);
    return Array.from({ length: times }, (_, n) => {
      const second = String(start + n).padStart(2, '0');
      return row.slice(0, stamp.index + 6) + second + row.slice(stamp.index + 8);
    });
  });
  return Buffer.from(dense.join('\n'), 'latin1');
}

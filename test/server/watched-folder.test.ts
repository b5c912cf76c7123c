import { appendFileSync, copyFileSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { addRecorder } from '../../server/actions/add-recorder.ts';
import { ROLES } from '../../server/contract/roles.ts';
import { type WatchedFolder, watchFolder } from '../../server/live/watched-folder.ts';
import type { Db } from '../../server/store/database.ts';
import { listWaitingImports } from '../../server/store/imports.ts';
import { listRuns } from '../../server/store/run-lines.ts';
import { freshDatabase, freshFolder } from './fresh-database.ts';
import { recordedCase } from './recorded-case.ts';

const { log, layout } = recordedCase('must-work');
const watching: WatchedFolder[] = [];

afterEach(async () => {
  for (const one of watching.splice(0)) await one.close();
});

async function watched({ db = freshDatabase(), folder = join(freshFolder(), 'watched'), mostBytes = 1e6 } = {}) {
  const said: string[] = [];
  const log = {
    info: (_: object, message: string) => said.push(message),
    error: (facts: object) => said.push(JSON.stringify(facts)),
  };
  const parts = { db, clock: () => Date.parse('2026-03-10T08:00:00Z'), actor: { name: 'operator 1', roles: ROLES } };
  const watch = await watchFolder({ ...parts, folder, settleMs: 120, mostBytes, log });
  watching.push(watch);
  return { db, folder, said, parts, watch };
}

async function until(holds: () => boolean): Promise<void> {
  for (let tries = 0; tries < 400 && !holds(); tries += 1) await new Promise((resolve) => setTimeout(resolve, 25));
  expect(holds()).toBe(true);
}

const waiting = (db: Db) => listWaitingImports(db).map(({ name, refusal }) => [name, refusal?.code]);

describe('a watched folder', () => {
  it('makes a run of a finished file, by the layout of the recorder its folder is named for', async () => {
    const { db, folder, parts } = await watched();
    addRecorder(parts, { name: 'Oven 2 recorder', layout });
    mkdirSync(join(folder, 'Oven 2 recorder'));
    const path = join(folder, 'Oven 2 recorder', 'run.csv');
    writeFileSync(path, log.subarray(0, 9000));
    await new Promise((resolve) => setTimeout(resolve, 60));
    appendFileSync(path, log.subarray(9000));
    await until(() => listRuns(db).total === 1);
    const [run] = listRuns(db).runs;
    expect(run).toMatchObject({ recorder: 'Oven 2 recorder', scans: 806, state: 'awaiting-load' });
    expect(waiting(db)).toEqual([]);
  });

  it('takes the one kept layout that reads a file, and lets a file wait that none or two read', async () => {
    const { db, folder, parts } = await watched();
    writeFileSync(join(folder, 'unknown.csv'), log);
    await until(() => waiting(db).length === 1);
    expect(waiting(db)).toEqual([['unknown.csv', 'layout-not-provable']]);
    addRecorder(parts, { name: 'recorder 1', layout });
    const longer = Buffer.concat([log, Buffer.from('\n')]);
    writeFileSync(join(folder, 'known.csv'), longer);
    await until(() => listRuns(db).total === 1);
    addRecorder(parts, { name: 'recorder 2', layout: { ...layout, name: 'the same under another name' } });
    writeFileSync(join(folder, 'either.csv'), Buffer.concat([longer, Buffer.from('\n')]));
    await until(() => waiting(db).length === 2);
    expect(waiting(db)[0]).toEqual(['either.csv', 'layout-not-provable']);
  });

  it('lists what cannot be read, keeps no rubbish, and goes on with the next file', async () => {
    const { db, folder, parts } = await watched({ mostBytes: 50_000 });
    addRecorder(parts, { name: 'recorder 1', layout });
    mkdirSync(join(folder, 'recorder 1'));
    writeFileSync(join(folder, 'recorder 1', 'a-truncated.csv'), log.subarray(0, 60));
    writeFileSync(join(folder, 'recorder 1', 'b-binary.csv'), Buffer.alloc(3000, 7));
    writeFileSync(join(folder, 'recorder 1', 'c-huge.csv'), Buffer.alloc(50_001, 65));
    writeFileSync(join(folder, 'recorder 1', 'd-empty.csv'), '');
    await until(() => waiting(db).length === 4);
    writeFileSync(join(folder, 'recorder 1', 'e-good.csv'), log);
    await until(() => listRuns(db).total === 1);
    expect(Object.fromEntries(waiting(db))).toEqual({
      'a-truncated.csv': 'log-no-readings',
      'b-binary.csv': 'log-not-text',
      'c-huge.csv': 'too-large',
      'd-empty.csv': 'log-empty',
    });
    expect(db.prepare('SELECT bytes FROM files ORDER BY bytes').pluck().all()).toEqual([60, log.length]);
  });

  it('knows a file again after a restart, by its bytes', async () => {
    const first = await watched();
    addRecorder(first.parts, { name: 'recorder 1', layout });
    writeFileSync(join(first.folder, 'run.csv'), log);
    await until(() => listRuns(first.db).total === 1);
    await first.watch.close();
    const second = await watched({ db: first.db, folder: first.folder });
    copyFileSync(join(first.folder, 'run.csv'), join(first.folder, 'copy.csv'));
    await until(() => second.said.length === 2);
    expect(second.said).toEqual(['run.csv is recorded already, as run 1', 'copy.csv is recorded already, as run 1']);
    expect([listRuns(first.db).total, waiting(first.db)]).toEqual([1, []]);
  });

  it('does not make a second run of a file that went on growing', async () => {
    const { db, folder, parts } = await watched();
    addRecorder(parts, { name: 'recorder 1', layout });
    const lines = log.toString('latin1').split('\n');
    writeFileSync(join(folder, 'run.csv'), `${lines.slice(0, 400).join('\n')}\n`, 'latin1');
    await until(() => listRuns(db).total === 1);
    writeFileSync(join(folder, 'run.csv'), log);
    await until(() => waiting(db).length === 1);
    expect(waiting(db)).toEqual([['run.csv', 'state-conflict']]);
    expect(listRuns(db).total).toBe(1);
  });
});

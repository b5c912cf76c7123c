import { spawn } from 'node:child_process';
import { mkdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { LiveScan } from '../../../models/log/live-source.ts';
import { driverOf } from '../../../server/live/sources/source.ts';
import { freshFolder } from '../fresh-database.ts';
import { type Heard, listenTo, sleep, until } from './listening.ts';

const channels = [
  { column: 'TC1', name: 'TC1', role: 'part', unit: '°C' },
  { column: 'TC2', name: 'TC2', role: 'part', unit: '°C' },
];
const layout = {
  format: 'dwellbook-layout/1',
  name: 'Oven 2 recorder',
  delimiter: ';',
  decimal: ',',
  header: 2,
  time: { columns: ['time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' },
  channels,
  missing: ['OPEN'],
};
const HEAD = 'Oven 2;;\ntime;TC1;TC2\n';
/** Midnight of today in UTC, so that what is written lies within the day that is read back. */
const DAY = new Date(Date.now() - 6 * 3_600_000).toISOString().slice(0, 13);
const AT = Date.parse(`${DAY}:00:00Z`);

const stamp = (s: number) => new Date(AT + s * 1000).toISOString().slice(0, 19).replace('T', ' ');
const line = (s: number, tc1: number | string = s, tc2: number | string = 100 + s) =>
  `${stamp(s)};${String(tc1).replace('.', ',')};${String(tc2).replace('.', ',')}\n`;
const lines = (from: number, until: number) => Array.from({ length: until - from }, (_, i) => line(from + i)).join('');

function document(folder: string, changes: object = {}) {
  const own = { ...layout, ...changes };
  return {
    format: 'dwellbook-source/1',
    name: 'Oven 2 files',
    intervalS: 0.2,
    reads: { kind: 'growing-files', folder, layout: own },
    channels,
  };
}

/** Another program: does to files of a folder what it is told, in its own process. */
async function another(folder: string, script: string): Promise<void> {
  const whole = `const fs = require('node:fs'); process.chdir(process.argv[1]); (async () => { ${script} })();`;
  const child = spawn(process.execPath, ['-e', whole, folder], { stdio: ['ignore', 'ignore', 'inherit'] });
  const code = await new Promise((resolve) => child.once('exit', resolve));
  expect(code).toBe(0);
}

const seconds = ({ scans }: Heard) => scans.map(({ timeMs }) => (timeMs - AT) / 1000);
const upTo = (until: number) => Array.from({ length: until }, (_, i) => i);

describe('a source of growing files', () => {
  it('reads whole lines only, while another program writes them byte by byte', async () => {
    const folder = freshFolder();
    const heard = await listenTo(document(folder));
    const text = HEAD + lines(0, 12) + line(12, 'OPEN', 7.5);
    await another(
      folder,
      `const text = ${JSON.stringify(text)};
       for (let at = 0; at < text.length; at += 3) {
         fs.appendFileSync('run.csv', text.slice(at, at + 3));
         if (at % 30 === 0) await new Promise((done) => setTimeout(done, 10));
       }`,
    );
    await until(() => heard.scans.length >= 13);
    await sleep(300);
    expect(seconds(heard)).toEqual(upTo(13));
    expect(heard.figures().at(-2)).toEqual([11, 111]);
    expect(heard.figures().at(-1)).toEqual([null, 7.5]);
    expect(heard.told.at(-1)).toEqual(['reached', null]);
    expect(heard.notes).toEqual([]);
  });

  it('follows a file that is renamed, and the one begun in its place', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 5));
    const heard = await listenTo(document(folder));
    await until(() => heard.scans.length >= 5);
    await another(
      folder,
      `fs.appendFileSync('run.csv', ${JSON.stringify(lines(5, 7))});
       fs.renameSync('run.csv', 'run-1.csv');
       fs.writeFileSync('run.csv', ${JSON.stringify(HEAD + lines(7, 9))});`,
    );
    await until(() => heard.scans.length >= 9);
    await another(folder, `fs.appendFileSync('run.csv', ${JSON.stringify(lines(9, 10))});`);
    await until(() => heard.scans.length >= 10);
    await sleep(300);
    expect(seconds(heard).sort((a, b) => a - b)).toEqual(upTo(10));
  });

  it('begins anew with a file that was begun anew, shorter or longer than before', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 5));
    const heard = await listenTo(document(folder));
    await until(() => heard.scans.length >= 5);
    await another(folder, `fs.writeFileSync('run.csv', ${JSON.stringify(HEAD + lines(5, 7))});`);
    await until(() => heard.scans.length >= 7);
    await another(folder, `fs.writeFileSync('run.csv', ${JSON.stringify(HEAD + lines(7, 20))});`);
    await until(() => heard.scans.length >= 20);
    expect(seconds(heard)).toEqual(upTo(20));
    expect(heard.notes).toEqual(['run.csv was begun anew', 'run.csv was begun anew']);
  });

  it('reads two files that overlap; what is the same in both is sent twice alike', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'a.csv'), HEAD + lines(0, 8));
    writeFileSync(join(folder, 'b.csv'), HEAD + lines(5, 12));
    const heard = await listenTo(document(folder));
    await until(() => heard.scans.length >= 15);
    const byTime = new Map<number, string>();
    for (const [i, { timeMs }] of heard.scans.entries()) {
      const figures = JSON.stringify(heard.figures()[i]);
      expect(byTime.get(timeMs) ?? figures).toBe(figures);
      byTime.set(timeMs, figures);
    }
    expect(byTime.size).toBe(12);
  });

  it('leaves out a line that cannot be read, names it, and reads the others', async () => {
    const folder = freshFolder();
    writeFileSync(
      join(folder, 'run.csv'),
      `${HEAD + lines(0, 4) + line(4, '***') + lines(5, 8)}${line(8, 'ERR', 1)}Checked by operator 4\n`,
    );
    const heard = await listenTo(document(folder));
    await until(() => heard.scans.length >= 7);
    await another(folder, `fs.appendFileSync('run.csv', ${JSON.stringify(lines(9, 10))});`);
    await until(() => heard.scans.length >= 8);
    expect(seconds(heard)).toEqual([0, 1, 2, 3, 5, 6, 7, 9]);
    expect(heard.notes.map((note) => note.slice(0, 34))).toEqual([
      'run.csv, line 7 left out: "***" is',
      'run.csv, line 11 left out: "ERR" i',
      'run.csv, line 12 left out: no read',
    ]);
    expect(heard.told.map(([, because]) => because?.slice(0, 15) ?? null)).toContain('run.csv, line 7');
  });

  it('says of a file that is no such log that it is none, and reads the next', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'picture.csv'), Buffer.from('P5\n\u0000\u0001\n\u0000\n'));
    writeFileSync(join(folder, 'other.csv'), 'a;b\n1;2\n3;4\n5;6\n');
    const heard = await listenTo(document(folder));
    await until(() => heard.notes.length === 2);
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 3));
    await until(() => heard.scans.length === 3);
    expect(heard.notes.sort().map((note) => note.slice(0, 27))).toEqual([
      'other.csv, line 2: there is',
      'picture.csv is not a text f',
    ]);
    expect(heard.told.at(-1)?.[1]).toMatch(/^(other|picture)\.csv/);
  });

  it('adds what was taken from a clock that was set back, and lists the lines', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 40));
    const heard = await listenTo(document(folder));
    await until(() => heard.scans.length >= 40);
    // The clock goes back by 20 s between second 39 and second 40.
    const back = (from: number, until: number) =>
      Array.from({ length: until - from }, (_, i) => line(from + i - 20, from + i, 100 + from + i)).join('');
    for (const [from, until] of [
      [40, 50],
      [50, 1500],
      [1500, 1510],
    ] as const) {
      await another(folder, `fs.appendFileSync('run.csv', ${JSON.stringify(back(from, until))});`);
      await new Promise((resolve) => setTimeout(resolve, 600));
    }
    await until(() => heard.scans.length >= 1510);
    expect(seconds(heard)).toEqual(upTo(1510));
    expect(heard.notes[0]).toMatch(/^run\.csv, lines 43 to 52: .*clock.*set back/);
  });

  it('reads what was written while nobody read, and nothing of what is long past', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 3000));
    const kept = { firstMs: AT, lastMs: AT + 2000_000 };
    const heard = await listenTo(document(folder), { kept });
    await until(() => seconds(heard).at(-1) === 2999);
    expect(seconds(heard)[0]).toBe(1400);
  });

  it('reads lines again that could not be kept', async () => {
    const folder = freshFolder();
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 5));
    const scans: LiveScan[] = [];
    let isFull = true;
    const heard = await listenTo(document(folder), {
      take: async (taken) => {
        if (isFull) throw new Error('the disk is full');
        scans.push(...taken);
        return { kept: taken.length, known: 0, refused: [] };
      },
    });
    await until(() => heard.notes.length > 0);
    expect(heard.notes).toEqual(['the disk is full']);
    isFull = false;
    await until(() => scans.length === 5);
    expect(scans.map(({ timeMs }) => (timeMs - AT) / 1000)).toEqual(upTo(5));
  });

  it('tells a folder that is not there, and reads it once it is', async () => {
    const folder = join(freshFolder(), 'later');
    const heard = await listenTo(document(folder));
    await until(() => /no such file or directory/.test(heard.told.at(-1)?.[1] ?? ''));
    mkdirSync(folder);
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 3));
    await until(() => heard.scans.length === 3);
    rmSync(folder, { recursive: true });
    await until(() => heard.told.at(-1)?.[0] === 'cannot-be-reached');
  });

  it('reads a file of two bytes a character', async () => {
    const folder = freshFolder();
    const heard = await listenTo(document(folder, { encoding: 'utf-16le' }));
    const bytes = Buffer.from(`\uFEFF${HEAD}${lines(0, 6)}`, 'utf16le');
    // One byte of a character is there, the other not yet.
    writeFileSync(join(folder, 'part'), bytes.subarray(0, bytes.length - 41));
    renameSync(join(folder, 'part'), join(folder, 'run.csv'));
    await until(() => heard.scans.length === 5);
    writeFileSync(join(folder, 'run.csv'), bytes);
    await until(() => heard.scans.length === 6);
    expect(seconds(heard)).toEqual(upTo(6));
  });

  it('tries settings nobody has saved on the file that changed last', async () => {
    const folder = freshFolder();
    const { readOnce } = (await driverOf('growing-files'))!;
    const once = () => readOnce({ document: document(folder) as never, now: Date.now, inventVessel: null });
    expect((await once()).because[0]).toBe(`there is no file in ${folder}`);
    writeFileSync(join(folder, 'run.csv'), HEAD + lines(0, 3) + line(3, 'OPEN', 21.5));
    expect(await once()).toEqual({ figures: Float64Array.of(NaN, 21.5), because: ['absent in run.csv', null] });
  });
});

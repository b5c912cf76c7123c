import { createHash } from 'node:crypto';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { databasePath } from '../../server/command/data-folder.ts';
import { importCommand } from '../../server/command/import.ts';
import { csvRows } from '../../server/files/csv-rows.ts';
import { openDatabase } from '../../server/store/database.ts';
import { failNthInsert } from './fail-nth-insert.ts';
import { freshFolder } from './fresh-database.ts';
import { type Answer, type LiveApp, liveApp, NOW } from './live-app.ts';
import { receiveTape } from './material-steps.ts';

function send(app: LiveApp, kind: 'parts' | 'rolls', text: string | Uint8Array, query: object = {}): Promise<Answer> {
  const headers = { 'content-type': 'text/csv' };
  const body = typeof text === 'string' ? text : new Uint8Array(text);
  return app.send(`/api/${kind}/import?${new URLSearchParams({ ...query })}`, { method: 'POST', headers, body });
}

const sha256 = (text: string) => createHash('sha256').update(text).digest('hex');
const countOf = (app: LiveApp, table: string) => app.parts.db.prepare(`SELECT count(*) FROM ${table}`).pluck().get();

const PARTS = `Serial no;Title;Drawing;Rev;Tool;Work order;Thickness mm;Plies;Colour
SR-1;Strut;D-7;B;T-1;W-9;12,5;64;red
SR-2;"Strut ""long""; left";D-7;B;T-1;;;;
;Strut;D-7;B;T-1;;;;
SR-3;Strut;D-7;B;T-1;;twelve;;
SR-1;Strut;D-7;B;T-1;;;;
SR-4;Strut
`;

describe('a table of parts', () => {
  it('is previewed, with every refused row by line and column, and nothing kept', async () => {
    const app = await liveApp();
    const { status, body, text } = await send(app, 'parts', PARTS);
    expect(status, text).toBe(200);
    expect(body).toMatchObject({
      kind: 'parts',
      sha256: sha256(PARTS),
      encoding: 'utf-8',
      delimiter: ';',
      missing: [],
      rows: 6,
      good: 2,
      refused: 4,
      kept: false,
    });
    expect(body.columns.map(({ field }: { field: string | null }) => field)).toEqual([
      'serial',
      'title',
      'drawing',
      'drawing-issue',
      'tool',
      'work-order',
      'thickness-mm',
      'plies',
      null,
    ]);
    expect(body.refusals).toEqual([
      { line: 4, column: 'Serial no', value: '', because: 'nothing stands there' },
      { line: 5, column: 'Thickness mm', value: 'twelve', because: 'expected 0.05 to 1000 mm' },
      { line: 6, column: 'Serial no', value: 'SR-1', because: 'stands in line 2 already' },
      { line: 7, column: null, value: 'SR-4 Strut', because: '2 cells, and the heading has 9' },
    ]);
    expect(body.first[1]).toEqual({
      line: 3,
      cells: { serial: 'SR-2', title: 'Strut "long"; left', drawing: 'D-7', 'drawing-issue': 'B', tool: 'T-1' },
    });
    expect([countOf(app, 'parts'), countOf(app, 'audit'), countOf(app, 'files')]).toEqual([0, 0, 0]);
  });

  it('is kept by the hash its preview showed, the good rows and no others; a second time nothing is left of it', async () => {
    const app = await liveApp();
    const { body, status } = await send(app, 'parts', PARTS, { commit: sha256(PARTS) });
    expect([status, body.kept, body.good]).toEqual([200, true, 2]);
    expect((await app.get('/api/parts/SR-1')).body).toMatchObject({
      title: 'Strut',
      drawing: 'D-7',
      drawingIssue: 'B',
      tool: 'T-1',
      layup: { workOrder: 'W-9', thicknessMm: 12.5, plies: 64, tool: 'T-1' },
    });
    expect((await app.get('/api/parts/SR-2')).body).toMatchObject({ title: 'Strut "long"; left', layup: null });
    expect((await app.get('/api/parts/SR-4')).status).toBe(404);
    expect((await app.get('/api/audit')).body.lines).toMatchObject([
      { verb: 'import-parts', subject: `table/${sha256(PARTS)}` },
    ]);
    expect(verifyChains(app.parts.db)).toMatchObject({ holds: true, firstBroken: null });
    const again = await send(app, 'parts', PARTS);
    expect(again.body).toMatchObject({ good: 0, refusals: [{ because: 'is on record already' }, {}, {}, {}, {}, {}] });
    expect((await send(app, 'parts', PARTS, { commit: sha256(PARTS) })).status).toBe(409);
  });

  it('takes the columns a person says, and refuses other bytes than were previewed', async () => {
    const app = await liveApp();
    const table = 'what,of\nlong,SR-7\n';
    expect((await send(app, 'parts', table)).body).toMatchObject({ missing: ['serial'], good: 0 });
    expect((await send(app, 'parts', table, { commit: sha256(table) })).body.detail).toContain(
      'No column holds serial',
    );
    expect((await send(app, 'parts', table, { columns: 'title,title' })).body.detail).toContain('Two columns');
    expect((await send(app, 'parts', table, { columns: 'title' })).body.detail).toContain('1 columns are said');
    expect((await send(app, 'parts', table, { columns: 'title,colour' })).body.detail).toContain('"colour"');
    const said = { columns: 'title,serial' };
    expect((await send(app, 'parts', table, { ...said, commit: sha256('other') })).status).toBe(409);
    expect(countOf(app, 'parts')).toBe(0);
    expect((await send(app, 'parts', table, { ...said, commit: sha256(table) })).body.good).toBe(1);
    expect((await app.get('/api/parts/SR-7')).body.title).toBe('long');
  });

  it('is read in the code page of a desk where it is no UTF-8, and refused where it is no text', async () => {
    const app = await liveApp();
    const { body } = await send(app, 'parts', Buffer.from('serial,title\nSR-1,Stra\xdfe\n', 'latin1'));
    expect(body).toMatchObject({ encoding: 'windows-1252', first: [{ cells: { title: 'Straße' } }] });
    expect((await send(app, 'parts', Buffer.from([0x50, 0x4b, 3, 4, 0, 0]))).status).toBe(422);
    expect((await send(app, 'parts', '')).status).toBe(422);
    expect((await app.post('/api/parts/import', {})).status).toBe(415);
  });

  it('is kept whole or not at all, wherever an insert fails', async () => {
    const app = await liveApp();
    const table = 'serial,title,tool,plies\nSR-1,a,T-1,4\nSR-2,b,T-1,5\n';
    const counts = () =>
      ['parts', 'part_particulars', 'part_layups', 'tools', 'files', 'audit'].map((t) => countOf(app, t));
    const before = counts();
    for (let n = 1; ; n += 1) {
      const fault = failNthInsert(app.parts.db, n);
      const { status } = await send(app, 'parts', table, { commit: sha256(table) });
      fault.end();
      if (status === 200) {
        expect(n).toBeGreaterThan(8);
        break;
      }
      expect([status, app.parts.db.inTransaction, counts()]).toEqual([500, false, before]);
    }
    app.takeFaults();
    expect(counts()).toEqual([2, 2, 2, 1, 1, 1]);
  });
});

describe('a table of rolls', () => {
  it('receives rolls of batches on record; what cannot have happened is refused by line', async () => {
    const app = await liveApp();
    await receiveTape(app);
    await app.post('/api/workshop', {
      name: 'Skerry Row',
      zone: 'Europe/Lisbon',
      units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    });
    const table = [
      'Roll,Lot,Received,As,Length m,Out minutes',
      'K-2,B-1,2026-02-03 08:00,frozen,40,',
      'K-3,B-1,2026-02-03T08:00:00+01:00,out,,30',
      'K-1,B-1,2026-02-03,,,',
      'K-4,B-9,2026-02-03,,,',
      'K-5,B-1,2026-03-11,,,',
      'K-6,B-1,2026-01-02,,,',
      'K-7,B-1,03/02/2026,,,',
      'K-8,B-1,2026-02-30,,,',
      'K-9,B-1,2026-02-03,warm,,',
    ].join('\r\n');
    const { body, text } = await send(app, 'rolls', table, { commit: sha256(table) });
    expect(body, text).toMatchObject({ good: 2, refused: 7, kept: true });
    expect(body.refusals.map(({ line, column, because }: Record<string, string>) => [line, column, because])).toEqual([
      [4, 'Roll', 'is on record already'],
      [5, 'Lot', 'there is no such batch; record it first'],
      [6, 'Received', 'lies in the future'],
      [7, 'Received', 'its batch was made on 2026-01-15'],
      [8, 'Received', 'expected a day such as 2026-03-02, or with its time 2026-03-02 08:15'],
      [9, 'Received', 'expected a day such as 2026-03-02, or with its time 2026-03-02 08:15'],
      [10, 'As', 'expected "frozen" or "out"'],
    ]);
    expect((await app.get('/api/items/K-2')).body).toMatchObject({
      batch: 'B-1',
      lengthM: 40,
      state: { place: 'freezer' },
    });
    const [{ event }] = (await app.get('/api/items/K-3')).body.ledger;
    expect(event).toEqual({
      kind: 'received',
      at: '2026-02-03T07:00:00.000Z',
      batch: 'B-1',
      as: 'out',
      outMinutesBefore: 30,
    });
  });
});

describe('dwellbook import parts', () => {
  it('keeps the good rows of a table, unless it is run dry', async () => {
    const data = freshFolder();
    const table = join(data, 'parts.csv');
    writeFileSync(table, 'serial,plies\nSR-1,8\nSR-2,many\n');
    const serials = () => {
      const db = openDatabase(databasePath(data), { at: NOW });
      const found = db.prepare('SELECT serial FROM parts').pluck().all();
      db.close();
      return found;
    };
    expect(await importCommand.run(['parts', table, '--data', data, '--dry-run'])).toBe(0);
    expect(serials()).toEqual([]);
    expect(await importCommand.run(['parts', table, '--data', data])).toBe(0);
    expect(serials()).toEqual(['SR-1']);
    await expect(importCommand.run(['parts', '--data', data])).rejects.toThrow('--FILE is missing');
  });
});

describe('csvRows', () => {
  // Papa Parse, an independent reader of RFC 4180.
  const cell = fc.string({ unit: fc.constantFrom('a', 'Ä', ',', ';', '"', '\n', ' ', '7'), maxLength: 6 });
  it('reads what an independent writer wrote, and counts the lines', () => {
    const table = fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 6 });
    fc.assert(
      fc.property(table, fc.constantFrom(',', ';', '\t'), fc.constantFrom('\n', '\r\n'), (rows, delimiter, newline) => {
        const text = Papa.unparse(rows, { delimiter, newline, quotes: true });
        const read = [...csvRows(text, delimiter)];
        expect(read.map(({ cells }) => cells)).toEqual(rows.map((row) => row.map((one) => one.trim())));
        let line = 1;
        for (const [n, row] of rows.entries()) {
          expect(read[n]?.line).toBe(line);
          line += 1 + row.join('').split('\n').length - 1;
        }
      }),
      { numRuns: 200 },
    );
  });

  it('names a row whose quote is not closed, and reads those after it', () => {
    const rows = [...csvRows('a,b\n"x,1\ny,2\n"z"q,3\n"w",4', ',')];
    expect(rows.map(({ line, isBroken }) => [line, isBroken])).toEqual([
      [1, false],
      [2, true],
      [3, false],
      [4, true],
      [5, false],
    ]);
  });
});

import { createHash } from 'node:crypto';
import { expect, it } from 'vitest';
import { liveApp } from './live-app.ts';

const ROWS = 100_000;
/** Lines of the file, its heading first. */
const BAD = [2, 3, 500, 10_001, 20_000, 50_001, 70_000, 99_999, 100_000, 100_001];

it('keeps 100 000 rows less ten, and names the ten', async () => {
  const app = await liveApp({ mostUploadBytes: 1 << 25 });
  const isBad = new Set(BAD);
  const lines = ['serial,title,drawing,tool,plies'];
  for (let n = 2; n <= ROWS + 1; n += 1) {
    lines.push(`P-${String(n).padStart(6, '0')},Strut,D-${n % 40},T-${n % 30},${isBad.has(n) ? 'many' : 24}`);
  }
  const text = lines.join('\n');
  const commit = createHash('sha256').update(text).digest('hex');
  const send = (query: string) =>
    app.send(`/api/parts/import?${query}`, { method: 'POST', headers: { 'content-type': 'text/csv' }, body: text });
  const preview = await send('');
  expect(preview.body).toMatchObject({ rows: ROWS, good: ROWS - 10, refused: 10, kept: false });
  expect(preview.body.refusals.map(({ line }: { line: number }) => line)).toEqual(BAD);
  const kept = await send(`commit=${commit}`);
  expect(kept.body).toMatchObject({ good: ROWS - 10, refused: 10, kept: true });
  const count = (table: string) => app.parts.db.prepare(`SELECT count(*) FROM ${table}`).pluck().get();
  expect([count('parts'), count('part_particulars'), count('part_layups'), count('tools')]).toEqual([
    ROWS - 10,
    ROWS - 10,
    ROWS - 10,
    30,
  ]);
  expect(app.parts.db.pragma('integrity_check', { simple: true })).toBe('ok');
});

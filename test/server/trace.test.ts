import { describe, expect, it } from 'vitest';
import { type LiveApp, liveApp, NOW, upload } from './live-app.ts';
import { recordedCase } from './recorded-case.ts';

const CASE = 'two-bag-lines';
const RUNS = 12;
/** Runs in which the first part was laid up on T-7: all but one of those parts break. */
const ON_T7 = [1, 3, 4, 6, 8, 9, 11];
const BROKEN = ON_T7.slice(0, -1);
/** The roll moves with the tool, but not always. */
const FROM_K9 = [...ON_T7.slice(1), 5, 12];

/** Twelve days of one recorded run, each with two parts of its own, brought in as a recorder's files are. */
async function planted(): Promise<LiveApp> {
  const app = await liveApp();
  const { log, layout, cycle, load } = recordedCase(CASE);
  const sent = async (path: string, body: unknown) => {
    const answer = await app.post(path, body);
    expect(answer.status, answer.text).toBe(201);
    return answer.body;
  };
  await sent('/api/vessels', { name: 'Autoclave 1', kind: 'autoclave' });
  await sent('/api/cycles', { document: cycle });
  for (let day = 1; day <= RUNS; day += 1) {
    const dated = log.toString('latin1').replaceAll('03/03/2026', `${String(day).padStart(2, '0')}/02/2026`);
    const received = await upload(app, `/api/imports?name=day-${day}.csv`, Buffer.from(dated, 'latin1'));
    const { run } = await sent(`/api/imports/${received.body.id}/run`, { layout, vessel: 'Autoclave 1' });
    const serial = (part: string) => `${part} ${day}`;
    const document = load();
    await sent(`/api/runs/${run}/load`, {
      load: {
        ...document,
        parts: document.parts.map((one) => ({ ...one, part: serial(one.part) })),
        sensors: document.sensors.map((one) => ({ ...one, parts: one.parts?.map(serial) })),
      },
      cycle: { code: cycle.code, issue: cycle.issue },
      particulars: document.parts.map(({ part }, n) => ({
        part: serial(part),
        drawing: 'SR-D-1',
        tool: n === 0 && ON_T7.includes(day) ? 'T-7' : 'T-8',
      })),
    });
  }
  const tape = {
    format: 'dwellbook-material/1',
    code: 'tape',
    issue: 'A',
    name: 'Practice tape',
    units: { temperature: '°C' },
    storage: { atMost: -18, lifeDays: 365 },
    out: { lifeDays: 60, atMost: 24 },
  };
  await sent('/api/materials', { document: tape });
  await sent('/api/batches', { batch: 'B-1', material: { code: 'tape', issue: 'A' }, made: '2026-01-01' });
  for (const roll of ['K-8', 'K-9']) await sent('/api/rolls', { roll, batch: 'B-1', at: '2026-01-10T08:00:00Z' });
  for (let day = 1; day <= RUNS; day += 1) {
    for (const part of ['P-A', 'P-B']) {
      const item = part === 'P-A' && FROM_K9.includes(day) ? 'K-9' : 'K-8';
      await sent(`/api/parts/${part} ${day}/materials`, { materials: [{ item }] });
    }
  }
  for (const day of BROKEN) {
    await sent(`/api/parts/P-A ${day}/results`, { at: NOW, test: 'proof load', outcome: 'failed', text: 'broke' });
  }
  return app;
}

describe('planted failures brought in through the API', () => {
  it('have their hidden reason ranked first, and what moves with it tied to it', { timeout: 120_000 }, async () => {
    const app = await planted();
    const { body, status, text } = await app.get('/api/trace/compare?drawing=SR-D-1');
    expect(status, text).toBe(200);
    expect(body.comparison.parts).toEqual({ failed: BROKEN.length, sound: 2 * RUNS - BROKEN.length });
    expect(body.untested).toBe(2 * RUNS - BROKEN.length);
    const [first] = body.comparison.factors;
    expect([first.name, first.levels[0].level, first.standing]).toEqual(['tool', 'T-7', 'stands-out']);
    expect(first.sentence).toBe('6 of 6 failed parts were laid up on tool T-7, against 1 of 18 sound ones.');
    const [group] = body.comparison.groups;
    const roll = group.tied.find(({ name }: { name: string }) => name === 'roll');
    expect([group.first, roll?.tie]).toEqual(['tool', 'follows']);

    // Chosen by hand, the others that broke are neither failed nor sound.
    const chosen = await app.get(`/api/trace/compare?failed=${encodeURIComponent('P-A 1\nP-A 3\nnobody')}`);
    expect(chosen.body.comparison.parts).toEqual({ failed: 2, sound: 18 });
    expect(chosen.body.leftOut).toContainEqual({ serial: 'nobody', because: 'no run of it lies within the scope' });
    expect(chosen.body.leftOut).toHaveLength(BROKEN.length - 2 + 1);

    // None of the sound ones was ever tested.
    const tested = await app.get('/api/trace/compare?sound=passed');
    expect([tested.status, tested.body.type]).toEqual([409, '/problems/state-conflict']);

    const failed = await app.get('/api/trace/failed');
    expect(failed.body.total).toBe(BROKEN.length);

    const overlaid = await app.get('/api/trace/overlay?drawing=SR-D-1&event=dwell-opens');
    expect(overlaid.status, overlaid.text).toBe(200);
    expect([overlaid.body.failed, overlaid.body.sound]).toEqual([6, 18]);
    const [coldest] = overlaid.body.strips;
    // Every run is the same recording: aligned on an event of it they lie on each other.
    const far = coldest.overlay.difference.flatMap(({ values }: { values: number[] }) => values.map(Math.abs));
    expect(coldest.what).toBe('coldest');
    expect(Math.min(...far)).toBe(0);
  });

  it('are refused a comparison without failed parts, and one of a scope that is empty', async () => {
    const app = await liveApp();
    expect((await app.get('/api/trace/compare')).status).toBe(409);
    expect((await app.get('/api/trace/overlay?event=nothing')).status).toBe(400);
  });
});

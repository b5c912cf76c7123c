import { describe, expect, it } from 'vitest';
import type { LiveRun, LiveVessels, ScanEvent } from '../../../server/contract/live.ts';
import { type LiveApp, liveApp } from '../live-app.ts';
import { addLiveVessel, BEGUN_MS, openRun, pushSource, scanAt } from '../live-workshop.ts';

interface Event {
  readonly event: string;
  readonly id: string | null;
  readonly data: unknown;
}

/** Reads a stream of events until `enough` of them have come. */
async function readEvents(app: LiveApp, path: string, enough: (events: readonly Event[]) => boolean, after?: string) {
  const stop = new AbortController();
  const response = await fetch(`${app.origin}${path}`, {
    headers: after === undefined ? {} : { 'last-event-id': after },
    signal: stop.signal,
  });
  const events: Event[] = [];
  let text = '';
  for await (const chunk of response.body!.pipeThrough(new TextDecoderStream())) {
    text += chunk;
    const blocks = text.split('\n\n');
    text = blocks.pop() ?? '';
    for (const block of blocks) {
      const line = (name: string) => block.match(new RegExp(`^${name}: (.*)$`, 'm'))?.[1] ?? null;
      const event = line('event');
      if (event !== null) events.push({ event, id: line('id'), data: JSON.parse(line('data') ?? 'null') });
    }
    if (enough(events)) break;
  }
  stop.abort();
  return { response, events };
}

async function openedRun() {
  const clock = { at: BEGUN_MS };
  const app = await liveApp({ clock: () => clock.at });
  const { db, live } = app.parts;
  const { vesselId, settings } = addLiveVessel(db, 'Oven 1', pushSource('plc', 2));
  const run = openRun(db, vesselId);
  const send = async (second: number) => {
    clock.at = BEGUN_MS + second * 1000;
    await live.journal.take(settings.sourceId, [scanAt(clock.at, 20 + second / 10, 20 + second / 20)]);
  };
  return { app, run, send };
}

const scansOf = (events: readonly Event[]) =>
  events.flatMap(({ event, data }) => (event === 'scans' ? (data as ScanEvent[]) : []));

describe('live events', () => {
  it('bring the state of every vessel', async () => {
    const { app, send } = await openedRun();
    await send(1);
    const { response, events } = await readEvents(app, '/api/live/events', (some) => some.length > 0);
    expect(response.headers.get('content-type')).toContain('text/event-stream');
    expect(response.headers.get('cache-control')).toContain('no-transform');
    const { vessels } = events[0]!.data as LiveVessels;
    expect(vessels[0]?.vessel).toBe('Oven 1');
    expect(vessels[0]?.readings.map(({ value }) => value)).toEqual([20.1, 20.05]);
  });

  it('bring each scan of a run once, and go on where a reader left off', async () => {
    const { app, run, send } = await openedRun();
    for (let second = 0; second < 10; second += 1) await send(second);
    await app.parts.engine.ready();
    const path = `/api/runs/${run}/live/events`;
    const sending = (async () => {
      await new Promise((resolve) => setTimeout(resolve, 300));
      for (let second = 10; second < 15; second += 1) await send(second);
    })();
    const first = await readEvents(app, path, (some) => scansOf(some).length >= 5);
    await sending;
    expect(scansOf(first.events).map(({ n }) => n)).toEqual([11, 12, 13, 14, 15]);
    const state = first.events.find(({ event }) => event === 'state')?.data as LiveRun;
    expect(state.channels).toEqual(['TC1', 'TC2']);
    await send(15);
    await send(16);
    const again = await readEvents(app, path, (some) => scansOf(some).length >= 4, '13');
    expect(scansOf(again.events).map(({ n, values }) => [n, ...values])).toEqual([
      [14, 21.3, 20.65],
      [15, 21.4, 20.7],
      [16, 21.5, 20.75],
      [17, 21.6, 20.8],
    ]);
  });

  it('are refused for a run that is not being logged', async () => {
    const app = await liveApp();
    const answer = await app.get('/api/runs/7/live/events');
    expect(answer.status).toBe(409);
  });

  it('let a warning be acknowledged, and say where warnings are told', async () => {
    const app = await liveApp();
    app.parts.db
      .prepare(
        "INSERT INTO warnings (kind, subject, text, began) VALUES ('disk-low', 'disk', '900 MB are left.', '2026-03-10T08:00:00.000Z')",
      )
      .run();
    const listed = await app.get('/api/warnings');
    expect(listed.body.warnings).toHaveLength(1);
    const seen = await app.post(`/api/warnings/${listed.body.warnings[0].id}/acknowledge`, { text: 'will make room' });
    expect(seen.body.warnings[0].acknowledged.by).toBe('inspector 2');
    const routes = { webhook: { url: 'http://127.0.0.1:8099/warnings' }, mail: null };
    expect((await app.post('/api/warning-routes', routes)).body).toMatchObject(routes);
    const refused = await app.post('/api/warning-routes', { webhook: { url: 'file:///etc/hosts' }, mail: null });
    expect(refused.status).toBe(400);
  });
});

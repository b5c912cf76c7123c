import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterEach, describe, expect, it } from 'vitest';
import type { Warning } from '../../../server/contract/live.ts';
import type { SeenVessel } from '../../../server/live/engine/live-engine.ts';
import { startTelling } from '../../../server/live/warnings/tell-outside.ts';
import { openWarningDesk } from '../../../server/live/warnings/warning-desk.ts';
import { insertWarningRoutes } from '../../../server/store/warning-routes.ts';
import { acknowledgeWarning, listWarnings } from '../../../server/store/warnings.ts';
import { freshDatabase } from '../fresh-database.ts';
import { addLiveVessel, BEGUN_MS, openRun, pushSource } from '../live-workshop.ts';

const running: (() => Promise<void> | void)[] = [];

afterEach(async () => {
  for (const stop of running.splice(0).reverse()) await stop();
});

function silent(name: string): SeenVessel['sources'][number] {
  return {
    id: 1,
    name,
    vessel: 'Oven 1',
    kind: 'push',
    state: 'silent',
    since: new Date(BEGUN_MS).toISOString(),
    because: 'Nothing for five intervals',
    lastScan: new Date(BEGUN_MS).toISOString(),
    kept: 1,
    keptFrom: null,
  };
}

function desk() {
  const db = freshDatabase();
  const { vesselId } = addLiveVessel(db, 'Oven 1', pushSource('plc'));
  const told: Warning[] = [];
  const parts = { db, tell: (warning: Warning) => told.push(warning) };
  return { db, vesselId, told, parts, desk: openWarningDesk(parts) };
}

const seen = (minutes: number, more: Partial<SeenVessel> = {}): SeenVessel => ({
  run: null,
  judged: null,
  sources: [],
  nowMs: BEGUN_MS + minutes * 60_000,
  ...more,
});

describe('the warning desk', () => {
  it('begins a warning once, keeps it while it lasts, and ends it a minute after it is over', () => {
    const { db, vesselId, told, desk: open } = desk();
    for (const minute of [0, 1, 2]) open.look(vesselId, seen(minute, { sources: [silent('plc')] }));
    expect(told.map(({ over }) => over)).toEqual([null]);
    open.look(vesselId, seen(2.2));
    // Back within the minute: still the same warning.
    open.look(vesselId, seen(2.5, { sources: [silent('plc')] }));
    open.look(vesselId, seen(3));
    open.look(vesselId, seen(4));
    const [warning] = listWarnings(db, 10);
    expect(warning).toMatchObject({ kind: 'source-silent', subject: 'plc', vessel: 'Oven 1' });
    expect(warning?.over).toBe(new Date(BEGUN_MS + 4 * 60_000).toISOString());
    expect(told).toHaveLength(2);
  });

  it('goes on with a warning after the program was away', () => {
    const { vesselId, told, parts, desk: open } = desk();
    open.look(vesselId, seen(0, { sources: [silent('plc')] }));
    const again = openWarningDesk(parts);
    again.look(vesselId, seen(5, { sources: [silent('plc')] }));
    expect(told).toHaveLength(1);
    expect(again.lasting(vesselId)).toHaveLength(1);
  });

  it('says what is broken, what is near and which sensor is suspected', () => {
    const { db, vesselId, desk: open } = desk();
    const run = openRun(db, vesselId);
    const finding = { limit: 'ceiling', outcome: 'not-met', because: 'TC1 reached 195 °C.' };
    const judged = {
      evaluation: {
        parts: [{ part: 'SR-1', findings: [finding, { ...finding, limit: 'spread', outcome: 'pending' }] }],
        sensors: [{ channel: 'TC3', state: 'suspect', faults: [{ because: 'It stands still.' }] }],
      },
      forecasts: [{ part: 'SR-1', nearing: [{ limit: 'dwell 1/upper', text: 'TC2 is 0.8 °C from it.' }] }],
    } as unknown as SeenVessel['judged'];
    open.look(vesselId, seen(1, { run, judged }));
    expect(open.lasting(vesselId).map(({ kind, subject }) => `${kind}: ${subject}`)).toEqual([
      'limit-broken: ceiling (SR-1)',
      'approaching-limit: dwell 1/upper (SR-1)',
      'sensor-fault: TC3',
    ]);
    // What was of a run is over as soon as the run is.
    open.look(vesselId, seen(2));
    expect(open.lasting(vesselId)).toEqual([]);
  });

  it('is acknowledged once, by name, and the rest of it cannot be changed', () => {
    const { db, vesselId, desk: open } = desk();
    open.look(vesselId, seen(0, { sources: [silent('plc')] }));
    const id = listWarnings(db, 1)[0]!.id;
    acknowledgeWarning(db, id, 'seen', '2026-03-10T08:05:00.000Z', 'operator 1');
    expect(() => acknowledgeWarning(db, id, null, '2026-03-10T08:06:00.000Z', 'operator 2')).toThrow(/operator 1/);
    expect(listWarnings(db, 1)[0]?.acknowledged?.by).toBe('operator 1');
    expect(() => db.prepare("UPDATE warnings SET text = 'nothing'").run()).toThrow(/only its end/);
    expect(() => db.prepare('DELETE FROM warnings').run()).toThrow(/never deleted/);
  });
});

describe('telling beyond the screen', () => {
  const warning: Warning = {
    id: 1,
    kind: 'limit-broken',
    vessel: 'Oven 1',
    run: 7,
    subject: 'ceiling',
    text: 'TC1 reached 195 °C; at most 190 °C allowed.',
    began: '2026-03-10T08:05:00.000Z',
    over: null,
    acknowledged: null,
  };

  it('posts to a webhook, again where it was refused at first, and says what became of it', async () => {
    const bodies: { text: string; caution: string }[] = [];
    const server = createServer((request, response) => {
      let body = '';
      request.on('data', (chunk) => {
        body += chunk;
      });
      request.on('end', () => {
        bodies.push(JSON.parse(body));
        response.writeHead(bodies.length === 1 ? 503 : 204).end();
      });
    });
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    running.push(() => void server.close());
    const telling = toldBy({
      webhook: { url: `http://127.0.0.1:${(server.address() as AddressInfo).port}/warnings` },
      mail: null,
    });
    telling.tell(warning);
    await until(() => telling.view().lastWebhook !== null);
    expect(telling.view().lastWebhook?.problem).toBeNull();
    expect(bodies).toHaveLength(2);
    expect(bodies[1]?.text).toBe(warning.text);
    expect(bodies[1]?.caution).toContain('no safety function');
  });

  it('sends an e-mail through a real SMTP server', async () => {
    const mails: string[] = [];
    const smtp = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData(stream, _session, done) {
        let text = '';
        stream.on('data', (chunk) => {
          text += chunk;
        });
        stream.on('end', () => {
          mails.push(text);
          done();
        });
      },
    });
    await new Promise<void>((resolve) => smtp.listen(0, '127.0.0.1', () => resolve()));
    running.push(() => new Promise<void>((resolve) => smtp.close(() => resolve())));
    const { port } = smtp.server.address() as AddressInfo;
    const telling = toldBy({
      webhook: null,
      mail: { host: '127.0.0.1', port, secure: false, user: null, from: 'book@example.org', to: ['oven@example.org'] },
    });
    telling.tell(warning);
    telling.tell({ ...warning, over: '2026-03-10T08:09:00.000Z' });
    await until(() => telling.view().lastMail !== null);
    expect(telling.view().lastMail?.problem).toBeNull();
    expect(mails).toHaveLength(1);
    expect(mails[0]).toContain('Oven 1, run 7: ceiling');
    expect(mails[0]?.replaceAll('=\r\n', '')).toContain('no safety function');
  });

  it('says why where nobody listens', async () => {
    const telling = toldBy({ webhook: { url: 'http://127.0.0.1:9/' }, mail: null });
    telling.tell(warning);
    await telling.close();
    expect(telling.view().lastWebhook?.problem).not.toBeNull();
  });

  function toldBy(routes: Parameters<typeof insertWarningRoutes>[1]) {
    const db = freshDatabase();
    insertWarningRoutes(db, routes, '2026-03-10T08:00:00.000Z', 'administrator 1');
    const telling = startTelling({ db, clock: () => BEGUN_MS, log: { error: () => undefined } });
    running.push(() => telling.close());
    return telling;
  }
});

async function until(isSo: () => boolean): Promise<void> {
  const endMs = Date.now() + 15_000;
  while (!isSo() && Date.now() < endMs) await new Promise((resolve) => setTimeout(resolve, 20));
}

import { mkdirSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterEach, expect } from 'vitest';
import { throughPart } from '../../models/cure/heat/through-part.ts';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { compareParts } from '../../server/actions/compare-parts.ts';
import { cureCourses } from '../../server/actions/cure-courses.ts';
import { overlayParts } from '../../server/actions/overlay-parts.ts';
import { verifyChains } from '../../server/actions/verify-chains.ts';
import { createApp } from '../../server/app.ts';
import { ROLES } from '../../server/contract/roles.ts';
import type { AppParts } from '../../server/http/app-parts.ts';
import { followLive } from '../../server/live/follow-live.ts';
import { startLiveLogging } from '../../server/live/live-logging.ts';
import { runSources } from '../../server/live/run-sources.ts';
import { freshDatabase, freshFolder } from './fresh-database.ts';
import { expectContractKept } from './keeps-contract.ts';

export const NOW = '2026-03-10T08:00:00.000Z';

const running: (() => Promise<void>)[] = [];

const faults: object[] = [];

afterEach(async () => {
  for (const stop of running.splice(0)) await stop();
  // A fault of the program is never what a test is about, unless it took it out of the list itself.
  expect(faults.splice(0)).toEqual([]);
});

export interface LiveApp {
  readonly origin: string;
  readonly parts: AppParts;
  /** Faults of the program so far; takes them out, for a test that makes one on purpose. */
  readonly takeFaults: () => object[];
  readonly get: (path: string, headers?: Record<string, string>) => Promise<Answer>;
  readonly post: (path: string, body: unknown) => Promise<Answer>;
  readonly send: (path: string, init: RequestInit) => Promise<Answer>;
}

export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  readonly text: string;
  // biome-ignore lint/suspicious/noExplicitAny: a test compares bodies whole
  readonly body: any;
}

/** The real app with a real database, on a socket of this machine; its clock stands still. */
export async function liveApp(changes: Partial<AppParts> = {}): Promise<LiveApp> {
  const folder = freshFolder();
  const incomingFolder = join(folder, 'incoming');
  mkdirSync(incomingFolder);
  const db = freshDatabase();
  const clock = changes.clock ?? (() => Date.parse(NOW));
  const log = { info: () => undefined, error: (facts: object) => faults.push(facts) };
  const live = startLiveLogging({ db: changes.db ?? db, clock, monotonic: clock, log });
  const sources = runSources({ db: changes.db ?? db, live, inventVessel: null, log });
  running.push(async () => {
    await sources.close();
    await live.close();
  });
  const following = followLive({ db: changes.db ?? db, folder, live, sources, clock, log });
  running.push(() => following.close());
  const parts: AppParts = {
    db,
    live,
    sources,
    engine: following.engine,
    telling: following.telling,
    verify: async () => verifyChains(db),
    clock,
    actor: { name: 'inspector 2', roles: ROLES },
    evaluate: async (log, inputs) => evaluateLog(log, inputs),
    evaluateAside: async (log, inputs) => evaluateLog(log, inputs),
    estimateCure: async (...given) => cureCourses(...given),
    cureThroughPart: async (asked) => throughPart(asked),
    trace: { compare: async (asked) => compareParts(asked), overlay: async (asked) => overlayParts(asked) },
    siteFolder: null,
    incomingFolder,
    watchedFolder: null,
    mostUploadBytes: 1_000_000,
    log,
    ...changes,
  };
  const server = createServer(createApp(parts));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  running.push(
    () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  );
  const origin = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const send = async (path: string, init: RequestInit): Promise<Answer> => {
    const response = await fetch(`${origin}${path}`, init);
    const text = await response.text();
    const isJson = /json/.test(response.headers.get('content-type') ?? '');
    const body = isJson ? JSON.parse(text) : null;
    if (isJson && path.startsWith('/api/')) expectContractKept(init.method ?? 'GET', path, response.status, body);
    return { status: response.status, headers: response.headers, text, body };
  };
  return {
    origin,
    parts,
    takeFaults: () => faults.splice(0),
    send,
    get: (path, headers = {}) => send(path, { headers }),
    post: (path, body) =>
      send(path, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }),
  };
}

/** Posts a file as a browser does. */
export function upload(app: LiveApp, path: string, bytes: string | Uint8Array): Promise<Answer> {
  return app.send(path, {
    method: 'POST',
    headers: { 'content-type': 'application/octet-stream' },
    body: typeof bytes === 'string' ? bytes : new Uint8Array(bytes),
  });
}

import { existsSync, mkdirSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { DomainError } from '../../models/errors.ts';
import type { JudgingParts } from '../actions/judge-run.ts';
import { createLongWork } from '../actions/long-work.ts';
import { verifyInThread } from '../actions/verify-in-thread.ts';
import { createApp } from '../app.ts';
import { followLive } from '../live/follow-live.ts';
import { startLiveLogging } from '../live/live-logging.ts';
import { runSources } from '../live/run-sources.ts';
import type { InventVessel } from '../live/sources/invented-vessel.ts';
import type { Db } from '../store/database.ts';
import { openDatabase } from '../store/database.ts';
import { findWorkshop } from '../store/workshop.ts';
import { builtInPerson } from './built-in-person.ts';
import { databasePath } from './data-folder.ts';
import { createLog } from './log.ts';

export interface ServerOptions {
  readonly folder: string;
  readonly host: string;
  readonly port: number;
  /** Folder watched for finished files; null: none. */
  readonly watchedFolder: string | null;
  /** Seconds a file must not have grown to be finished. */
  readonly settleS: number;
  /** Done once the database is open, before anything listens. */
  readonly prepare?: (parts: JudgingParts) => Promise<void>;
}

/** A log of 24 channels once a second for two days has some 30 MB. */
const MOST_FILE_BYTES = 512 * 1024 * 1024;

/** Serves a workshop until the process is told to end; then closes everything in order. */
export async function serveWorkshop(options: ServerOptions): Promise<void> {
  const ended = told('SIGINT', 'SIGTERM');
  const log = createLog();
  const path = databasePath(options.folder);
  const db = openDatabase(path, { at: new Date().toISOString() });
  const longWork = createLongWork();
  const live = startLiveLogging({ db, clock: Date.now, log });
  const parts = {
    db,
    clock: Date.now,
    actor: builtInPerson(),
    evaluate: longWork.evaluate,
    stored: longWork.storedRuns(path),
  };
  await options.prepare?.(parts);
  const sources = runSources({ db, live, inventVessel: await inventVesselIn(db), log });
  const incomingFolder = join(options.folder, 'incoming');
  mkdirSync(incomingFolder, { recursive: true });
  const following = followLive({ db, folder: options.folder, live, sources, clock: Date.now, log });
  const app = createApp({
    ...parts,
    live,
    sources,
    engine: following.engine,
    telling: following.telling,
    estimateCure: longWork.estimateCure,
    evaluateAside: longWork.evaluateAside,
    cureThroughPart: longWork.cureThroughPart,
    trace: longWork.trace,
    log,
    siteFolder: findSite(),
    incomingFolder,
    watchedFolder: options.watchedFolder,
    mostUploadBytes: MOST_FILE_BYTES,
    verify: () => verifyInThread({ path, at: new Date().toISOString() }),
  });
  const server = await listen(createServer(app), options);
  process.stdout.write(`Dwellbook is at ${addressOf(server, options.host)}\n`);
  // Most of the program: loaded now rather than while the first person waits.
  await import('../http/answer.ts');
  sources.begin();
  void live.lookAfterStart().catch((error: unknown) => log.error({ err: error }, 'live logging'));
  const watched = await startWatching(options, { ...parts, log });
  await ended;
  server.close();
  server.closeAllConnections();
  await watched?.close();
  await sources.close();
  await following.close();
  await live.close();
  await longWork.close();
  closeDatabase(db);
}

/** Readings are invented in a practice workshop only. */
async function inventVesselIn(db: Db): Promise<InventVessel | null> {
  if (findWorkshop(db)?.practice == null) return null;
  const { inventVesselBy } = await import('../practice/invented-vessel.ts');
  return inventVesselBy(db);
}

function findSite(): string | null {
  const folder = fileURLToPath(new URL('../../web/', import.meta.url));
  return existsSync(join(folder, 'index.html')) ? folder : null;
}

function listen(server: Server, { host, port }: ServerOptions): Promise<Server> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      const because = error.code === 'EADDRINUSE' ? 'something else listens there already' : error.message;
      reject(
        new DomainError(
          'state-conflict',
          `Cannot listen at ${host} port ${port}: ${because}`,
          { host, port },
          { cause: error },
        ),
      );
    });
    server.listen(port, host, () => resolve(server));
  });
}

function addressOf(server: Server, host: string): string {
  const address = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  return `http://${host.includes(':') ? `[${host}]` : host}:${port}`;
}

async function startWatching(options: ServerOptions, parts: JudgingParts & { log: ReturnType<typeof createLog> }) {
  const { watchedFolder, settleS } = options;
  if (watchedFolder === null) return null;
  const { watchFolder } = await import('../live/watched-folder.ts');
  return watchFolder({ ...parts, folder: watchedFolder, settleMs: settleS * 1000, mostBytes: MOST_FILE_BYTES });
}

function told(...signals: NodeJS.Signals[]): Promise<void> {
  return new Promise((resolve) => {
    for (const signal of signals) process.once(signal, () => resolve());
  });
}

function closeDatabase(db: Db): void {
  db.pragma('wal_checkpoint(TRUNCATE)');
  db.close();
}

import { parentPort, workerData } from 'node:worker_threads';
import { openDatabase } from '../store/database.ts';
import { verifyChains } from './verify-chains.ts';

/** What the thread is started with. */
export interface VerifyTask {
  readonly path: string;
  readonly at: string;
}

if (parentPort !== null) {
  const { path, at } = workerData as VerifyTask;
  const db = openDatabase(path, { at, readonly: true });
  parentPort.postMessage(verifyChains(db));
  db.close();
}

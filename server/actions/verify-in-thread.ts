import { Worker } from 'node:worker_threads';
import type { AuditVerification } from '../contract/audit.ts';
import type { VerifyTask } from './verify-worker.ts';

/** Recomputes every hash of a database in a thread of its own: years of readings take minutes. */
export function verifyInThread(task: VerifyTask): Promise<AuditVerification> {
  return new Promise((resolve, reject) => {
    const worker = new Worker(new URL('./verify-worker.js', import.meta.url), { workerData: task });
    worker.once('message', resolve);
    worker.once('error', reject);
  });
}

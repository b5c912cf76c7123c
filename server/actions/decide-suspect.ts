import { DomainError } from '../../models/errors.ts';
import type { DecideSuspectRequest, SensorDecision } from '../contract/runs.ts';
import { appendAudit } from '../store/audit.ts';
import { insertDecision } from '../store/decisions.ts';
import { requireRun } from '../store/runs.ts';
import { readSources } from '../store/sources.ts';
import { deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';

/** Records that a suspected sensor is not to be believed from an instant on, or that it is, and judges the run by it. */
export async function decideSuspect(
  parts: JudgingParts,
  run: number,
  request: DecideSuspectRequest,
): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  const { channel, reason, kind = null } = request;
  const channels = readSources(db, run).flatMap(({ layout }) => layout.channels.map(({ name }) => name));
  if (!channels.includes(channel)) {
    throw new DomainError('channel-unknown', `Run ${run} has no channel "${channel}"; it has ${channels.join(', ')}`, {
      channel,
      run,
    });
  }
  const deed = deedOf(parts);
  const from = request.decision === 'exclude' ? new Date(request.from).toISOString() : null;
  const decision: SensorDecision = { channel, decision: request.decision, kind, from, reason, deed };
  const because = request.decision === 'exclude' ? `${channel} excluded` : `${channel} kept`;
  return changeAndJudge(parts, run, because, { decisions: [decision] }, () => {
    insertDecision(db, run, decision);
    appendAudit(db, {
      ...deed,
      verb: 'decide-suspect',
      subject: `run/${run}`,
      why: reason,
      details: { channel, decision: request.decision, kind, from },
    });
  });
}

import { DomainError } from '../../models/errors.ts';
import type { AddPartResultRequest } from '../contract/parts.ts';
import { appendAudit } from '../store/audit.ts';
import { insertPartResult } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Records what a test or inspection of a part showed. */
export function addPartResult(parts: ActionParts, serial: string, request: AddPartResultRequest): void {
  const { at, test, outcome, figure = null, unit = null, text = '' } = request;
  if (figure !== null && unit === null) {
    throw new DomainError('invalid-request', 'A figure needs its unit', { test, figure });
  }
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    insertPartResult(db, serial, { at, test, outcome, figure, unit, text }, deed);
    appendAudit(db, {
      ...deed,
      verb: 'add-part-result',
      subject: `part/${serial}`,
      why: text === '' ? null : text,
      details: { test, outcome, figure, unit, testedAt: at },
    });
  }).immediate();
}

import { DomainError } from '../../models/errors.ts';
import type { AddPartResultRequest, Measured } from '../contract/results.ts';
import { appendAudit } from '../store/audit.ts';
import { insertPartResult } from '../store/part-results.ts';
import { requirePart } from '../store/parts.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { figureMeasured } from './figure-measured.ts';

/** Records what a test or inspection of a part showed; a correction is another row that says why. */
export function addPartResult(parts: ActionParts, serial: string, request: AddPartResultRequest): void {
  const { at, test, outcome, text = '', replaces = null, reason = null } = request;
  if (Date.parse(at) > parts.clock()) throw new DomainError('invalid-request', 'The test lies in the future', { at });
  if ((replaces === null) !== (reason === null)) {
    throw new DomainError('invalid-request', 'A result that replaces another says why; another one does not', {
      replaces,
    });
  }
  const measured = (request.measured ?? null) as Measured | null;
  const { figure, unit } = figureOf(request, measured);
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    const partId = requirePart(db, serial);
    insertPartResult(db, { partId, at, test, outcome, figure, unit, text, measured, replaces, reason, deed });
    appendAudit(db, {
      ...deed,
      verb: 'add-part-result',
      subject: `part/${serial}`,
      why: reason ?? (text === '' ? null : text),
      details: {
        test,
        outcome,
        figure,
        unit,
        testedAt: at,
        ...(measured === null ? {} : { measured: JSON.stringify(measured) }),
        ...(replaces === null ? {} : { replaces }),
      },
    });
  }).immediate();
}

function figureOf({ test, figure = null, unit = null }: AddPartResultRequest, measured: Measured | null) {
  if (measured !== null) {
    if (figure === null && unit === null) return figureMeasured(measured);
    throw new DomainError('invalid-request', 'The figure follows from what was measured; say it once', { test });
  }
  if (figure !== null && unit === null) {
    throw new DomainError('invalid-request', 'A figure needs its unit', { test, figure });
  }
  return { figure, unit };
}

import { DomainError } from '../../models/errors.ts';
import { judgeOtherwise } from '../actions/judged-otherwise.ts';
import { runsFoundOut, runsReadBy } from '../actions/touched-runs.ts';
import type { AskedParts, AskPartsQuery } from '../contract/ask.ts';
import { requireBatchId } from '../store/batches.ts';
import type { Db } from '../store/database.ts';
import { requireItem } from '../store/material-items.ts';
import { findRunLine } from '../store/run-lines.ts';
import { type PartInRun, readPartsAt, readSeen, tellSeen } from '../store/seen-parts.ts';
import { requireVessel } from '../store/vessels.ts';
import { readWithoutRecord } from '../store/without-record.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';

export const askHandlers: SomeHandlers<'readTouched' | 'askParts' | 'askWithoutRecord' | 'askVerdicts'> = {
  readTouched({ db }, { params }) {
    const { instrument = '' } = params;
    const calibration = numberIn(params, 'calibration');
    const { since, until, runs } = runsFoundOut(db, instrument, calibration);
    return { instrument, calibration, since, until, runs: runs.flatMap(({ run }) => findRunLine(db, run) ?? []) };
  },
  askParts: ({ db }, { query }) => partsAsked(db, query),
  askWithoutRecord: ({ db }) => readWithoutRecord(db),
  askVerdicts(parts, { query }) {
    const progress = judgeOtherwise({ ...parts, evaluate: parts.evaluateAside }, query);
    return {
      open(send, end) {
        let left = false;
        const tell = async () => {
          for await (const step of progress) {
            if (left) return;
            send({ event: 'progress', data: step });
          }
          send({ event: 'done', data: {} });
          end();
        };
        tell().catch((error: unknown) => {
          if (!(error instanceof DomainError))
            parts.log.error({ error: String(error) }, 'a question could not be answered');
          send({
            event: 'refused',
            data: { detail: error instanceof DomainError ? error.message : 'A fault of the program' },
          });
          end();
        });
        return () => {
          left = true;
        };
      },
    };
  },
};

/** Parts that saw something, each with its runs between the two instants. */
export function partsAsked(db: Db, { kind, code, vessel, from, until, limit }: AskPartsQuery): AskedParts {
  const span = {
    fromMs: from === undefined ? Number.NEGATIVE_INFINITY : Date.parse(from),
    untilMs: until === undefined ? Number.POSITIVE_INFINITY : Date.parse(until),
  };
  const seen = (): ReadonlyMap<number, readonly PartInRun[]> => {
    switch (kind) {
      case 'roll':
      case 'kit':
        return readSeen(db, kind, String(requireItem(db, code).id), span);
      case 'batch':
        return readSeen(db, kind, String(requireBatchId(db, code)), span);
      case 'tool':
        return readSeen(db, kind, code, span);
      case 'vessel':
        return readSeen(db, kind, String(requireVessel(db, code)), span);
      case 'thermocouple':
        if (vessel === undefined)
          throw new DomainError('invalid-request', 'Name the vessel of the thermocouple', { code });
        return readSeen(db, kind, `${requireVessel(db, vessel)} ${code}`, span);
      case 'instrument': {
        const during = (beganMs: number) => beganMs >= span.fromMs && beganMs < span.untilMs;
        const read = runsReadBy(db, code, during).flatMap(({ run, channels }) =>
          channels.map((channel) => ({ run, channel })),
        );
        return readPartsAt(db, read);
      }
    }
  };
  const found = seen();
  const what = kind === 'thermocouple' ? `thermocouple ${code} of ${vessel}` : `${kind} ${code}`;
  return { what, total: found.size, parts: tellSeen(db, found, limit) };
}

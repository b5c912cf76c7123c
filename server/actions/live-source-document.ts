import { DomainError } from '../../models/errors.ts';
import type { LiveSource } from '../../models/log/live-source.ts';
import { parseLiveSource } from '../../models/log/parse-live-source.ts';
import type { Db } from '../store/database.ts';
import { findPassword, type LiveSourceRow } from '../store/live-sources.ts';
import { findWorkshop } from '../store/workshop.ts';

/** A source's document as it is kept: read by its parser, its password named but not in it. */
export function liveSourceDocument(db: Db, written: unknown, hasPassword: boolean): LiveSource {
  const document = parseLiveSource(written);
  const { reads } = document;
  if (reads.kind === 'practice' && findWorkshop(db)?.practice == null) {
    throw new DomainError('state-conflict', 'Only a practice workshop has invented vessels', { source: document.name });
  }
  if (reads.kind !== 'mqtt') return document;
  const { hasPassword: _said, ...others } = reads;
  return { ...document, reads: hasPassword ? { ...others, hasPassword } : others };
}

/** The password kept of a source, where it would go to whom it was given for. */
export function passwordFor(db: Db, { id, settings }: LiveSourceRow, { reads }: LiveSource): string | undefined {
  const before = settings.document.reads;
  const isSame =
    reads.kind === 'mqtt' && before.kind === 'mqtt' && reads.broker === before.broker && reads.user === before.user;
  return isSame ? findPassword(db, id) : undefined;
}

import type { LiveSource } from '../../models/log/live-source.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';
import { beginChain, digestOf } from './live-chain.ts';

/** A source that was bound to a run's vessel and sent nothing. */
export interface SilentSource {
  readonly n: number;
  readonly layout: LiveSource;
  readonly layoutSha256: string;
  /** Over no scan at all. */
  readonly chainSha256: string;
  readonly recorded: { readonly at: string; readonly by: string };
}

export interface NewSilentSource {
  readonly run: number;
  readonly n: number;
  readonly document: LiveSource;
  readonly at: string;
  readonly by: string;
}

export function insertSilentSource(db: Db, { run, n, document, at, by }: NewSilentSource): void {
  db.prepare('INSERT INTO silent_sources (run_id, n, layout_sha256, at, by) VALUES (?, ?, ?, ?, ?)').run(
    run,
    n,
    keepDocument(db, document),
    at,
    by,
  );
}

export function readSilentSources(db: Db, run: number): SilentSource[] {
  return db
    .prepare<[number], { n: number; layout_sha256: string; at: string; by: string }>(
      'SELECT n, layout_sha256, at, by FROM silent_sources WHERE run_id = ? ORDER BY n',
    )
    .all(run)
    .map(({ n, layout_sha256, at, by }) => {
      const layout = readDocument<LiveSource>(db, layout_sha256);
      const chainSha256 = digestOf(beginChain(layout)).toString('hex');
      return { n, layout, layoutSha256: layout_sha256, chainSha256, recorded: { at, by } };
    });
}

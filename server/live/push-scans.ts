import { DomainError } from '../../models/errors.ts';
import type { LiveScan, LiveSource } from '../../models/log/live-source.ts';
import type { Pushed, PushRequest } from '../contract/live.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { type LiveSourceRow, listLiveSources } from '../store/live-sources.ts';
import { findKey, type KnownKey, markKeyUsed } from '../store/sender-keys.ts';
import type { LiveLogging } from './live-logging.ts';
import { whyNotWritten } from './why-not-written.ts';

export interface PushParts {
  readonly db: Db;
  readonly clock: () => number;
  readonly live: Pick<LiveLogging, 'journal'>;
}

/** When a key was last used is written down so often, ms; not with every push. */
const USE_IS_WRITTEN_MS = 60_000;

const lastWritten = new WeakMap<Db, Map<number, number>>();

/** Takes scans from a sender that shows its vessel's key. */
export async function pushScans(parts: PushParts, key: string | null, request: PushRequest): Promise<Pushed> {
  const { db } = parts;
  const known = requireUsableKey(db, key);
  const source = sourceNamed(db, known, request.source);
  const { settings } = source;
  const scans: LiveScan[] = [];
  const refused: Pushed['refused'] = [];
  for (const one of request.scans) {
    const figures = figuresOf(settings.document, one.values);
    if (figures === null) refused.push({ at: isoFromMs(Date.parse(one.at)), because: unknownKeys(settings.document) });
    else scans.push({ timeMs: Date.parse(one.at), sequence: one.sequence ?? null, figures });
  }
  const pushed = await parts.live.journal.take(source.id, scans, { settings });
  noteUse(parts, known.id);
  return { ...pushed, refused: [...refused, ...pushed.refused] };
}

function requireUsableKey(db: Db, key: string | null): KnownKey {
  const known = key === null ? undefined : findKey(db, key);
  if (known === undefined) {
    throw new DomainError('key-unknown', 'A push needs the key of its vessel: "Authorization: Bearer KEY"');
  }
  if (known.isRevoked) throw new DomainError('not-permitted', `The key "${known.name}" was revoked`);
  return known;
}

/** The source of the key's vessel that is meant: the one named, or the only one that is pushed. */
function sourceNamed(db: Db, { vesselId }: KnownKey, name: string | undefined): LiveSourceRow {
  const pushed = listLiveSources(db, vesselId).filter(({ settings }) => settings.document.reads.kind === 'push');
  const named = name === undefined ? pushed : pushed.filter((source) => source.name === name);
  const [only] = named;
  if (only === undefined) {
    throw new DomainError(
      'not-found',
      name === undefined
        ? 'No source of this vessel is pushed'
        : `No source of this vessel that is pushed is called "${name}"`,
    );
  }
  if (named.length > 1) {
    const names = named.map((source) => source.name).join(', ');
    throw new DomainError('invalid-request', `Say which source it is: this vessel has ${names}`);
  }
  if (!only.settings.isResting) return only;
  throw new DomainError('state-conflict', `The source "${only.name}" rests; nothing is taken from it`, {
    source: only.name,
  });
}

/** In the order of the document's channels; null where no key is one of theirs. */
function figuresOf({ channels }: LiveSource, values: PushRequest['scans'][number]['values']): Float64Array | null {
  if (!channels.some(({ column }) => Object.hasOwn(values, column))) return null;
  return Float64Array.from(channels, ({ column }) =>
    Object.hasOwn(values, column) ? (values[column] ?? Number.NaN) : Number.NaN,
  );
}

function unknownKeys({ channels }: LiveSource): string {
  return `none of its keys is a channel's: ${channels.map(({ column }) => column).join(', ')}`;
}

function noteUse({ db, clock }: PushParts, id: number): void {
  const written = lastWritten.get(db) ?? new Map<number, number>();
  lastWritten.set(db, written);
  const now = clock();
  if (Math.abs(now - (written.get(id) ?? 0)) < USE_IS_WRITTEN_MS) return;
  written.set(id, now);
  try {
    markKeyUsed(db, id, isoFromMs(now));
  } catch (error) {
    // The scans are kept; that the key's use could not be written down takes nothing back.
    if (whyNotWritten(error) === null) throw error;
  }
}

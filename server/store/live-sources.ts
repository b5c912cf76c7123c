import { DomainError } from '../../models/errors.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import type { LiveSource } from '../../models/log/live-source.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';
import { findOpenRunOf } from './live-runs.ts';
import { prepared } from './prepared.ts';

export interface LiveSourceRow {
  readonly id: number;
  readonly name: string;
  readonly vesselId: number;
  readonly vessel: string;
  readonly settings: LiveSettings;
}

/** How a source is read, from one saving of its document to the next. */
export interface LiveSettings {
  readonly id: number;
  readonly sourceId: number;
  readonly document: LiveSource;
  readonly sha256: string;
  readonly isResting: boolean;
  readonly at: string;
  readonly by: string;
}

export interface NewSettings {
  readonly document: LiveSource;
  readonly isResting: boolean;
  readonly at: string;
  readonly by: string;
}

/** Adds a source to a vessel with its first settings. */
export function insertLiveSource(db: Db, vesselId: number, settings: NewSettings): number {
  const { name } = settings.document;
  if (db.prepare('SELECT 1 FROM live_sources WHERE name = ?').get(name) !== undefined) {
    throw new DomainError('already-recorded', `There is a source called "${name}" already`, { source: name });
  }
  const { lastInsertRowid } = db
    .prepare('INSERT INTO live_sources (name, vessel_id, at, by) VALUES (?, ?, ?, ?)')
    .run(name, vesselId, settings.at, settings.by);
  insertSettings(db, Number(lastInsertRowid), settings);
  return Number(lastInsertRowid);
}

/**
 * Sets how a source is read from now on.
 *
 * While a run is open in its vessel a channel keeps its unit and its role, and no two sources that are listened to in
 * one vessel have a channel of one name: one run has one meaning of a name.
 */
export function insertSettings(db: Db, sourceId: number, { document, isResting, at, by }: NewSettings): number {
  const before = findSettings(db, sourceId);
  if (before !== undefined) refuseOtherName(before.document, document);
  const inVessel = settingsBeside(db, sourceId);
  if (inVessel.hasOpenRun) for (const settings of inVessel.all) refuseOtherMeaning(settings.document, document);
  if (!isResting) for (const settings of inVessel.all) refuseTakenName(sourceId, settings, document);
  const { lastInsertRowid } = db
    .prepare('INSERT INTO live_source_settings (source_id, document_sha256, resting, at, by) VALUES (?, ?, ?, ?, ?)')
    .run(sourceId, keepDocument(db, document), isResting ? 1 : 0, at, by);
  return Number(lastInsertRowid);
}

export function listLiveSources(db: Db, vesselId?: number): LiveSourceRow[] {
  return db
    .prepare<object, SourceRow>(`${SELECT} WHERE @vesselId IS NULL OR vessel_id = @vesselId ORDER BY live_sources.id`)
    .all({ vesselId: vesselId ?? null })
    .map((row) => rowOf(db, row));
}

export function requireLiveSource(db: Db, id: number): LiveSourceRow {
  const row = db.prepare<[number], SourceRow>(`${SELECT} WHERE live_sources.id = ?`).get(id);
  if (row === undefined) throw new DomainError('not-found', `There is no source ${id}`, { source: id });
  return rowOf(db, row);
}

/** The settings that hold for a source: the latest. */
export function findSettings(db: Db, sourceId: number): LiveSettings | undefined {
  const sql = 'SELECT * FROM live_source_settings WHERE source_id = ? ORDER BY id DESC LIMIT 1';
  const row = prepared<[number], SettingsRow>(db, sql).get(sourceId);
  return row === undefined ? undefined : settingsOf(db, row);
}

/** Every settings of a source, the first first. */
export function listSettings(db: Db, sourceId: number): LiveSettings[] {
  return db
    .prepare<[number], SettingsRow>('SELECT * FROM live_source_settings WHERE source_id = ? ORDER BY id')
    .all(sourceId)
    .map((row) => settingsOf(db, row));
}

/** Keeps what a source asks of us to be let in; an empty one takes it away. */
export function keepPassword(db: Db, sourceId: number, password: string): void {
  db.prepare('DELETE FROM live_source_passwords WHERE source_id = ?').run(sourceId);
  if (password === '') return;
  db.prepare('INSERT INTO live_source_passwords (source_id, password) VALUES (?, ?)').run(sourceId, password);
}

export function findPassword(db: Db, sourceId: number): string | undefined {
  return db
    .prepare<[number], string>('SELECT password FROM live_source_passwords WHERE source_id = ?')
    .pluck()
    .get(sourceId);
}

const SELECT = `SELECT live_sources.id, live_sources.name, vessel_id, vessels.name AS vessel
  FROM live_sources JOIN vessels ON vessels.id = vessel_id`;

interface SourceRow {
  readonly id: number;
  readonly name: string;
  readonly vessel_id: number;
  readonly vessel: string;
}

interface SettingsRow {
  readonly id: number;
  readonly source_id: number;
  readonly document_sha256: string;
  readonly resting: number;
  readonly at: string;
  readonly by: string;
}

function rowOf(db: Db, { id, name, vessel_id, vessel }: SourceRow): LiveSourceRow {
  const settings = findSettings(db, id);
  if (settings === undefined) throw new DomainError('database-damaged', `Source "${name}" has no settings`, { id });
  return { id, name, vesselId: vessel_id, vessel, settings };
}

const settingsByDb = new WeakMap<Db, Map<number, LiveSettings>>();

/** Settings never change, and are asked for with every scan. */
function settingsOf(db: Db, row: SettingsRow): LiveSettings {
  const byId = settingsByDb.get(db) ?? new Map<number, LiveSettings>();
  settingsByDb.set(db, byId);
  const known = byId.get(row.id);
  // The number of settings that were rolled back is given again.
  if (known !== undefined && known.sha256 === row.document_sha256 && known.at === row.at) return known;
  const settings = readSettings(db, row);
  byId.set(row.id, settings);
  return settings;
}

function readSettings(db: Db, row: SettingsRow): LiveSettings {
  return {
    id: row.id,
    sourceId: row.source_id,
    document: readDocument<LiveSource>(db, row.document_sha256),
    sha256: row.document_sha256,
    isResting: row.resting === 1,
    at: row.at,
    by: row.by,
  };
}

/** The settings that hold in the vessel of a source, its own among them. */
function settingsBeside(db: Db, sourceId: number): { readonly hasOpenRun: boolean; readonly all: LiveSettings[] } {
  const sources = db
    .prepare<[number], { id: number; vesselId: number }>(
      `SELECT id, vessel_id AS vesselId FROM live_sources
       WHERE vessel_id = (SELECT vessel_id FROM live_sources WHERE id = ?) ORDER BY id`,
    )
    .all(sourceId);
  return {
    hasOpenRun: findOpenRunOf(db, sources[0]?.vesselId ?? 0) !== undefined,
    all: sources.flatMap(({ id }) => findSettings(db, id) ?? []),
  };
}

/** A source that rests gives its names free: another may take over what it read. */
function refuseTakenName(sourceId: number, other: LiveSettings, { channels }: LiveSource): void {
  if (other.sourceId === sourceId || other.isResting) return;
  const taken = new Set(other.document.channels.map(({ name }) => name));
  const twice = channels.find(({ name }) => taken.has(name));
  if (twice === undefined) return;
  throw new DomainError(
    'state-conflict',
    `"${other.document.name}" has a channel called "${twice.name}" already; give one of them another name, or let ` +
      'that source rest',
    { channel: twice.name, source: other.document.name },
  );
}

function refuseOtherName(before: LiveSource, after: LiveSource): void {
  if (before.name === after.name) return;
  throw new DomainError('state-conflict', `A source keeps its name; this one is "${before.name}"`, {
    source: before.name,
  });
}

function refuseOtherMeaning(before: LiveSource, after: LiveSource): void {
  const known = new Map<string, ChannelLayout>(before.channels.map((channel) => [channel.name, channel]));
  for (const { name, role, unit } of after.channels) {
    const was = known.get(name);
    if (was === undefined || (was.role === role && was.unit === unit)) continue;
    throw new DomainError(
      'state-conflict',
      `A run is open and "${name}" is ${was.role} in ${was.unit} in it; give the channel another name, or wait for its end`,
      { channel: name },
    );
  }
}

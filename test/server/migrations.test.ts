import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '../../server/store/database.ts';
import { applyMigrations, readMigrations } from '../../server/store/migrations.ts';
import { freshDatabase, freshFolder } from './fresh-database.ts';

const AT = '2026-03-02T08:00:00.000Z';
const SCHEMA = new URL('../../migrations/schema.sql', import.meta.url);

/** What each released step hashes to. A step that was released is never edited: a change is a new step. */
const FROZEN: Record<string, string> = {
  '0001-audit': '449d2e78c4aee45dfa4a639624f1e56f7670263e2aaf396b424dfb2688ea9138',
  '0002-workshop': 'b7cbdcf1426bdfd22900257858a0c320ee321e0f1540dbaeb107455f12338a44',
  '0003-files': '7fa964d7b4e75f88bf12ae79571aff2ef65bcd4fae1e07f4458f512c0f39aa37',
  '0004-runs': '458bcdd966885803889fa04cb24da1274bed49da0d38f62845104b083a470f33',
  '0005-cycles': '9c4e3422184639155e728e3607d5b99aad5bd1b7bbaa52bf091f9bed9580d960',
  '0006-loads': '3f9df4c2d4bad6f3a162d1e8197b9b4cc781197be3ae9854cd576d30b44c309c',
  '0007-evaluations': 'b0f3a956862d89e9b5e9f244158b4eb96e4981bf060470ccecb928119c89f12b',
  '0008-imports': '458d5af01ebe12efa6f121ca0b11f52565b448cbaa585ac0f7065490ac114576',
  '0009-tools-and-layups': '018da31967e9a47e9c0004a6abb0119421c6692ba542c27593e410b9bfc84504',
  '0011-live': '7f3ce108bf3e702eb0dbd2f2a7dc6a1dfa424920a5539e0608f9367c06b8075c',
  '0014-instruments': 'd3e1a755aec79ca028480787896ea43eb90aede071454235e4f5c0e60b111ddb',
  '0015-measured-results': '9ebf20b783cea26bde725979250b6f6080f8fcba9887f358014938dd715844ac',
  '0012-warnings': '3c5e9691f10a23984175354d773b3f8035600dc5b42d884cc75bbf6d60a458b0',
  '0013-hold-lists': '7e62c01681c1895b8d25c48ce704762de4a6482c2c27c4f4efdebc5db67624d6',
  '0010-materials': '76c3171f46c651b42d1df11e4b1c42d5434cd762825cd3540ce3aabf28084c47',
};

function schemaOf(db: Database.Database): string {
  const statements = db
    .prepare<[], string>(
      `SELECT sql FROM sqlite_schema WHERE sql IS NOT NULL AND name NOT LIKE 'sqlite_%'
       ORDER BY tbl_name, CASE type WHEN 'table' THEN 0 WHEN 'index' THEN 1 ELSE 2 END, name`,
    )
    .pluck()
    .all();
  return `${statements.map((sql) => `${sql};`).join('\n\n')}\n`;
}

describe('migrations', () => {
  it('lead to the schema that stands in migrations/schema.sql', () => {
    const schema = schemaOf(freshDatabase());
    if (process.env.GOLDEN_ACCEPT === '1') {
      if (process.env.CI) throw new Error('a golden is not accepted by CI');
      writeFileSync(SCHEMA, schema);
    }
    expect(schema).toBe(readFileSync(SCHEMA, 'utf8'));
  });

  it('are frozen once merged', () => {
    const hashes = Object.fromEntries(readMigrations().map(({ name, sha256 }) => [name, sha256]));
    expect(hashes).toEqual(FROZEN);
  });

  it('are applied once, by recorded name, each with its hash', () => {
    const db = freshDatabase();
    const migrations = readMigrations();
    expect(applyMigrations(db, AT)).toEqual([]);
    expect(db.prepare('SELECT name, sha256, at FROM migrations ORDER BY name').all()).toEqual(
      migrations.map(({ name, sha256 }) => ({ name, sha256, at: AT })),
    );
  });

  it('upgrade a database from every earlier step to the same schema, and keep what is in it', () => {
    const migrations = readMigrations();
    for (let steps = 1; steps < migrations.length; steps += 1) {
      const db = new Database(':memory:');
      applyMigrations(db, AT, migrations.slice(0, steps));
      const line = ['x', 'y', 'z', 'w', '{}', '0'.repeat(64), '1'.repeat(64)];
      db.prepare(
        'INSERT INTO audit (n, at, by, verb, subject, details, previous_sha256, sha256) VALUES (1, ?, ?, ?, ?, ?, ?, ?)',
      ).run(line);
      expect(applyMigrations(db, AT)).toEqual(migrations.slice(steps).map(({ name }) => name));
      expect(schemaOf(db)).toBe(readFileSync(SCHEMA, 'utf8'));
      expect(db.prepare('SELECT count(*) FROM audit').pluck().get()).toBe(1);
      expect(db.pragma('foreign_key_check')).toEqual([]);
    }
  });

  it('leave nothing of a step that fails half-way', () => {
    const db = new Database(':memory:');
    const broken = {
      name: '0001-broken',
      sha256: 'a'.repeat(64),
      sql: 'CREATE TABLE half (n INTEGER) STRICT; SELECT;',
    };
    expect(() => applyMigrations(db, AT, [broken])).toThrow(Database.SqliteError);
    expect(db.prepare("SELECT name FROM sqlite_schema WHERE name = 'half'").get()).toBeUndefined();
    expect(db.prepare('SELECT name FROM migrations').all()).toEqual([]);
  });

  it('refuse a database that a later program wrote, before touching it', () => {
    const path = join(freshFolder(), 'workshop.sqlite');
    const db = openDatabase(path, { at: AT });
    db.prepare('INSERT INTO migrations VALUES (?, ?, ?)').run('9999-from-the-future', 'f'.repeat(64), AT);
    db.close();
    expect(() => openDatabase(path, { at: AT })).toThrow(
      expect.objectContaining({ code: 'database-newer', facts: { migration: '9999-from-the-future' } }),
    );
  });

  it('make strict tables only', () => {
    const tables = freshDatabase()
      .prepare<[], { name: string; strict: number }>(
        "SELECT name, strict FROM pragma_table_list WHERE schema = 'main' AND type = 'table' AND name NOT LIKE 'sqlite_%'",
      )
      .all();
    expect(tables.length).toBeGreaterThan(20);
    expect(tables.filter(({ strict }) => strict !== 1)).toEqual([]);
  });
});

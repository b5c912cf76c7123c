import { join } from 'node:path';
import Database from 'better-sqlite3';
import { describe, expect, it } from 'vitest';
import { appendAudit, findBrokenAuditLine, readAudit } from '../../server/store/audit.ts';
import { canonicalJson, sha256Of, sha256OfDocument } from '../../server/store/canonical.ts';
import { openDatabase } from '../../server/store/database.ts';
import { fileChunks, findBrokenFile, keepFile } from '../../server/store/files.ts';
import { freshDatabase, freshFolder } from './fresh-database.ts';

const AT = '2026-03-02T08:00:00.000Z';

describe('openDatabase', () => {
  it('is durable at every commit, on the first open and on each one after', () => {
    const path = join(freshFolder(), 'workshop.sqlite');
    for (let opening = 0; opening < 3; opening += 1) {
      const db = openDatabase(path, { at: AT });
      expect(db.pragma('synchronous', { simple: true })).toBe(2);
      expect(db.pragma('journal_mode', { simple: true })).toBe('wal');
      expect(db.pragma('foreign_keys', { simple: true })).toBe(1);
      expect(db.pragma('busy_timeout', { simple: true })).toBe(5000);
      db.close();
    }
    const reading = openDatabase(path, { at: AT, readonly: true });
    expect(reading.pragma('synchronous', { simple: true })).toBe(2);
    expect(() => reading.exec('DELETE FROM runs')).toThrow(/readonly/);
    reading.close();
  });

  it("refuses another program's database and a file that is none", () => {
    const folder = freshFolder();
    const other = new Database(join(folder, 'other.sqlite'));
    other.exec('CREATE TABLE theirs (n INTEGER)');
    other.close();
    expect(() => openDatabase(join(folder, 'other.sqlite'), { at: AT })).toThrow(
      expect.objectContaining({ code: 'database-damaged' }),
    );
    expect(() => openDatabase(join(folder, 'no', 'folder.sqlite'), { at: AT })).toThrow(
      expect.objectContaining({ code: 'file-unreadable' }),
    );
  });
});

describe('the audit trail', () => {
  const entry = { at: AT, by: 'inspector 2', verb: 'try', subject: 'run/1', why: 'to see' };

  it('holds line by line, and is never changed', () => {
    const db = freshDatabase();
    for (let n = 0; n < 5; n += 1) appendAudit(db, { ...entry, details: { n } });
    expect(findBrokenAuditLine(db)).toEqual({ lines: 5, firstBroken: null });
    expect(() => db.exec("UPDATE audit SET by = 'nobody'")).toThrow(/never updated/);
    expect(() => db.exec('DELETE FROM audit')).toThrow(/never deleted/);
  });

  it('shows which line was tampered with, whoever did it', () => {
    for (const tampering of [
      "UPDATE audit SET by = 'nobody' WHERE n = 3",
      "UPDATE audit SET details = '{}' WHERE n = 3",
      'DELETE FROM audit WHERE n = 3',
      'UPDATE audit SET sha256 = lower(hex(zeroblob(32))) WHERE n = 3',
    ]) {
      const db = freshDatabase();
      for (let n = 0; n < 5; n += 1) appendAudit(db, { ...entry, details: { n } });
      db.exec(`DROP TRIGGER audit_is_never_updated; DROP TRIGGER audit_is_never_deleted; ${tampering}`);
      const { firstBroken } = findBrokenAuditLine(db);
      expect(firstBroken, tampering).toBe(tampering.startsWith('DELETE') ? 4 : 3);
    }
  });

  it('is read by subject and by page, latest first', () => {
    const db = freshDatabase();
    for (const subject of ['run/1', 'run/12', 'cycle/A/1', 'run/1']) appendAudit(db, { ...entry, subject });
    const all = readAudit(db, { limit: 3 });
    expect(all.lines.map(({ n }) => n)).toEqual([4, 3, 2]);
    expect(readAudit(db, { limit: 3, before: all.next ?? 0 }).lines.map(({ n }) => n)).toEqual([1]);
    expect(readAudit(db, { limit: 9, subject: 'run/1' }).lines.map(({ n }) => n)).toEqual([4, 1]);
    expect(readAudit(db, { limit: 9, subject: 'cycle/A' }).lines.map(({ n }) => n)).toEqual([3]);
  });
});

describe('canonicalJson', () => {
  it('sorts keys by code unit and writes no white space', () => {
    // RFC 8785, section 3.2.3, the order of its sample keys.
    const sample = { '\u20ac': 'Euro', '\r': 'CR', '1': 'One', '\u0080': 'Control', ö: 'o', '\ufb33': 'Dalet' };
    expect(canonicalJson(sample)).toBe('{"\\r":"CR","1":"One","\u0080":"Control","ö":"o","€":"Euro","\ufb33":"Dalet"}');
    expect(canonicalJson({ b: [1, { d: 2, c: undefined, a: null }], a: 'é' })).toBe(
      '{"a":"é","b":[1,{"a":null,"d":2}]}',
    );
  });

  it('gives one hash to one document, however it is laid out', () => {
    expect(sha256OfDocument({ a: 1.0, b: [2] })).toBe(sha256OfDocument(JSON.parse('{ "b": [2.0], "a": 1e0 }')));
  });
});

describe('kept files', () => {
  it('come back byte for byte, once however often they come', () => {
    const db = freshDatabase();
    const bytes = Buffer.alloc(3_000_001, 'Date;Time;T1\r\n');
    const file = {
      sha256: sha256Of(bytes),
      bytes: bytes.length,
      chunks: () => [bytes.subarray(0, 7), bytes.subarray(7)],
    };
    const id = keepFile(db, file);
    expect(keepFile(db, file)).toBe(id);
    expect(Buffer.concat([...fileChunks(db, id)]).equals(bytes)).toBe(true);
    expect(findBrokenFile(db)).toBeNull();
    db.exec(
      'DROP TRIGGER file_chunks_are_never_updated; UPDATE file_chunks SET packed = (SELECT packed FROM file_chunks WHERE n = 2) WHERE n = 1',
    );
    expect(findBrokenFile(db)).toBe(file.sha256);
  });

  it('are refused where they changed after they were hashed', () => {
    const db = freshDatabase();
    const file = { sha256: sha256Of('before'), bytes: 6, chunks: () => [Buffer.from('after ')] };
    expect(() => keepFile(db, file)).toThrow(expect.objectContaining({ code: 'file-unreadable' }));
  });
});

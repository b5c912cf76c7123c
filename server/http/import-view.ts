import { DomainError } from '../../models/errors.ts';
import { readLog } from '../../models/log/read-log.ts';
import { fileOfImport, type IncomingFile } from '../actions/incoming-file.ts';
import { logFileOf } from '../actions/log-file-of.ts';
import type { ImportLine, ImportView } from '../contract/imports.ts';
import type { Db } from '../store/database.ts';
import type { ImportRow } from '../store/imports.ts';
import { listRecorders } from '../store/recorders.ts';
import { problemOf } from './problem.ts';

export function importLineOf({ fileId: _fileId, refusal, ...row }: ImportRow): ImportLine {
  return { ...row, problem: refusal === null ? null : problemOf(refusal) };
}

export async function importView(db: Db, row: ImportRow): Promise<ImportView> {
  const file = fileOfImport(db, row);
  return {
    ...importLineOf(row),
    firstLines: [],
    proposal: null,
    knownLayouts: await knownLayouts(db, file),
  };
}

async function knownLayouts(db: Db, file: IncomingFile): Promise<ImportView['knownLayouts']> {
  const known: ImportView['knownLayouts'] = [];
  for (const { name, vessel, layout } of listRecorders(db)) {
    if (layout === null) continue;
    known.push({ recorder: name, vessel, layout: layout.document, reads: await reads(file, layout.document) });
  }
  return known;
}

async function reads(file: IncomingFile, layout: Parameters<typeof readLog>[1]): Promise<boolean> {
  try {
    readLog([await logFileOf(file)], layout);
    return true;
  } catch (error) {
    if (error instanceof DomainError) return false;
    throw error;
  }
}

import { rm } from 'node:fs/promises';
import type { Readable } from 'node:stream';
import { fileAtPath } from '../actions/file-at-path.ts';
import { importTable } from '../actions/import-table.ts';
import { MOST_TABLE_BYTES, type TableKind } from '../contract/tables.ts';
import type { AppParts } from './app-parts.ts';
import type { SomeHandlers } from './handler.ts';
import { saveUpload } from './save-upload.ts';

export const tableHandlers: SomeHandlers<'importParts' | 'importRolls'> = {
  importParts: (parts, { query, body }) => take(parts, 'parts', query, body),
  importRolls: (parts, { query, body }) => take(parts, 'rolls', query, body),
};

async function take(
  parts: AppParts,
  kind: TableKind,
  query: { columns?: string | undefined; commit?: string | undefined },
  body: Readable,
) {
  const mostUploadBytes = Math.min(parts.mostUploadBytes, MOST_TABLE_BYTES);
  const path = await saveUpload({ ...parts, mostUploadBytes }, body);
  try {
    return await importTable(parts, { kind, file: fileAtPath(path, `${kind}.csv`), ...query });
  } finally {
    await rm(path, { force: true });
  }
}

import { setImmediate } from 'node:timers/promises';
import { DomainError } from '../../models/errors.ts';
import { MOST_REFUSALS, MOST_TABLE_BYTES, TABLE_FIELDS, type TableImport, type TableKind } from '../contract/tables.ts';
import { csvRows } from '../files/csv-rows.ts';
import { appendAudit } from '../store/audit.ts';
import { keepFile } from '../store/files.ts';
import { codesKnown, partWriter, rollWriter } from '../store/table-rows.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import type { IncomingFile } from './incoming-file.ts';
import { columnsOf } from './propose-columns.ts';
import { rowReader } from './table-row.ts';

export interface TableRequest {
  readonly kind: TableKind;
  readonly file: IncomingFile;
  readonly columns?: string | undefined;
  /** The SHA-256 its preview showed; without it nothing is kept. */
  readonly commit?: string | undefined;
}

/** Rows read before others get a turn. */
const ROWS_A_TURN = 2000;
/** Of good rows, shown in a preview. */
const FIRST = 10;

/**
 * Reads a table of parts or rolls: what it would make, and which rows are refused and why. With `commit` the good rows
 * are kept in one transaction, with the bytes of the table and one line of the audit trail for all of them.
 */
export async function importTable(parts: ActionParts, request: TableRequest): Promise<TableImport> {
  const { kind, file, commit } = request;
  if (commit !== undefined && commit !== file.sha256) {
    throw new DomainError('state-conflict', 'These are not the bytes that were previewed; preview them first', {
      previewed: commit,
      sha256: file.sha256,
    });
  }
  const { text, encoding } = textOf(file);
  const delimiter = delimiterOf(text);
  const rows = csvRows(text, delimiter);
  const heading = rows.next();
  if (heading.done) throw new DomainError('log-empty', `${file.name} holds no row`, { file: file.name });
  const headings = heading.value.cells;
  const columns = columnsOf(kind, headings, request.columns);
  const missing = NEEDED[kind].filter((field) => !columns.some((column) => column === field));
  const read = rowReader(parts, kind, headings, columns);
  const good: { line: number; cells: Readonly<Record<string, string | number>> }[] = [];
  const refusals: TableImport['refusals'] = [];
  let count = 0;
  let refused = 0;
  for (const row of rows) {
    count += 1;
    if (count % ROWS_A_TURN === 0) await setImmediate();
    if (missing.length > 0) continue;
    const found = read(row);
    if ('cells' in found) good.push({ line: row.line, cells: found.cells });
    else {
      refused += 1;
      if (refusals.length < MOST_REFUSALS) refusals.push({ line: row.line, ...found });
    }
  }
  if (commit !== undefined) keep(parts, request, { good, missing, refused });
  return {
    kind,
    sha256: file.sha256,
    encoding,
    delimiter,
    columns: headings.map((text, n) => ({ heading: text, field: columns[n] ?? null })),
    missing,
    rows: count,
    good: good.length,
    refused,
    refusals,
    first: good.slice(0, FIRST).map(({ line, cells }) => ({
      line,
      cells: Object.fromEntries(Object.entries(cells).map(([field, value]) => [field, String(value)])),
    })),
    kept: commit !== undefined,
  };
}

const NEEDED = { parts: [TABLE_FIELDS.parts[0]], rolls: ['roll', 'batch', 'received'] } as const;

function keep(
  parts: ActionParts,
  { kind, file }: TableRequest,
  {
    good,
    missing,
    refused,
  }: {
    good: readonly { cells: Readonly<Record<string, string | number>> }[];
    missing: readonly string[];
    refused: number;
  },
): void {
  if (missing.length > 0) {
    throw new DomainError('invalid-request', `No column holds ${missing.join(', ')}; say which does`, {
      missing: missing.join(', '),
    });
  }
  if (good.length === 0) throw new DomainError('state-conflict', 'No row of the table can be kept', { refused });
  const { db } = parts;
  db.transaction(() => {
    const deed = deedOf(parts);
    const known = codesKnown(db, kind);
    const by = TABLE_FIELDS[kind][0];
    const taken = good.find(({ cells }) => known.has(String(cells[by])));
    if (taken !== undefined) {
      throw new DomainError('state-conflict', `${taken.cells[by]} came on record meanwhile; preview the table again`);
    }
    const write = kind === 'parts' ? partWriter(db, deed) : rollWriter(db, deed);
    for (const { cells } of good) write(cells);
    keepFile(db, file);
    appendAudit(db, {
      ...deed,
      verb: `import-${kind}`,
      subject: `table/${file.sha256}`,
      why: null,
      details: { name: file.name, sha256: file.sha256, kept: good.length, refused },
    });
  }).immediate();
}

function textOf(file: IncomingFile): { readonly text: string; readonly encoding: TableImport['encoding'] } {
  if (file.bytes > MOST_TABLE_BYTES) {
    throw new DomainError('too-large', `A table may have at most ${MOST_TABLE_BYTES} bytes`, { bytes: file.bytes });
  }
  const bytes = Buffer.concat([...file.chunks()]);
  if (bytes.includes(0)) throw new DomainError('log-not-text', `${file.name} is no text; save it as CSV`);
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), encoding: 'utf-8' };
  } catch {
    // Not UTF-8: spreadsheets also write the code page of their desk.
    return { text: new TextDecoder('windows-1252').decode(bytes), encoding: 'windows-1252' };
  }
}

/** The commonest of the usual ones in the heading. */
function delimiterOf(text: string): string {
  const heading = text.trimStart().split('\n', 1)[0] ?? '';
  const found = [',', ';', '\t'].map((mark) => ({ mark, count: heading.split(mark).length }));
  return found.reduce((best, one) => (one.count > best.count ? one : best)).mark;
}

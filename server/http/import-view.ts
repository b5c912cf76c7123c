import { DomainError } from '../../models/errors.ts';
import type { Layout } from '../../models/log/layout.ts';
import { type FileHead, readHead } from '../../models/log/proposal/read-head.ts';
import { proposeLayout } from '../../models/log/propose-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { headOf } from '../actions/head-of.ts';
import { fileOfImport } from '../actions/incoming-file.ts';
import type { ImportLine, ImportView } from '../contract/imports.ts';
import type { Db } from '../store/database.ts';
import type { ImportRow } from '../store/imports.ts';
import { listRecorders } from '../store/recorders.ts';
import { problemOf } from './problem.ts';

const FIRST_LINES = 40;
const LONGEST_LINE = 300;

export function importLineOf({ fileId: _fileId, refusal, ...row }: ImportRow): ImportLine {
  return { ...row, problem: refusal === null ? null : problemOf(refusal) };
}

/** A file that waits, with its first lines, a proposed layout, and the kept layouts that would read it. */
export async function importView(db: Db, row: ImportRow): Promise<ImportView> {
  const line = importLineOf(row);
  if (row.fileId === null) return { ...line, firstLines: [], proposal: null, knownLayouts: [] };
  const head = await headOf(fileOfImport(db, row));
  const { lines } = readHead(head);
  const proposal = orRefusal(() => proposeLayout(head));
  return {
    ...line,
    problem: line.problem ?? (proposal instanceof DomainError ? problemOf(proposal) : null),
    firstLines: lines.slice(0, FIRST_LINES).map((text) => text.slice(0, LONGEST_LINE)),
    proposal:
      proposal instanceof DomainError ? null : { layout: proposal.layout, statements: [...proposal.statements] },
    knownLayouts: knownLayouts(db, head),
  };
}

function knownLayouts(db: Db, head: FileHead): ImportView['knownLayouts'] {
  return listRecorders(db)
    .flatMap(({ name: recorder, vessel, layout }) =>
      layout === null ? [] : [{ recorder, vessel, layout: layout.document, reads: reads(head, layout.document) }],
    )
    .sort((a, b) => Number(b.reads) - Number(a.reads));
}

/** Whether a layout reads the beginning of a file; a last line that is cut is passed over by the reader itself. */
function reads({ name, head }: FileHead, layout: Layout): boolean {
  return !(orRefusal(() => readLog([{ name, chunks: [head] }], layout)) instanceof DomainError);
}

function orRefusal<T>(read: () => T): T | DomainError {
  try {
    return read();
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
}

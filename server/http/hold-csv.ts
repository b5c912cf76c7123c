import type { HeldPart, HoldView, KinKind, Shared } from '../contract/trace.ts';
import { csvCell } from './csv-cell.ts';

const HEADER = [
  'part',
  'title',
  'drawing',
  'quantity',
  'failed_part',
  'where',
  'customer',
  'since',
  'verdict',
  'failed_tests',
  'runs',
  'why_on_the_list',
];

/** A hold list as a spreadsheet reads it (RFC 4180): what it is first, then a line a part. */
export function* holdCsv({ hold, sha256, deed, document }: HoldView): Generator<string> {
  yield line(['hold_list', String(hold)]);
  yield line(['made', deed.at, 'by', deed.by]);
  yield line(['why', document.why]);
  yield line(['failed_parts', ...document.failed]);
  yield line(['shared', ...document.kinds]);
  yield line(['runs_from', document.from ?? 'all', 'until', document.until ?? 'all']);
  yield line(['sha256', sha256]);
  yield '\r\n';
  yield line(HEADER);
  for (const part of document.parts) yield line(cells(part, document.shared));
}

function cells(part: HeldPart, shared: readonly Shared[]): string[] {
  return [
    part.serial,
    part.title ?? '',
    part.drawing ?? '',
    String(part.quantity),
    part.isStart ? 'yes' : '',
    part.whereabouts?.place ?? 'not on record',
    part.whereabouts?.customer ?? '',
    part.whereabouts?.since ?? '',
    part.verdict ?? 'not judged',
    part.failedTests.join('; '),
    part.runs.join(' '),
    part.because.map((reason) => sayReason(reason, shared)).join('; '),
  ];
}

/** Kinds whose name is no matter of a run. */
const NO_RUN: readonly KinKind[] = ['load'];

function sayReason({ shared: at, runs }: HeldPart['because'][number], shared: readonly Shared[]): string {
  const found = shared[at];
  if (found === undefined) return '';
  const where = runs.length === 0 || NO_RUN.includes(found.kind) ? '' : ` in run ${runs.join(', ')}`;
  return `${found.what}${where}, as ${found.failed.join(', ')}`;
}

/** A cell a spreadsheet would take for a formula begins with an apostrophe. */
function line(cells: readonly string[]): string {
  return `${cells.map(cell).join(',')}\r\n`;
}

function cell(text: string): string {
  const plain = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return csvCell(plain);
}

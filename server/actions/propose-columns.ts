import { DomainError } from '../../models/errors.ts';
import { TABLE_FIELDS, type TableField, type TableKind } from '../contract/tables.ts';

/** What each column of a table holds: as a person said, otherwise as its heading reads. */
export function columnsOf(
  kind: TableKind,
  headings: readonly string[],
  said: string | undefined,
): (TableField | null)[] {
  const columns =
    said === undefined ? headings.map((heading) => guess(kind, heading)) : saidColumns(kind, headings, said);
  const seen = new Set<TableField>();
  return columns.map((field, n) => {
    if (field === null || !seen.has(field)) {
      if (field !== null) seen.add(field);
      return field;
    }
    if (said === undefined) return null;
    throw new DomainError('invalid-request', `Two columns are said to be "${field}"; the second is "${headings[n]}"`, {
      field,
    });
  });
}

function saidColumns(kind: TableKind, headings: readonly string[], said: string): (TableField | null)[] {
  const names = said.split(',').map((name) => name.trim());
  if (names.length !== headings.length) {
    throw new DomainError('invalid-request', `${names.length} columns are said, and the table has ${headings.length}`, {
      columns: headings.length,
    });
  }
  return names.map((name) => {
    if (name === '') return null;
    const field = (TABLE_FIELDS[kind] as readonly TableField[]).find((one) => one === name);
    if (field !== undefined) return field;
    throw new DomainError('invalid-request', `No column can be "${name}"; there are ${TABLE_FIELDS[kind].join(', ')}`);
  });
}

/** Headings people write, in small letters without spaces or signs. */
const HEADINGS: Readonly<Record<TableField, readonly string[]>> = {
  serial: ['serial', 'serialnumber', 'serialno', 'sn', 'part', 'partserial'],
  title: ['title', 'name', 'description'],
  drawing: ['drawing', 'drawingnumber', 'drawingno', 'partnumber', 'pn'],
  'drawing-issue': ['drawingissue', 'issue', 'revision', 'rev'],
  tool: ['tool', 'mould', 'mold', 'toolnumber', 'toolno'],
  'work-order': ['workorder', 'wo', 'order', 'workordernumber'],
  customer: ['customer', 'client'],
  'thickness-mm': ['thicknessmm', 'thickness'],
  plies: ['plies', 'plycount', 'numberofplies'],
  roll: ['roll', 'rollnumber', 'rollno', 'rollid'],
  batch: ['batch', 'lot', 'batchnumber', 'lotnumber', 'batchno', 'lotno'],
  received: ['received', 'receivedat', 'receivedon', 'date', 'arrived'],
  as: ['as', 'receivedas', 'state'],
  'length-m': ['lengthm', 'length'],
  'out-minutes': ['outminutes', 'outminutesbefore', 'minutesout'],
};

function guess(kind: TableKind, heading: string): TableField | null {
  const plain = heading.toLowerCase().replace(/[^a-z0-9]/g, '');
  return (TABLE_FIELDS[kind] as readonly TableField[]).find((field) => HEADINGS[field].includes(plain)) ?? null;
}

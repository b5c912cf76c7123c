import type { DomainError, ErrorCode } from '../../models/errors.ts';
import { problemPath } from '../contract/paths.ts';
import type { Problem } from '../contract/problem.ts';
import type { Refusal } from '../store/imports.ts';

export interface ProblemKind {
  readonly status: number;
  readonly title: string;
  /** What to do about it: the text of its help page. */
  readonly help: string;
}

/** Every refusal as HTTP sees it. A code without a row does not compile. */
export const PROBLEM_KINDS = {
  'document-not-json': kind(
    400,
    'Not JSON',
    'The document is not JSON. Look at the place named: a comma or a bracket is missing or one too many.',
  ),
  'document-wrong-format': kind(
    422,
    'Another kind of document',
    'The key "format" says what a document is. Send the kind that was asked for.',
  ),
  'document-unknown-key': kind(
    422,
    'Unknown key in a document',
    'A key that is not known is refused, because a misspelt limit would otherwise be passed over in silence.',
  ),
  'document-missing-key': kind(
    422,
    'Key missing in a document',
    'The document needs the key named. Nothing is filled in for it.',
  ),
  'document-wrong-value': kind(
    422,
    'Value cannot stand there',
    'The value at the place named is not of the kind expected there.',
  ),
  'document-name-twice': kind(
    422,
    'Name used twice',
    'Names of stages, windows, channels and parts stand once each, so that a finding can point at one.',
  ),
  'cycle-stages-out-of-order': kind(422, 'Stages out of order', 'Between two dwells stands a heat or a cool.'),
  'unit-unknown': kind(422, 'Unknown unit', 'Use one of the units the cycle and layout documents know.'),
  'resin-not-the-cycles': kind(
    422,
    "Not the cycle's resin",
    'The cycle names its resin set by code. Another set would give another estimate.',
  ),
  'log-empty': kind(422, 'Empty log', 'The file holds nothing. See whether the recorder had finished writing.'),
  'log-not-text': kind(
    422,
    'Not a text table',
    'The file is no text. Export it from the recorder as text or as a workbook (.xlsx).',
  ),
  'log-line-too-long': kind(
    422,
    'Line too long',
    'One line is longer than any recorder writes. The file is damaged, or no log.',
  ),
  'log-encoding-wrong': kind(
    422,
    'Wrong encoding',
    'The bytes do not fit the encoding of the layout. Choose the other one.',
  ),
  'log-column-missing': kind(422, 'Column missing', 'The layout names a column that the heading line does not have.'),
  'log-column-twice': kind(422, 'Column twice', 'Two columns of the file have the heading that the layout names.'),
  'log-units-contradict': kind(
    422,
    'Units contradict',
    'The units line of the file says another unit than the layout. One of them is wrong: find out which.',
  ),
  'log-cell-unreadable': kind(
    422,
    'Unreadable cell',
    'A cell is neither a figure nor a missing code. Where it means "no reading", add it to the missing codes.',
  ),
  'log-row-ragged': kind(422, 'Row of another length', 'A row has more or fewer cells than the heading line.'),
  'log-time-unreadable': kind(422, 'Unreadable time', 'The stamp does not fit the pattern of the layout.'),
  'log-time-ambiguous': kind(
    422,
    'Ambiguous time',
    'The stamps can be read in more than one way. Say which in the layout.',
  ),
  'log-time-skipped': kind(
    422,
    'Local time that never was',
    'The zone skips this hour when its clock goes forward. See whether the zone of the layout is right.',
  ),
  'log-no-readings': kind(
    422,
    'No readings',
    'No line holds a reading. See whether the layout points at the right lines.',
  ),
  'layout-not-provable': kind(
    422,
    'Layout not known',
    'How the file is to be read does not follow from the file. Open it under Import and answer what is asked.',
  ),
  'zone-unknown': kind(
    422,
    'Unknown time zone',
    'Give an IANA zone, such as Europe/Lisbon, or an offset, such as +01:00.',
  ),
  'channel-unknown': kind(
    422,
    'No such channel',
    'The channel is not one of the run. The names are those of the layout.',
  ),
  'part-unknown': kind(422, 'No such part in the load', 'A sensor is on a part that the load does not list.'),
  'exclusion-malformed': kind(
    422,
    'Exclusion not whole',
    'An exclusion names a channel, the instant it holds from, a reason and a person.',
  ),
  'barometer-malformed': kind(
    422,
    'Barometer reading not understood',
    'Write a figure with its unit, such as 1009 mbar.',
  ),
  'option-out-of-range': kind(422, 'Value out of range', 'The value named is outside what can be computed.'),
  'time-not-increasing': kind(422, 'Times out of order', 'Scans must come in rising time.'),
  'cure-out-of-bounds': kind(
    422,
    'Cure estimate out of bounds',
    'The resin set gives no degree of cure between 0 and 1 along this history.',
  ),
  'cure-stalls': kind(
    422,
    'Cure estimate stalls',
    'The resin set cannot be followed along this history with the accuracy asked for.',
  ),
  'event-impossible': kind(
    422,
    'Cannot have happened so',
    'The line contradicts what the ledger says already, or the calendar. Correct whichever of the two is wrong.',
  ),
  'not-found': kind(404, 'Not found', 'There is nothing by that name or number.'),
  'already-recorded': kind(409, 'Already recorded', 'It is here already. Nothing was changed.'),
  'record-missing': kind(
    409,
    'Not on record yet',
    'What was asked stands on a record that nobody has made. The detail says which, and where it is written down.',
  ),
  'state-conflict': kind(
    409,
    'Not as things stand',
    'What was asked does not fit what is there now. Look again, then decide.',
  ),
  'database-newer': kind(
    503,
    'Database of a later version',
    'The database was written by a later version of the program. Use that version.',
  ),
  'database-damaged': kind(
    503,
    'Damaged database',
    'What is stored does not hold together. Keep the file as it is and restore the last backup beside it.',
  ),
  'file-unreadable': kind(422, 'File cannot be read', 'The file could not be opened, or changed while it was read.'),
  'invalid-request': kind(
    400,
    'Request not understood',
    'The request lacks something or has something too many; each place is named.',
  ),
  'too-large': kind(413, 'Too large', 'The body is larger than is taken here.'),
  'media-type-wrong': kind(
    415,
    'Wrong media type',
    'Send JSON as application/json and a file as application/octet-stream.',
  ),
  'not-permitted': kind(403, 'Not permitted', 'Your roles do not include one that may do this.'),
  'key-unknown': kind(
    401,
    'Key not known',
    'Send the key that was shown when it was made, as "Authorization: Bearer KEY". A lost one is made anew.',
  ),
  'disk-full': kind(
    507,
    'Cannot be kept now',
    'Nothing of it was kept. Make room on the disk of the workshop, and send it again: sending twice does no harm.',
  ),
  usage: kind(400, 'Wrong usage', 'The command was not understood; its --help says how it is written.'),
} as const satisfies Record<ErrorCode, ProblemKind>;

/** A refusal as RFC 9457 puts it. */
export function problemOf({ code, message, facts }: DomainError | Refusal, errors?: Problem['errors']): Problem {
  const { status, title } = PROBLEM_KINDS[code];
  return {
    type: problemPath(code),
    title,
    status,
    detail: message,
    ...(Object.keys(facts).length > 0 ? { facts: { ...facts } } : {}),
    ...(errors === undefined ? {} : { errors }),
  };
}

function kind(status: number, title: string, help: string): ProblemKind {
  return { status, title, help };
}

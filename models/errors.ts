/** Every refusal the product knows, by what is wrong. `server/http/problem.ts` gives each its status and title. */
export const ERROR_CODES = [
  // documents (cycle, layout, load, resin)
  'document-not-json',
  'document-wrong-format',
  'document-unknown-key',
  'document-missing-key',
  'document-wrong-value',
  'document-name-twice',
  'cycle-stages-out-of-order',
  'unit-unknown',
  'resin-not-the-cycles',
  // logs
  'log-empty',
  'log-not-text',
  'log-line-too-long',
  'log-encoding-wrong',
  'log-column-missing',
  'log-column-twice',
  'log-units-contradict',
  'log-cell-unreadable',
  'log-row-ragged',
  'log-time-unreadable',
  'log-time-ambiguous',
  'log-time-skipped',
  'log-no-readings',
  'layout-not-provable',
  'zone-unknown',
  // a judgement's inputs
  'channel-unknown',
  'part-unknown',
  'exclusion-malformed',
  'barometer-malformed',
  // numerics and cure
  'option-out-of-range',
  'time-not-increasing',
  'cure-out-of-bounds',
  'cure-stalls',
  // ledgers
  'event-impossible',
  // the database and the server
  'not-found',
  'already-recorded',
  'record-missing',
  'state-conflict',
  'database-newer',
  'database-damaged',
  'file-unreadable',
  'invalid-request',
  'too-large',
  'media-type-wrong',
  'not-permitted',
  'key-unknown',
  'disk-full',
  'usage',
] as const;

export type ErrorCode = (typeof ERROR_CODES)[number];

/** Figures and names that go with a refusal: scalars, the unit in the key. */
export type Facts = Readonly<Record<string, string | number | boolean | null>>;

/** A refusal the caller can act on. Anything else thrown is a bug. */
export class DomainError extends Error {
  override readonly name = 'DomainError';
  readonly code: ErrorCode;
  readonly facts: Facts;

  constructor(code: ErrorCode, message: string, facts: Facts = {}, options?: ErrorOptions) {
    super(message, options);
    this.code = code;
    this.facts = facts;
  }
}

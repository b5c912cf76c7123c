/** One file as it came from a recorder. Several make one run. */
export interface LogFile {
  /** What the person calls it; stands in every refusal. */
  readonly name: string;
  /** Its bytes, in pieces of any size. Read once. */
  readonly chunks: Iterable<Uint8Array>;
  /** How many bytes there are, where that is known: a long file then needs room for its readings only once. */
  readonly bytes?: number;
}

import type { Layout } from '../../../models/log/layout.ts';

/** How finely a recorder shows one quantity, in the unit it writes. */
export interface Figures {
  readonly decimals: number;
  /** Standard deviation of a reading. */
  readonly noise: number;
}

/** A recorder: its layout document, and what its files have that no layout says. */
export interface Recorder {
  readonly name: string;
  readonly vessel: string;
  /** `elapsed` layouts carry any start; each file's own is put in when it is written. */
  readonly layout: Layout;
  readonly intervalS: number;
  readonly temperature: Figures;
  readonly pressure: Figures;
  readonly vacuum: Figures;
  /** What stands where a reading is absent. */
  readonly absent: string;
  readonly lineEnd: '\n' | '\r\n';
  readonly byteOrderMark?: boolean;
  /** Columns of the file that no channel reads, and what stands in them. */
  readonly extra?: readonly { readonly column: string; readonly cell: string }[];
  /** Lines above the headings; `{run}` and `{date}` are filled in. The layout's `header` says how many there are. */
  readonly preamble: readonly string[];
  /** Lines after the last reading. */
  readonly footer?: readonly string[];
  /** Ending of the file's name. */
  readonly extension: string;
}

/** What of a recorder decides how it shows what it reads. */
export type Indicator = Pick<Recorder, 'intervalS' | 'temperature' | 'pressure' | 'vacuum'> & {
  readonly layout: Pick<Layout, 'channels'>;
};

/**
 * Where a run in progress is heading, for one part, if its programme holds: what a person at the vessel wants to know.
 * Advice only. Every instant is ISO 8601; those that say "not before" are rounded up to the minute by who shows them.
 */
export interface Forecast {
  readonly part: string | null;
  /** The stage the part is in by its own sensors; null before heat-on and after the last. */
  readonly stage: { readonly name: string; readonly kind: 'heat' | 'dwell' | 'cool'; readonly since: string } | null;
  /** Furthest along and furthest behind now, with how fast they go; null where none is read. */
  readonly leading: Runner | null;
  readonly lagging: Runner | null;
  /** The next dwell that has not opened, and when the last sensor is expected in; null where it is not coming nearer. */
  readonly entry: {
    readonly dwell: string;
    readonly expectedAt: string | null;
    readonly by: string;
    /** What is still missing, in words: `18.2 °C to go at 1.4 °C/min`. */
    readonly because: string;
  } | null;
  /** The dwell whose clock runs: the earliest instant its time can be met, suspects counted against. */
  readonly dwell: {
    readonly dwell: string;
    readonly minutesSeen: number;
    readonly minutesLeft: number;
    readonly notBefore: string | null;
    /** The sensor the clock waits for. */
    readonly by: string | null;
    /** Where the time may not be exceeded: not later than this. */
    readonly notAfter: string | null;
    readonly because: string;
  } | null;
  /** Estimated cure now, and at the end if the programme holds; null where the cycle names no resin. */
  readonly cure: {
    readonly degreeNow: number;
    readonly tgNowC: number | null;
    readonly degreeAtEnd: number | null;
    readonly tgAtEndC: number | null;
    readonly gelExpectedAt: string | null;
    /** The least of the judged sensors. */
    readonly by: string;
  } | null;
  /** Limits that are nearing, nearest first. */
  readonly nearing: readonly Nearing[];
  /** What needs a person, with the instant it began. */
  readonly needs: readonly { readonly text: string; readonly since: string }[];
}

export interface Runner {
  readonly channel: string;
  readonly valueC: number;
  /** Positive is hotter; least squares over the last minutes. */
  readonly rateCPerMin: number | null;
}

export interface Nearing {
  readonly limit: string;
  readonly sensor: string | null;
  /** In the limit's unit. */
  readonly margin: number;
  readonly unit: string;
  /** When it would be broken at the present rate; null where it is not moving there. */
  readonly expectedAt: string | null;
  readonly text: string;
}

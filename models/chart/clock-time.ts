import { DomainError } from '../errors.ts';

/** Clock times of the workshop's zone. */
export interface ClockTime {
  /** `09:22`, with seconds where they are not zero. */
  readonly time: (ms: number) => string;
  /** `09:22`, the minute begun. */
  readonly minute: (ms: number) => string;
  /** `3 March 2026`. */
  readonly day: (ms: number) => string;
}

/** Clock times in an IANA zone or at an offset such as `+02:00`; an unknown one is refused. */
export function clockTimeIn(zone: string): ClockTime {
  const time = formatIn(zone, { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' });
  const withSeconds = formatIn(zone, { hour: '2-digit', minute: '2-digit', second: '2-digit', hourCycle: 'h23' });
  const day = formatIn(zone, { day: 'numeric', month: 'long', year: 'numeric' });
  return {
    time: (ms) => (Math.round(ms / 1000) % 60 === 0 ? time : withSeconds).format(Math.round(ms / 1000) * 1000),
    minute: (ms) => time.format(ms),
    day: (ms) => day.format(ms),
  };
}

function formatIn(zone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  try {
    return new Intl.DateTimeFormat('en-GB', { ...options, timeZone: zone });
  } catch (cause) {
    throw new DomainError(
      'zone-unknown',
      `"${zone}" is no time zone; expected one such as "Europe/Lisbon"`,
      { zone },
      { cause },
    );
  }
}

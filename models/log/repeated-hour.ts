import { DomainError } from '../errors.ts';
import { placeOf, type RepairList } from './repair-list.ts';
import type { Scans } from './scan-table.ts';
import { areEqual } from './scans-sent-twice.ts';
import type { Zone } from './time-zone.ts';

/**
 * Turns the clock's times into instants.
 *
 * In an hour that the zone repeats: the first of the two instants that is not before the previous scan. Where the log
 * begins in that hour, only a step back within it proves which of the two it began in. A file that begins with scans of
 * the one before begins where those stand.
 *
 * @returns [count] ms since 1970-01-01T00:00:00Z, in the order of the lines.
 * @throws {DomainError} `log-time-skipped` for a time that the zone's clocks never showed; `log-time-ambiguous` for a
 *   log that begins in a repeated hour and never steps back in it.
 */
export function instantsInZone(log: Scans, zone: Zone, files: readonly string[], list: RepairList): Float64Array {
  const instantMs = new Float64Array(log.count);
  const repeated: number[] = [];
  /** The scan that began in a repeated hour, while nothing has proved which one. */
  let unproved = -1;
  let previousMs = Number.NEGATIVE_INFINITY;
  for (let scan = 0; scan < log.count; scan++) {
    const localMs = log.stampMs[scan]!;
    const firstMs = zone.instantOf(localMs);
    if (Number.isNaN(firstMs)) throw skipped(log, zone, files, scan);
    const secondMs = zone.secondInstantOf(localMs);
    let chosenMs = firstMs;
    if (Number.isNaN(secondMs)) {
      if (unproved >= 0) throw ambiguous(log, zone, files, unproved);
    } else {
      repeated.push(scan);
      if (scan === 0 || secondMs < previousMs) {
        if (unproved >= 0) throw ambiguous(log, zone, files, unproved);
        unproved = scan;
      } else if (firstMs < previousMs) {
        chosenMs = twinInEarlierFile(log, scan, instantMs) ?? secondMs;
        unproved = -1;
      }
    }
    instantMs[scan] = chosenMs;
    previousMs = chosenMs;
  }
  if (unproved >= 0) throw ambiguous(log, zone, files, unproved);
  list.add(
    'repeated-hour',
    repeated,
    `Clocks in ${zone.name} showed these times twice; each scan was given the first instant not before the scan above it.`,
  );
  return instantMs;
}

/** The instant of a scan equal in stamp and values, where a file begins with scans that an earlier one has too. */
function twinInEarlierFile(log: Scans, scan: number, instantMs: Float64Array): number | null {
  if (!log.firstOfFile.includes(scan)) return null;
  for (let other = scan - 1; other >= 0; other--) {
    if (log.stampMs[other] === log.stampMs[scan] && areEqual(log, other, scan)) return instantMs[other]!;
  }
  return null;
}

function skipped(log: Scans, zone: Zone, files: readonly string[], scan: number): DomainError {
  const { file, line } = placeOf(log, files, scan);
  const time = wallClock(log.stampMs[scan]!);
  return new DomainError(
    'log-time-skipped',
    `${file}, line ${line}: clocks in ${zone.name} never showed ${time}. ` +
      'If the recorder does not follow summer time, give its zone as an offset, such as +00:00.',
    { file, line, zone: zone.name, time },
  );
}

function ambiguous(log: Scans, zone: Zone, files: readonly string[], scan: number): DomainError {
  const { file, line } = placeOf(log, files, scan);
  const time = wallClock(log.stampMs[scan]!);
  return new DomainError(
    'log-time-ambiguous',
    `${file}, line ${line}: clocks in ${zone.name} showed ${time} twice, and nothing in the log tells which is meant. ` +
      'Give the zone as the offset that held, such as +01:00.',
    { file, line, zone: zone.name, time },
  );
}

function wallClock(localMs: number): string {
  return new Date(localMs).toISOString().slice(0, 19).replace('T', ' ');
}

import type { RunChannel } from './channel.ts';
import type { RunDigest } from './digest.ts';
import type { FaultKind } from './fault-kinds.ts';
import { gapsOf } from './gaps.ts';
import type { Comparison } from './neighbour-watch.ts';

/** A fault a sensor seems to have, the instant it holds from, and the evidence. */
export interface SuspectedFault {
  readonly kind: FaultKind;
  readonly fromMs: number;
  readonly because: string;
}

const AIR_SCANS = 10;
const AIR_RMS = 1.5;
const STEPS = 3;
const OFFSET = 5;
const UNIT_RMS = 3;
const UNIT_RMS_WITHOUT = 10;
const UNUSED_WITHIN = 5;
const UNUSED_NEIGHBOURS_PASS = 50;

/** Faults proposed for each temperature channel, the earliest first. A person decides. */
export function suspectedFaults(digest: RunDigest, longestGapMs: number): Map<RunChannel, SuspectedFault[]> {
  const byChannel = new Map<RunChannel, SuspectedFault[]>();
  for (const watch of digest.watches) {
    for (const comparison of watch.comparisons) {
      const { channel } = comparison;
      const open = openCircuit(digest, channel, longestGapMs);
      const faults = [...(open === null ? [] : [open]), ...comparedFaults(comparison, digest.log.from)];
      faults.sort((a, b) => a.fromMs - b.fromMs);
      if (faults.length > 0) byChannel.set(channel, faults);
    }
  }
  return byChannel;
}

function openCircuit(digest: RunDigest, { track }: RunChannel, longestGapMs: number): SuspectedFault | null {
  for (const gap of gapsOf(track, longestGapMs, digest.log)) {
    if (!gap.isTheSensors) continue;
    const lastReading = track.indexUntil(gap.from);
    const firstAbsent = lastReading < 0 || gap.before === null ? 0 : track.scan(lastReading) + 1;
    const firstBack = gap.after === null ? digest.scanMs.length : track.scan(track.indexFrom(gap.until));
    const fromMs = digest.scanMs.value[firstAbsent]!;
    // Silent while the recorder went on: a stretch without scans is the log's gap, not the sensor's.
    const scannedMs = (firstBack - firstAbsent + 1) * (digest.medianIntervalMs() ?? 0);
    const silentMs = Math.min(gap.until - gap.from, scannedMs);
    if (silentMs <= longestGapMs && track.length > 0) continue;
    return { kind: 'open', fromMs, because: `no reading for ${minutes(silentMs)} min while the recorder went on` };
  }
  return null;
}

function* comparedFaults(c: Comparison, logFromMs: number): Generator<SuspectedFault> {
  if (c.stuck !== null) {
    const { fromMs, reading, readings, medianMoved } = c.stuck;
    const because = `${readings} readings of exactly ${figure(reading)} °C while its neighbours moved ${figure(medianMoved)} °C`;
    yield { kind: 'stuck', fromMs, because };
  }
  if (2 * c.scansFell > c.scansNeighboursRose) {
    const because = `over 5 °C below its start on ${c.scansFell} of the ${c.scansNeighboursRose} scans at which its neighbours had risen over 20 °C`;
    yield { kind: 'reversed', fromMs: logFromMs, because };
  }
  const airRms = Math.sqrt(c.airSquares / c.scansOffAir);
  if (c.scansOffAir >= AIR_SCANS && airRms <= AIR_RMS) {
    const because = `within ${figure(airRms)} °C of the air over ${c.scansOffAir} scans at which its neighbours were over 4 °C away from it`;
    yield { kind: 'follows-air', fromMs: c.offAirFromMs, because };
  }
  if (c.steps >= STEPS) {
    yield {
      kind: 'jumping',
      fromMs: c.firstStepMs,
      because: `${c.steps} steps of over 10 °C from one scan to the next that its neighbours did not make`,
    };
  }
  const coldDifference = c.coldDifferences / c.scansCold;
  if (c.scansCold > 0 && Math.abs(coldDifference) > OFFSET) {
    const because = `${figure(Math.abs(coldDifference))} °C ${coldDifference > 0 ? 'above' : 'below'} its neighbours before heat-on`;
    yield { kind: 'offset', fromMs: logFromMs, because };
  }
  const { scansCompared: n } = c;
  if (n > 0 && Math.sqrt(c.squares / n) > UNIT_RMS_WITHOUT) {
    const fromFahrenheit = Math.sqrt(c.squaresFromFahrenheit / n);
    const fromCelsius = Math.sqrt(c.squaresFromCelsius / n);
    const rms = Math.min(fromFahrenheit, fromCelsius);
    if (rms <= UNIT_RMS) {
      const written = fromFahrenheit < fromCelsius ? '°F taken for °C' : '°C taken for °F';
      yield {
        kind: 'wrong-unit',
        fromMs: logFromMs,
        because: `agrees with its neighbours to ${figure(rms)} °C if it is ${written}`,
      };
    }
  }
  if (n > 0 && c.furthestFromStart <= UNUSED_WITHIN && c.highestMedian > UNUSED_NEIGHBOURS_PASS) {
    const because = `never more than ${figure(c.furthestFromStart)} °C from its start while its neighbours reached ${figure(c.highestMedian)} °C`;
    yield { kind: 'unused', fromMs: logFromMs, because };
  }
}

function minutes(ms: number): string {
  return (ms / 60_000).toFixed(1);
}

function figure(value: number): string {
  return value.toFixed(1);
}

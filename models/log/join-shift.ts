import type { JoinedReadings } from './join-channels.ts';
import { scaledReading } from './readings.ts';

/** How one clock stands against another by what both read, and how well that is told. */
export interface ShiftEvidence {
  /** Added to the later source's instants it makes both agree best, ms; null where nothing better than 0 is told. */
  readonly shiftMs: number | null;
  readonly because: string;
  /** How far the differences scatter about their mean without and with the shift, in `unit`; null: no overlap. */
  readonly scatterWithout: number | null;
  readonly scatterWith: number | null;
  readonly unit: string;
  readonly channels: readonly string[];
  /** Readings compared without a shift. */
  readonly compared: number;
}

/** A channel as both sources read it. */
export interface SharedChannel {
  readonly earlier: JoinedReadings;
  readonly later: JoinedReadings;
}

/** Clocks are set wrong by minutes, by the hour of summer time, or by another zone's offset; not further, ms. */
const FURTHEST_MS = 3 * 3_600_000;
const COARSE_MS = 30_000;
const FINE_MS = 250;
/** Readings of a channel compared at each shift: enough for a rate of heating to show. */
const MOST_COMPARED = 600;
/** A shift is worth proposing where it leaves less than this part of the differences. */
const MOST_LEFT = 0.7;
/** Two minutes beside the best shift the differences have to be so much larger, or the overlap tells nothing. */
const BESIDE_MS = 120_000;
const LEAST_RISE = 1.25;

/**
 * The shift of a later source's clock that makes it agree best with an earlier one on the channels both read.
 *
 * Least squares over the shift: the later readings less the earlier ones, read linearly between their readings, and less
 * each channel's mean difference, because two instruments may read a degree apart all along; first at every 30 s up to
 * 3 h either way, then by halving the step around the best. Only channels of the unit most of them have are compared.
 * It is a proposal: where the overlap is flat or one straight line, or is hardly better for a shift, it is null.
 *
 * @param shared  Channels both read, each in one unit.
 *
 * Accuracy: to 0.25 s of the least-squares optimum; a test measures how near the true shift that is.
 */
export function findShift(shared: readonly SharedChannel[]): ShiftEvidence {
  const unit = mostCommonUnit(shared);
  const used = shared
    .filter(({ earlier }) => earlier.channel.unit === unit)
    .map(({ earlier, later }) => ({ earlier, later: thinned(later) }));
  const at = (shiftMs: number) => misfit(used, shiftMs);
  const without = at(0);
  const channels = used.map(({ earlier }) => earlier.channel.name);
  const told = { scatterWithout: without.scatter, unit, channels, compared: without.compared };
  const best = bestShift(at);
  if (best === null) return { ...told, shiftMs: null, scatterWith: null, because: 'the two do not overlap' };
  const beside = [best.shiftMs - BESIDE_MS, best.shiftMs + BESIDE_MS].map((shiftMs) => at(shiftMs).scatter ?? Infinity);
  const shown = { ...told, scatterWith: best.scatter };
  if (Math.min(...beside) <= LEAST_RISE * best.scatter) {
    return {
      ...shown,
      shiftMs: null,
      because: 'where both read, nothing changes fast enough to tell their clocks apart',
    };
  }
  if (Math.abs(best.shiftMs) < FINE_MS || (without.scatter !== null && best.scatter > MOST_LEFT * without.scatter)) {
    return { ...shown, shiftMs: null, because: 'their clocks agree as well as can be told' };
  }
  const words = `with its clock ${Math.abs(best.shiftMs) / 1000} s ${best.shiftMs > 0 ? 'later' : 'earlier'}`;
  return { ...shown, shiftMs: best.shiftMs, because: `${words} the two agree best` };
}

interface Misfit {
  readonly scatter: number | null;
  readonly compared: number;
}

function bestShift(at: (shiftMs: number) => Misfit): { readonly shiftMs: number; readonly scatter: number } | null {
  const tried: { shiftMs: number; scatter: number; compared: number }[] = [];
  for (let shiftMs = -FURTHEST_MS; shiftMs <= FURTHEST_MS; shiftMs += COARSE_MS) {
    const { scatter, compared } = at(shiftMs);
    if (scatter !== null) tried.push({ shiftMs, scatter, compared });
  }
  const most = tried.reduce((sum, { compared }) => Math.max(sum, compared), 0);
  // A sliver of overlap agrees by chance.
  const [coarse] = tried.filter(({ compared }) => 2 * compared >= most).sort((a, b) => a.scatter - b.scatter);
  if (coarse === undefined) return null;
  let { shiftMs, scatter }: { shiftMs: number; scatter: number } = coarse;
  for (let stepMs = COARSE_MS / 2; stepMs >= FINE_MS / 2; stepMs /= 2) {
    for (const candidate of [shiftMs - stepMs, shiftMs + stepMs]) {
      const tryOut = at(candidate).scatter;
      if (tryOut !== null && tryOut < scatter) [shiftMs, scatter] = [candidate, tryOut];
    }
  }
  return { shiftMs: Math.round(shiftMs / FINE_MS) * FINE_MS, scatter };
}

function misfit(shared: readonly SharedChannel[], shiftMs: number): Misfit {
  let squares = 0;
  let compared = 0;
  for (const { earlier, later } of shared) {
    let next = 0;
    let count = 0;
    let mean = 0;
    for (let i = 0; i < later.timeMs.length; i++) {
      const atMs = later.timeMs[i]! + shiftMs;
      while (next < earlier.timeMs.length && earlier.timeMs[next]! < atMs) next++;
      if (next === 0 || next === earlier.timeMs.length) continue;
      const [fromMs, untilMs] = [earlier.timeMs[next - 1]!, earlier.timeMs[next]!];
      if (untilMs - fromMs > LONGEST_BETWEEN_MS) continue;
      const before = scaledReading(earlier.value[next - 1]!, earlier.channel);
      const after = scaledReading(earlier.value[next]!, earlier.channel);
      const reading = before + ((after - before) * (atMs - fromMs)) / (untilMs - fromMs);
      // Welford's update of mean and squares about it.
      const difference = scaledReading(later.value[i]!, later.channel) - reading;
      const off = difference - mean;
      count += 1;
      mean += off / count;
      squares += off * (difference - mean);
    }
    compared += count;
  }
  return { scatter: compared === 0 ? null : Math.sqrt(squares / compared), compared };
}

/** Across a longer gap nothing is read between, ms. */
const LONGEST_BETWEEN_MS = 120_000;

function thinned(readings: JoinedReadings): JoinedReadings {
  const step = Math.ceil(readings.timeMs.length / MOST_COMPARED);
  if (step <= 1) return readings;
  const isTaken = (_: number, n: number) => n % step === 0;
  const { channel, timeMs, value, source } = readings;
  return {
    channel,
    timeMs: timeMs.filter(isTaken),
    value: value.filter(isTaken),
    source: source.filter(isTaken),
  };
}

function mostCommonUnit(shared: readonly SharedChannel[]): string {
  const times = new Map<string, number>();
  for (const { earlier } of shared) times.set(earlier.channel.unit, (times.get(earlier.channel.unit) ?? 0) + 1);
  return [...times].sort((a, b) => b[1] - a[1])[0]?.[0] ?? '';
}

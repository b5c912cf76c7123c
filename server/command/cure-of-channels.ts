import { beginCure, type CureProgress } from '../../models/cure/cure-progress.ts';
import { glassTransitionK } from '../../models/cure/glass-transition.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { uncertaintyAlong, type WithUncertainty } from '../../models/cure/uncertainty-along.ts';
import { DomainError } from '../../models/errors.ts';
import type { Interval } from '../../models/evaluation/evaluation.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { type ChannelReadings, type Readings, scaledReading } from '../../models/log/readings.ts';
import { temperaturesOfEmf } from '../../models/log/temperatures-of-emf.ts';
import {
  celsiusDifferenceFrom,
  celsiusFrom,
  celsiusFromKelvin,
  isTemperatureUnit,
  kelvinFromCelsius,
} from '../../models/units.ts';

/** Estimated cure along one channel. */
export interface ChannelCure {
  readonly channel: string;
  readonly degree: number;
  readonly tgC: number | null;
  readonly gelAt: string | null;
  readonly vitrifiesAt: string | null;
  /** Coverage intervals (k = 2); null where `intervalBecause` says why, or where the figure is on one side only. */
  readonly degreeInterval: Interval | null;
  readonly tgIntervalC: Interval | null;
  readonly gelInterval: readonly [string, string] | null;
  /** What the intervals were worked out from, or why there are none. */
  readonly intervalBecause: string;
  /** Seconds spent outside the range the resin set is valid in. */
  readonly outsideValidS: number;
  readonly series?: { readonly t: string[]; readonly degree: number[]; readonly tgC: (number | null)[] };
}

/** A command has the time: degrees to 1e-10 and instants to the millisecond that they are written with. */
const TIGHT = 1e-11;

/** Cure along every part and tool channel; where one has no reading at all it is left out. */
export function cureOfChannels(readings: Readings, resin: Resin, everyS: number | null): ChannelCure[] {
  return temperaturesOfEmf(readings)
    .channels.filter(({ channel }) => channel.role === 'part' || channel.role === 'tool')
    .flatMap((one) => naming(one.channel.name, () => cureOfChannel(readings.timeMs, one, resin, everyS)) ?? []);
}

/** A refusal on the way, that of a set that stalls or runs backwards, with the channel it came along. */
function naming<T>(channel: string, work: () => T): T {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(
      error.code,
      `Along ${channel}: ${error.message}`,
      { ...error.facts, channel },
      { cause: error },
    );
  }
}

function cureOfChannel(
  timeMs: Float64Array,
  readings: ChannelReadings,
  resin: Resin,
  everyS: number | null,
): ChannelCure | null {
  const scans = presentScans(timeMs, readings);
  const beginsMs = scans[0]?.atMs;
  if (beginsMs === undefined) return null;
  const progress = beginCure(resin, { tolerance: TIGHT });
  const series = everyS === null ? null : new Series(beginsMs, everyS * 1000, resin);
  let last: Scan | null = null;
  for (const scan of scans) {
    if (last !== null) series?.fillBefore(progress, last, scan);
    progress.accept((scan.atMs - beginsMs) / 1000, scan.temperatureK);
    series?.fillAt(progress, scan);
    last = scan;
  }
  const tgK = progress.tgK();
  const at = (timeS: number) => new Date(beginsMs + Math.round(timeS * 1000)).toISOString();
  const instant = (timeS: number | null) => (timeS === null ? null : at(timeS));
  return {
    channel: readings.channel.name,
    degree: progress.alpha(),
    tgC: tgK === null ? null : celsiusFromKelvin(tgK),
    gelAt: instant(progress.gelS),
    vitrifiesAt: instant(progress.vitrifiesS),
    ...intervalsOf(scans, beginsMs, readings.channel, resin, at),
    outsideValidS: progress.outsideValidS,
    ...(series === null ? {} : { series: series.written }),
  };
}

function intervalsOf(
  scans: readonly Scan[],
  beginsMs: number,
  { name, unit, uncertainty }: ChannelLayout,
  resin: Resin,
  at: (timeS: number) => string,
): Pick<ChannelCure, 'degreeInterval' | 'tgIntervalC' | 'gelInterval' | 'intervalBecause'> {
  if (uncertainty === undefined || !isTemperatureUnit(unit)) {
    const intervalBecause = `no uncertainty of ${name} is on record`;
    return { degreeInterval: null, tgIntervalC: null, gelInterval: null, intervalBecause };
  }
  const temperatureUncertaintyK = celsiusDifferenceFrom(uncertainty, unit);
  const { degree, tgK, gelS } = uncertaintyAlong(
    Float64Array.from(scans, ({ atMs }) => (atMs - beginsMs) / 1000),
    Float64Array.from(scans, ({ temperatureK }) => temperatureK),
    resin,
    { temperatureUncertaintyK },
  );
  const gel = intervalAbout(gelS);
  return {
    degreeInterval: intervalAbout(degree),
    tgIntervalC: intervalAbout(tgK && { ...tgK, value: celsiusFromKelvin(tgK.value) }),
    gelInterval: gel && [at(gel[0]), at(gel[1])],
    intervalBecause:
      `k = 2, from U ${uncertainty} ${unit} of ${name}` +
      (resin.covariance === undefined
        ? '; the set gives no covariance of its constants'
        : ' and the covariance of the constants'),
  };
}

function intervalAbout(figure: WithUncertainty | null): Interval | null {
  return figure === null || figure.expanded === null
    ? null
    : [figure.value - figure.expanded, figure.value + figure.expanded];
}

interface Scan {
  readonly atMs: number;
  readonly temperatureK: number;
}

/** Absent readings are left out: between its neighbours the temperature runs straight. */
function presentScans(timeMs: Float64Array, { channel, value }: ChannelReadings): Scan[] {
  const { unit } = channel;
  if (!isTemperatureUnit(unit)) return [];
  const scans: Scan[] = [];
  value.forEach((figure, n) => {
    if (Number.isNaN(figure)) return;
    const temperatureK = kelvinFromCelsius(celsiusFrom(scaledReading(figure, channel), unit));
    scans.push({ atMs: timeMs[n] ?? Number.NaN, temperatureK });
  });
  return scans;
}

/** Figures at even instants, the channel's first scan being the first. */
class Series {
  readonly written = { t: [] as string[], degree: [] as number[], tgC: [] as (number | null)[] };
  readonly #beginsMs: number;
  readonly #everyMs: number;
  readonly #resin: Resin;

  constructor(beginsMs: number, everyMs: number, resin: Resin) {
    this.#beginsMs = beginsMs;
    this.#everyMs = everyMs;
    this.#resin = resin;
  }

  /** The instants between two scans, the temperature running straight from one to the other. */
  fillBefore(progress: CureProgress, last: Scan, next: Scan): void {
    for (let atMs = this.#nextMs(); atMs < next.atMs; atMs = this.#nextMs()) {
      const share = (atMs - last.atMs) / (next.atMs - last.atMs);
      const temperatureK = last.temperatureK + share * (next.temperatureK - last.temperatureK);
      this.#write(atMs, progress.alphaAt((atMs - this.#beginsMs) / 1000, temperatureK));
    }
  }

  fillAt(progress: CureProgress, scan: Scan): void {
    if (this.#nextMs() === scan.atMs) this.#write(scan.atMs, progress.alpha());
  }

  #nextMs(): number {
    return this.#beginsMs + this.written.t.length * this.#everyMs;
  }

  #write(atMs: number, degree: number): void {
    const { glassTransition } = this.#resin;
    this.written.t.push(new Date(atMs).toISOString());
    this.written.degree.push(degree);
    this.written.tgC.push(
      glassTransition === undefined ? null : celsiusFromKelvin(glassTransitionK(degree, glassTransition)),
    );
  }
}

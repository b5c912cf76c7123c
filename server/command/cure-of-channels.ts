import { beginCure, type CureProgress } from '../../models/cure/cure-progress.ts';
import { glassTransitionK } from '../../models/cure/glass-transition.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { type ChannelReadings, type Readings, scaledReading } from '../../models/log/readings.ts';
import { celsiusFrom, celsiusFromKelvin, isTemperatureUnit, kelvinFromCelsius } from '../../models/units.ts';

/** Estimated cure along one channel. */
export interface ChannelCure {
  readonly channel: string;
  readonly degree: number;
  readonly tgC: number | null;
  readonly gelAt: string | null;
  readonly vitrifiesAt: string | null;
  /** Seconds spent outside the range the resin set is valid in. */
  readonly outsideValidS: number;
  readonly series?: { readonly t: string[]; readonly degree: number[]; readonly tgC: (number | null)[] };
}

/** Cure along every part and tool channel; where one has no reading at all it is left out. */
export function cureOfChannels(readings: Readings, resin: Resin, everyS: number | null): ChannelCure[] {
  return readings.channels
    .filter(({ channel }) => channel.role === 'part' || channel.role === 'tool')
    .flatMap((one) => cureOfChannel(readings.timeMs, one, resin, everyS) ?? []);
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
  const progress = beginCure(resin);
  const series = everyS === null ? null : new Series(beginsMs, everyS * 1000, resin);
  let last: Scan | null = null;
  for (const scan of scans) {
    if (last !== null) series?.fillBefore(progress, last, scan);
    progress.accept((scan.atMs - beginsMs) / 1000, scan.temperatureK);
    series?.fillAt(progress, scan);
    last = scan;
  }
  const tgK = progress.tgK();
  const instant = (timeS: number | null) =>
    timeS === null ? null : new Date(beginsMs + Math.round(timeS * 1000)).toISOString();
  return {
    channel: readings.channel.name,
    degree: progress.alpha(),
    tgC: tgK === null ? null : celsiusFromKelvin(tgK),
    gelAt: instant(progress.gelS),
    vitrifiesAt: instant(progress.vitrifiesS),
    outsideValidS: progress.outsideValidS,
    ...(series === null ? {} : { series: series.written }),
  };
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

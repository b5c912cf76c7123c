import { figuresFor } from '../run/calibrated-load.ts';
import type { RunDigest } from '../run/digest.ts';
import type { InstrumentRecords } from '../run/instrument-records.ts';
import { say } from './finding.ts';

/** What of the calibrations on record the readings were judged with, one sentence a channel. */
export function calibrationSentences({ channels, load }: RunDigest, records: InstrumentRecords | null): string[] {
  const layouts = channels.map(({ layout }) => layout);
  return (records?.channels ?? []).flatMap((record) => {
    const { calibration, channel: name, instrument } = record;
    const layout = layouts.find((one) => one.name === name);
    const figures = layout === undefined ? null : figuresFor(record, layout, layouts);
    if (calibration === null || layout === undefined || figures === null) return [];
    const sensor = load?.sensors.find(({ channel }) => channel === name);
    // Where the load names its own, the record's are not what it was judged with.
    const isCorrected = figures.corrections !== undefined && isSame(sensor?.corrections, figures.corrections);
    const isKnown = figures.uncertainty !== undefined && sensor?.uncertainty === figures.uncertainty;
    if (!isCorrected && !isKnown) return [];
    const certificate = calibration.certificate === null ? '' : `, certificate ${calibration.certificate}`;
    const corrections = figures.corrections?.map(([at, by]) => `${signed(by)} at ${say(at)} ${layout.unit}`).join(', ');
    const told = [
      ...(isCorrected ? [`corrected by ${corrections}`] : []),
      ...(isKnown ? [`U = ${say(figures.uncertainty ?? 0, 2)} ${layout.unit} (k = 2)`] : []),
    ];
    return [`${name} was read by ${instrument}, calibrated on ${calibration.done}${certificate}: ${told.join('; ')}.`];
  });
}

function signed(figure: number): string {
  return figure > 0 ? `+${say(figure, 2)}` : say(figure, 2);
}

function isSame(one: unknown, other: unknown): boolean {
  return JSON.stringify(one) === JSON.stringify(other);
}

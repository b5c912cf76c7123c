import { runInstrumentsPath } from '../../server/contract/instrument-paths.ts';
import type { RunInstruments as View } from '../../server/contract/instruments.ts';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { pointsWords } from '../words/instruments.ts';

/** Which instrument read each channel, and by which calibration; nothing where none is on record. */
export function RunInstruments({ run }: { run: number }) {
  const { value } = useRead<View>(runInstrumentsPath(run));
  if (value === null || value.channels.length === 0) return null;
  return (
    <details class="section">
      <summary>Instruments, and the calibrations that held on the day</summary>
      <ul>
        {value.channels.map((one) => (
          <li key={one.channel}>
            {one.channel}: <a href={`/instruments/${encodeURIComponent(one.instrument)}`}>{one.instrument}</a>,{' '}
            {heldWords(one)}.
          </li>
        ))}
      </ul>
    </details>
  );
}

function heldWords({ calibration, ranOut, replacedBy }: View['channels'][number]): string {
  const gone = replacedBy === null ? '' : `; it gave its place to ${replacedBy} during the run`;
  if (calibration === null) {
    return `${ranOut === null ? 'no calibration on record' : `out of date, its calibration ran out on ${ranOut}`}${gone}`;
  }
  const { done, until, certificate, unit, points, uncertainty } = calibration;
  const known = [
    `calibrated on ${done}, good until ${until}`,
    ...(certificate === null ? [] : [`certificate ${certificate}`]),
    pointsWords(points, unit),
    ...(uncertainty === null ? [] : [`U = ${asWritten(uncertainty)} ${unit} (k = 2)`]),
  ];
  return `${known.join(', ')}${gone}`;
}

import { clockTimeIn } from '../../../models/chart/clock-time.ts';
import type { Evaluation } from '../../../models/evaluation/evaluation.ts';
import type { Forecast } from '../../../models/forecast/forecast.ts';

const MINUTE_MS = 60_000;

/** The one line of a run that is read at a distance: of the part that is furthest behind. */
export function saysOf(evaluation: Evaluation | null, forecasts: readonly Forecast[], zone: string): string {
  if (evaluation === null) return 'no load or no cycle is on record yet';
  const broken = evaluation.parts.flatMap(({ findings }) => findings).find(({ outcome }) => outcome === 'not-met');
  const told = slowest(forecasts);
  const where = told === undefined ? 'before heat-on' : inWords(told, zone);
  return broken === undefined ? where : `${broken.limit} not met · ${where}`;
}

function slowest(forecasts: readonly Forecast[]): Forecast | undefined {
  const begun = forecasts.filter(({ stage }) => stage !== null);
  return begun.toSorted((a, b) => endOf(b) - endOf(a))[0];
}

/** Where an end cannot be told it counts as the latest. */
function endOf({ dwell, entry }: Forecast): number {
  const instant = dwell === null ? entry?.expectedAt : dwell.notBefore;
  return instant === null || instant === undefined ? Number.MAX_VALUE : Date.parse(instant);
}

function inWords({ stage, dwell, entry }: Forecast, zone: string): string {
  const name = stage?.name ?? '';
  if (dwell !== null) {
    if (dwell.notBefore === null) return `${name} · ${dwell.because}`;
    const left = Math.ceil(dwell.minutesLeft - 1e-9);
    return left === 0
      ? `${name} · its least time is counted`
      : `${name} · ${left} min left, not before ${roundedUp(dwell.notBefore, zone)}${dwell.by === null ? '' : `, by ${dwell.by}`}`;
  }
  if (entry === null) return name;
  return entry.expectedAt === null
    ? `${name} · ${entry.because}`
    : `${name} · ${entry.by} expected in ${entry.dwell} at ${roundedUp(entry.expectedAt, zone)}`;
}

/** A minute is told only once it has wholly passed. */
function roundedUp(instant: string, zone: string): string {
  return clockTimeIn(zone).minute(Math.ceil(Date.parse(instant) / MINUTE_MS) * MINUTE_MS);
}

import type { DwellStage, Stage } from '../../models/cycle/cycle.ts';
import { type JudgementInputs, judge } from '../../models/evaluation/judge.ts';
import type { Forecast } from '../../models/forecast/forecast.ts';
import { forecastsOf } from '../../models/forecast/forecasts-of.ts';
import { foldReadings } from '../../models/run/digest.ts';
import { cycleOf, dwell, type MadeRun, readingsOf, type Vertex } from './made-run.ts';

export const HEAT: Stage = { name: 'heat-up 1', kind: 'heat' };
export const HOLD = (more: Partial<DwellStage> = {}) =>
  dwell({ name: 'dwell 1', target: 110, time: { atLeast: 60 }, ...more });
export const HOUR = cycleOf([HEAT, HOLD()]);

// All expected figures below are read off the straight lines by hand.
export const RAMP: MadeRun = {
  // TC1 at 2 °C/min enters 105 °C at minute 42.5, TC2 at 1.7 °C/min at minute 50.
  channels: {
    TC1: [
      [0, 20],
      [45, 110],
      [200, 110],
    ],
    TC2: [
      [0, 20],
      [52.94117647058823, 110],
      [200, 110],
    ],
  },
  cycle: HOUR,
};

function linesUntil(minutes: number, lines: readonly Vertex[]): Vertex[] {
  const after = lines.findIndex(([at]) => at >= minutes);
  if (after < 0) return [...lines];
  const [t1, v1] = lines[after]!;
  const [t0, v0] = lines[Math.max(0, after - 1)]!;
  const at = t1 === t0 ? v1 : v0 + ((v1 - v0) * (minutes - t0)) / (t1 - t0);
  return [...lines.slice(0, after), [minutes, at]];
}

/** The run as it stood so many minutes after its start: judged as open, and what is foretold. */
export function at(
  minutes: number,
  run: MadeRun,
  believed?: readonly string[],
): { forecast: Forecast; outcome: string | null } {
  const channels = Object.fromEntries(
    Object.entries(run.channels).map(([name, channel]) => [
      name,
      'history' in channel
        ? { ...channel, history: linesUntil(minutes, channel.history) }
        : linesUntil(minutes, channel),
    ]),
  );
  const inputs: JudgementInputs = {
    cycle: run.cycle,
    load: null,
    resin: run.resin ?? null,
    exclusions: run.exclusions ?? [],
    believed: believed ?? Object.keys(run.channels),
    barometer: null,
    open: true,
  };
  const digest = foldReadings(readingsOf({ ...run, channels }).readings, null);
  const evaluation = judge(digest, inputs);
  const [forecast] = forecastsOf(digest, inputs, evaluation);
  const time = evaluation.parts[0]!.findings.find(({ limit }) => limit === 'dwell 1/time');
  return { forecast: forecast!, outcome: time?.outcome ?? null };
}

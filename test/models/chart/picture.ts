import { join } from 'node:path';
import type { RunChart } from '../../../models/chart/chart.ts';
import type { ChartInputs } from '../../../models/chart/chart-inputs.ts';
import { chartOfRun } from '../../../models/chart/chart-of-run.ts';
import type { Evaluation } from '../../../models/evaluation/evaluation.ts';
import { parseBarometer } from '../../../models/run/parse-load.ts';
import { openRecordedRun } from '../../support/recorded-run.ts';

/** A recorded run with its evaluation, as the chart is given it. */
export interface Pictured {
  readonly inputs: ChartInputs;
  readonly evaluation: Evaluation;
  readonly chart: RunChart;
}

/** The chart of a recorded run's first part, or with other inputs. */
export function picture(name: string, changes: Partial<ChartInputs> = {}): Pictured {
  const run = openRecordedRun(join(import.meta.dirname, '../../golden/recorded', name));
  const { readings } = run.read();
  const evaluation = run.judge();
  const { cycle, load, barometer } = run.inputs;
  const inputs: ChartInputs = {
    ...{ readings, cycle, load, evaluation, zone: 'Europe/Lisbon' },
    part: evaluation.parts[0] ?? null,
    barometerPa: barometer === null ? null : parseBarometer(barometer),
    ...changes,
  };
  return { inputs, evaluation, chart: chartOfRun(inputs) };
}

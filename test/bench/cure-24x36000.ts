import { cureAlong } from '../../models/cure/cure-along.ts';
import { beginCure } from '../../models/cure/cure-progress.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { kelvinFromCelsius } from '../../models/units.ts';
import { exponentialsOf, kineticsByLaw, practiceResin, resinOf } from './laws.ts';
import { type BenchResult, medianMs } from './result.ts';
import { THERMOCOUPLES, tenHourRun } from './ten-hour-run.ts';

const ROUNDS = 9;
const MOST_RATIO = 3;
const MOST_ERROR = 1e-6;
const MOST_SCAN_US = 50;
const LIVE_SCANS = 2000;

interface Histories {
  readonly timeS: Float64Array;
  readonly temperatureK: readonly Float64Array[];
}

/** Degree of cure of 24 thermocouples at each of 36 000 readings; floor: one Math.exp for each exponential of the law. */
export async function benchCure(): Promise<BenchResult[]> {
  const histories = tenHourHistories();
  // As in a program that has judged several resins: compiled for all laws before any is measured.
  for (let round = 0; round < 3; round += 1) {
    for (const resin of [practiceResin, ...kineticsByLaw.map(resinOf)]) {
      for (const history of histories.temperatureK.slice(0, 4)) cureAlong(histories.timeS, history, resin);
    }
    await new Promise((resolve) => setTimeout(resolve, 300));
  }
  const laws = kineticsByLaw.map((kinetics) =>
    benchResin(`cure-24x36000/${kinetics.law}`, resinOf(kinetics), histories),
  );
  return [benchResin('cure-24x36000', practiceResin, histories), ...laws];
}

/** One more scan on 24 thermocouples, late in a run: the degree, and what came of gel and vitrification. */
export async function benchIncremental(): Promise<BenchResult[]> {
  const { timeS, temperatureK } = tenHourHistories();
  const before = timeS.length - LIVE_SCANS;
  const followed = temperatureK.map((history) => {
    const progress = beginCure(practiceResin);
    for (let i = 0; i < before; i += 1) progress.accept(timeS[i]!, history[i]!);
    return progress;
  });
  let degrees = 0;
  const taken = Array.from({ length: LIVE_SCANS }, (_, n) => {
    const startMs = performance.now();
    for (const [channel, progress] of followed.entries()) {
      progress.accept(timeS[before + n]!, temperatureK[channel]![before + n]!);
      degrees += progress.alpha();
    }
    return (performance.now() - startMs) * 1000;
  }).sort((a, b) => a - b);
  const value = taken[LIVE_SCANS / 2]!;
  return [
    {
      name: 'incremental',
      value,
      unit: 'µs',
      floor: null,
      ratio: null,
      goal: `≤ ${MOST_SCAN_US} µs`,
      holds: value <= MOST_SCAN_US && degrees > 0,
      note: `1 in 100 takes longer than ${taken[Math.floor(LIVE_SCANS * 0.99)]!.toFixed(0)} µs`,
    },
  ];
}

function benchResin(name: string, resin: Resin, { timeS, temperatureK }: Histories): BenchResult {
  const exponentials = exponentialsOf(resin.kinetics);
  const work = () => {
    for (const history of temperatureK) cureAlong(timeS, history, resin);
  };
  work();
  const floor = medianMs(ROUNDS, () => addExponentials(temperatureK, exponentials));
  const value = medianMs(ROUNDS, work);
  const error = greatestError(resin, { timeS, temperatureK });
  const hasGoal = resin.kinetics.law !== 'isoconversional';
  return {
    name,
    value,
    unit: 'ms',
    floor,
    ratio: value / floor,
    goal: hasGoal ? `ratio ≤ ${MOST_RATIO}, error ≤ ${MOST_ERROR}` : `none for speed, error ≤ ${MOST_ERROR}`,
    holds: (value / floor <= MOST_RATIO || !hasGoal) && error <= MOST_ERROR,
    note:
      `greatest error in degree ${error.toExponential(1)} against tolerance 1e-11; floor of ${exponentials} ` +
      `Math.exp a reading${resin.diffusion === undefined ? '' : ', that of the diffusion factor not counted'}`,
  };
}

/** At any reading of the leading and the lagging thermocouple. */
function greatestError(resin: Resin, { timeS, temperatureK }: Histories): number {
  let greatest = 0;
  for (const history of [temperatureK[0]!, temperatureK.at(-1)!]) {
    const { alpha } = cureAlong(timeS, history, resin);
    const exact = cureAlong(timeS, history, resin, { tolerance: 1e-11 }).alpha;
    for (let i = 0; i < alpha.length; i += 1) greatest = Math.max(greatest, Math.abs(alpha[i]! - exact[i]!));
  }
  return greatest;
}

function addExponentials(temperatureK: readonly Float64Array[], exponentials: number): void {
  let sum = 0;
  for (let term = 0; term < exponentials; term += 1) {
    const energyK = 7100 + 300 * term;
    for (const history of temperatureK) {
      for (let i = 0; i < history.length; i += 1) sum += Math.exp(-energyK / history[i]!);
    }
  }
  if (!(sum > 0)) throw new Error('the floor was not measured');
}

function tenHourHistories(): Histories {
  const { timeMs, channels } = tenHourRun();
  return {
    timeS: timeMs.map((ms) => (ms - timeMs[0]!) / 1000),
    temperatureK: channels.slice(0, THERMOCOUPLES).map(({ value }) => value.map(kelvinFromCelsius)),
  };
}

import { evaluateLog, type JudgementInputs, judge } from '../../models/evaluation/judge.ts';
import type { Readings, ReadLog } from '../../models/log/readings.ts';
import { beginRun, type RunDigest } from '../../models/run/digest.ts';
import { type BenchResult, medianMs } from './result.ts';
import { fullCycle, SCANS, tenHourRun } from './ten-hour-run.ts';

const LIVE_SCANS = 101;

/** A whole run against a full cycle; floor: one pass that only sums its readings. Goal: half a second. */
export async function benchEvaluate(): Promise<BenchResult[]> {
  const log: ReadLog = { readings: tenHourRun(), repairs: [], passedOver: [] };
  const inputs = { cycle: fullCycle(), load: null, resin: null, exclusions: [], barometer: null, open: false };
  const floor = medianMs(5, () => {
    let sum = 0;
    for (const { value } of log.readings.channels) for (const reading of value) sum += reading;
    if (Number.isNaN(sum)) throw new Error('the run has no absent readings');
  });
  let verdict = '';
  const wholeMs = medianMs(5, () => {
    verdict = evaluateLog(log, inputs).verdict;
  });
  const half: ReadLog = { ...log, readings: firstScans(log, SCANS / 2) };
  const halfMs = medianMs(5, () => evaluateLog(half, inputs));
  return [
    {
      name: 'evaluate-24x36000',
      value: wholeMs,
      unit: 'ms',
      floor,
      ratio: wholeMs / floor,
      goal: '≤ 500 ms',
      holds: wholeMs <= 500,
      note: `${verdict}; the first half alone takes ${halfMs.toFixed(0)} ms`,
    },
    benchLive(log, inputs),
  ];
}

/** One more scan on an open run, late in it; floor: the same on the same run logged ten times more seldom. */
function benchLive(log: ReadLog, inputs: JudgementInputs): BenchResult {
  const seldom = everyTenth(log.readings);
  const floor = scanCostMs(seldom, inputs);
  const value = scanCostMs(log.readings, inputs);
  return {
    name: 'evaluate-live',
    value,
    unit: 'ms',
    floor,
    ratio: value / floor,
    goal: 'ratio ≤ 1.5: no dearer on 36 000 scans than on 3 600',
    holds: value / floor <= 1.5,
  };
}

function scanCostMs(readings: Readings, inputs: JudgementInputs): number {
  const digest = beginRun(
    readings.channels.map(({ channel }) => channel),
    null,
  );
  const open = { ...inputs, open: true };
  const scans = readings.timeMs.length - LIVE_SCANS;
  for (let scan = 0; scan < scans; scan++) accept(digest, readings, scan);
  judge(digest, open);
  let scan = scans;
  return medianMs(LIVE_SCANS, () => {
    accept(digest, readings, scan++);
    judge(digest, open);
  });
}

function accept(digest: RunDigest, { timeMs, channels }: Readings, scan: number): void {
  digest.accept(
    timeMs[scan]!,
    channels.map(({ value }) => value[scan]!),
  );
}

function everyTenth({ timeMs, channels }: Readings): Readings {
  return {
    timeMs: timeMs.filter((_, i) => i % 10 === 0),
    channels: channels.map(({ channel, value }) => ({ channel, value: value.filter((_, i) => i % 10 === 0) })),
  };
}

function firstScans({ readings }: ReadLog, scans: number): Readings {
  return {
    timeMs: readings.timeMs.subarray(0, scans),
    channels: readings.channels.map(({ channel, value }) => ({ channel, value: value.subarray(0, scans) })),
  };
}

import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import type { ReadLog } from '../../../models/log/readings.ts';
import type { PlannedRun } from '../../../server/practice/plan-run.ts';
import { PLANNED_RUNS } from '../../../server/practice/plan-runs.ts';
import { simulationOf } from '../../../server/practice/simulation-of-run.ts';
import { seedFrom } from '../../../server/practice/simulator/random.ts';
import { type SimulatedRun, simulateRun } from '../../../server/practice/simulator/simulate-run.ts';

function simulate(planned: PlannedRun): SimulatedRun {
  return simulateRun(simulationOf(planned), seedFrom(planned.run));
}

function read({ files, layout }: SimulatedRun): ReadLog {
  return readLog(
    files.map(({ name, bytes }) => ({ name, chunks: [bytes] })),
    layout,
  );
}

const runs = PLANNED_RUNS.map((planned) => {
  const run = simulate(planned);
  return { planned, run, log: read(run) };
});

function find(name: string) {
  return runs.find(({ planned }) => planned.run === name)!;
}

describe('the files of the practice workshop', () => {
  it('are read by their recorder’s layout, scan for scan at the instants they were taken', () => {
    for (const { planned, run, log } of runs) {
      const { timeMs } = log.readings;
      const isStopped = planned.recorderMishaps?.some(({ kind }) => kind === 'stops' || kind === 'last-line-cut');
      const lastMs = run.truth.history.startMs + (run.truth.history.count - 1) * run.truth.history.stepS * 1000;
      expect(timeMs[0], planned.run).toBe(Date.parse(planned.startsAt));
      if (!isStopped) expect(lastMs - timeMs.at(-1)!, planned.run).toBeLessThan(60_000);
      expect(lastMs - timeMs.at(-1)!, planned.run).toBeGreaterThanOrEqual(0);
    }
  });

  it('hold what the thermocouples felt, within noise and resolution', () => {
    for (const { planned, run, log } of runs) {
      if (planned.faults !== undefined || planned.corrections !== undefined) continue;
      const { history, channels } = run.truth;
      const { channel, value } = log.readings.channels.find((one) => one.channel.name === channels[0])!;
      for (let n = 0; n < value.length; n += 37) {
        const step = Math.round((log.readings.timeMs[n]! - history.startMs) / (history.stepS * 1000));
        const feltC = history.junctionC[0]![step]!;
        const felt = channel.unit === '°F' ? feltC * 1.8 + 32 : feltC;
        expect(Math.abs(value[n]! - felt), `${planned.run} scan ${n}`).toBeLessThan(1.9);
      }
    }
  });

  it('need the repairs that their recorders’ mishaps ask for, and no others', () => {
    const repaired = runs.flatMap(({ planned, log }) => log.repairs.map(({ kind }) => `${planned.run} ${kind}`));
    expect(new Set(repaired)).toEqual(
      new Set(['A1-0226 scan-left-out', 'A1-0241 clock-set-back', 'O2-0505 repeated-hour']),
    );
    expect(find('A1-0223').log.passedOver.map(({ kind }) => kind)).toContain('truncated-last-line');
  });

  it('are the same bytes from the same plan and seed, and others from another seed', () => {
    const { planned, run } = find('A1-0222');
    const again = simulate(planned);
    expect(again.files).toEqual(run.files);
    const other = simulateRun(simulationOf(planned), 1 + seedFrom(planned.run));
    expect(Buffer.compare(Buffer.from(other.files[0]!.bytes), Buffer.from(run.files[0]!.bytes))).not.toBe(0);
  });
});

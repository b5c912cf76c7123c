import type { History } from './history.ts';

/** The same history with `times` as many steps, straight between those it was played in. */
export function refineHistory(history: History, times: number): History {
  if (times === 1) return history;
  const count = (history.count - 1) * times + 1;
  const finer = (row: Float64Array) => {
    const fine = new Float64Array(count);
    for (let i = 0; i < count; i++) {
      const at = Math.floor(i / times);
      const here = row[at]!;
      const next = row[Math.min(at + 1, history.count - 1)]!;
      fine[i] = here + (next - here) * (i / times - at);
    }
    return fine;
  };
  return {
    startMs: history.startMs,
    stepS: history.stepS / times,
    count,
    airC: finer(history.airC),
    setpointC: finer(history.setpointC),
    gaugeBar: finer(history.gaugeBar),
    junctionC: history.junctionC.map(finer),
    degree: history.degree.map(finer),
    vacuumBar: history.vacuumBar.map(finer),
  };
}

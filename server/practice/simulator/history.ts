import type { BagState } from './bag-line.ts';
import type { PointState } from './point.ts';

/** What really happened, step by step: no noise, no instrument. Temperatures in °C, pressures in bar. */
export interface History {
  readonly startMs: number;
  readonly stepS: number;
  readonly count: number;
  readonly airC: Float64Array;
  readonly setpointC: Float64Array;
  /** Vessel, gauge. */
  readonly gaugeBar: Float64Array;
  /** By thermocouple. */
  readonly junctionC: readonly Float64Array[];
  readonly degree: readonly Float64Array[];
  /** By bag line, below ambient. */
  readonly vacuumBar: readonly Float64Array[];
}

interface Moment {
  readonly airC: number;
  readonly setpointC: number;
  readonly gaugeBar: number;
  readonly points: readonly PointState[];
  readonly bags: readonly BagState[];
}

export interface OpenHistory extends History {
  record(n: number, moment: Moment): void;
}

export function createHistory(
  setup: { startMs: number; stepS: number; points: readonly unknown[]; lines: readonly unknown[] },
  most: number,
): OpenHistory {
  const row = () => new Float64Array(most);
  const history = {
    startMs: setup.startMs,
    stepS: setup.stepS,
    count: most,
    airC: row(),
    setpointC: row(),
    gaugeBar: row(),
    junctionC: setup.points.map(row),
    degree: setup.points.map(row),
    vacuumBar: setup.lines.map(row),
  };
  const record = (n: number, moment: Moment): void => {
    history.airC[n] = moment.airC;
    history.setpointC[n] = moment.setpointC;
    history.gaugeBar[n] = moment.gaugeBar;
    for (const [i, point] of moment.points.entries()) {
      history.junctionC[i]![n] = point.junctionC;
      history.degree[i]![n] = point.degree;
    }
    for (const [i, bag] of moment.bags.entries()) history.vacuumBar[i]![n] = bag.vacuumBar;
  };
  return { ...history, record };
}

/** The first `count` moments. */
export function cutHistory(history: History, count: number): History {
  const cut = (row: Float64Array) => row.subarray(0, count);
  return {
    startMs: history.startMs,
    stepS: history.stepS,
    count,
    airC: cut(history.airC),
    setpointC: cut(history.setpointC),
    gaugeBar: cut(history.gaugeBar),
    junctionC: history.junctionC.map(cut),
    degree: history.degree.map(cut),
    vacuumBar: history.vacuumBar.map(cut),
  };
}

import type { DwellStage } from '../cycle/cycle.ts';
import { type ClockCourse, clockedDwells } from './clock.ts';
import type { DwellCourse, Shift } from './dwell-course.ts';
import { type DwellTime, dwellTime } from './dwell-time.ts';
import type { Fill } from './holding.ts';
import type { Judgement } from './judgement.ts';

/** One dwell under one shift of its band, gaps filled one way. */
export interface WorkedDwell {
  readonly course: DwellCourse;
  readonly clock: ClockCourse;
  readonly time: DwellTime;
}

/** The dwells of a cycle, worked out once for each shift and fill that a limit asks for. */
export class Dwells {
  readonly stages: readonly DwellStage[];
  /** Shifts of the band that a guarded decision compares; only "as written" where no uncertainty is known. */
  readonly shifts: readonly Shift[];
  readonly #j: Judgement;
  readonly #worked = new Map<string, readonly WorkedDwell[]>();

  constructor(j: Judgement) {
    this.#j = j;
    this.stages = j.cycle.stages.filter((stage) => stage.kind === 'dwell');
    this.shifts = j.sensors.some(({ uncertaintyC }) => uncertaintyC > 0) ? [0, 1, -1] : [0];
  }

  at(index: number, fill: Fill, shift: Shift = 0): WorkedDwell {
    const key = `${shift}${fill}`;
    let worked = this.#worked.get(key);
    if (worked === undefined) {
      worked = clockedDwells(this.#j, shift, fill).map(({ course, clock }) => ({
        course,
        clock,
        time: dwellTime(this.#j, course, clock),
      }));
      this.#worked.set(key, worked);
    }
    return worked[index]!;
  }

  /** Opening of a dwell; null where it never opened, or where its clock closed first. */
  opensMs(index: number, fill: Fill): number | null {
    const { clock } = this.at(index, fill);
    return clock.closing !== null && clock.opensMs !== null && clock.closing.ms < clock.opensMs ? null : clock.opensMs;
  }

  /** Closing of a dwell that opened; null where it has not closed for good. */
  closesMs(index: number, fill: Fill): number | null {
    const { clock } = this.at(index, fill);
    return this.opensMs(index, fill) === null || clock.closing?.isFinal !== true ? null : clock.closing.ms;
  }
}

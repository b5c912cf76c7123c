import { refuse, refuseNamedTwice } from '../document.ts';
import { DomainError } from '../errors.ts';
import { checkUnits } from './check-units.ts';
import type { Cycle, CycleEvent, DwellStage } from './cycle.ts';
import { limitsOfCycle } from './limits-of-cycle.ts';
import { lowerOf, upperOf } from './words-of-figures.ts';

/** Refuses a cycle whose parts contradict each other: names, order of stages, dwells that events name, units. */
export function checkCycle(cycle: Cycle): void {
  const windows = cycle.windows ?? [];
  refuseNamedTwice(
    cycle.stages.map(({ name }) => name),
    (i) => `stages[${i}].name`,
  );
  refuseNamedTwice(
    windows.map(({ name }) => name),
    (i) => `windows[${i}].name`,
  );
  checkOrder(cycle);
  for (const [i, window] of windows.entries()) {
    checkEvent(cycle, window.from, `windows[${i}].from`);
    checkEvent(cycle, window.until, `windows[${i}].until`);
  }
  checkSpread(cycle);
  checkCeiling(cycle);
  checkUnits(cycle);
  // A stage named as the rules name a group ("window") could share a finding's name with one of that group.
  const limits = limitsOfCycle(cycle).map(({ name }) => name);
  refuseNamedTwice(limits, (i) => `the limit ${limits[i]}`);
}

function checkOrder({ stages }: Cycle): void {
  let before: DwellStage | null = null;
  let between: ('heat' | 'cool')[] = [];
  for (const [i, stage] of stages.entries()) {
    if (stage.kind !== 'dwell') {
      between.push(stage.kind);
      continue;
    }
    if (before !== null) {
      const wanted = stage.target > before.target ? 'heat' : 'cool';
      const names = `"${before.name}" and "${stage.name}"`;
      if (between.length === 0) outOfOrder(i, `${names} are two dwells with no heat or cool stage between them`);
      if (stage.target !== before.target && !between.includes(wanted)) {
        outOfOrder(i, `between ${names}, ${before.target} to ${stage.target}, there is no ${wanted} stage`);
      }
    }
    before = stage;
    between = [];
  }
}

function outOfOrder(index: number, because: string): never {
  throw new DomainError('cycle-stages-out-of-order', `stages[${index}]: ${because}`, { key: `stages[${index}]` });
}

function checkEvent({ stages }: Cycle, event: CycleEvent, path: string): void {
  if (event.at !== 'opens' && event.at !== 'closes') return;
  const dwells = stages.filter((stage) => stage.kind === 'dwell');
  const named = dwells.find(({ name }) => name === event.stage);
  if (named === undefined) {
    const names = dwells.map(({ name }) => `"${name}"`).join(', ');
    refuse(`${path}.stage`, `the name of a dwell: ${names || 'the cycle has none'}`, event.stage);
  }
  if (named.clock === undefined) needsClock(stages.indexOf(named), `${path} waits for it`);
}

/** Openings and closings are asked for: every dwell then says what they are. */
function checkSpread({ spread, stages }: Cycle): void {
  if (spread === undefined || spread.during === 'run') return;
  if (!stages.some(({ kind }) => kind === 'dwell'))
    refuse('spread.during', '"run" where there is no dwell', spread.during);
  for (const [i, stage] of stages.entries()) {
    if (stage.kind === 'dwell' && stage.clock === undefined) needsClock(i, 'the spread is judged by its opening');
  }
}

function needsClock(index: number, because: string): never {
  const key = `stages[${index}].clock`;
  throw new DomainError('document-missing-key', `${key} is missing; ${because}`, { key });
}

function checkCeiling({ ceiling, stages }: Cycle): void {
  if (ceiling === undefined) return;
  for (const stage of stages) {
    if (stage.kind === 'dwell' && ceiling < lowerOf(stage)) {
      refuse('ceiling', `no less than the band of "${stage.name}", ${lowerOf(stage)} to ${upperOf(stage)}`, ceiling);
    }
  }
}

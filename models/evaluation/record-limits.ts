import { calibrationLimit } from './calibration-limit.ts';
import { ALLOWANCE } from './dips.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, isAtMost, say, sayBeside } from './finding.ts';
import type { Judgement } from './judgement.ts';
import { outLifeLimit } from './out-life-limit.ts';

/** Limits on what was recorded before the run: `leak-test`, `material/out-life`, `instruments/calibration`. */
export function recordLimits(j: Judgement): Found[] {
  const { leakTest, material, instruments } = j.cycle;
  return [
    ...(leakTest === undefined ? [] : [leakTestLimit(j)]),
    ...(material?.outLife === true ? [outLifeLimit(j)] : []),
    ...(instruments?.calibration === true ? [calibrationLimit(j)] : []),
  ];
}

function leakTestLimit(j: Judgement): Found {
  const asked = j.cycle.leakTest!;
  const unit = j.cycle.units.vacuum ?? '';
  const bounds = { atMost: asked.lossAtMost };
  const known = { limit: 'leak-test', bounds, unit };
  const record = j.part?.leakTest;
  if (record === undefined) return { ...known, outcome: 'cannot-tell', because: 'Not recorded.' };
  // An absolute figure rises as the bag leaks, one below ambient falls.
  const isAbsolute = unit.endsWith(' abs');
  const lost = isAbsolute ? record.end - record.start : record.start - record.end;
  const loss = (lost * asked.over) / record.minutes;
  const start = asked.startAtLeast;
  const isDeepEnough = start === undefined || (isAbsolute ? record.start <= start : record.start >= start);
  const keepsLoss = isAtMost(loss, asked.lossAtMost + ALLOWANCE);
  const outcome: Outcome = isDeepEnough && keepsLoss ? 'met' : 'not-met';
  const scaled =
    record.minutes === asked.over ? '' : `, as much as ${sayBeside(loss, bounds, 3)} ${unit} in ${asked.over} min`;
  const weak = isDeepEnough
    ? ''
    : `; it started at ${record.start} ${unit}, and ${isAbsolute ? 'at most' : 'at least'} ${start} ${unit} is asked`;
  return {
    ...known,
    outcome,
    observed: loss,
    possible: loss,
    because: `The bag lost ${say(lost, 3)} ${unit} in ${record.minutes} min${scaled}; at most ${asked.lossAtMost} ${unit} in ${asked.over} min allowed${weak}.`,
  };
}

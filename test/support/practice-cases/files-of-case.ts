import { seedFrom } from '../../../server/practice/simulator/random.ts';
import { simulateRun } from '../../../server/practice/simulator/simulate-run.ts';
import type { PracticeCase } from './practice-case.ts';

/** The files of a case's folder, by name. */
export function filesOfCase({
  name,
  what,
  plan,
  args,
  isCureEstimated,
  expects,
}: PracticeCase): Map<string, Uint8Array> {
  const { files, layout, cycle, load, truth } = simulateRun(plan, seedFrom(name));
  const [log, ...more] = files;
  if (log === undefined || more.length > 0) throw new Error(`${name} is not one file`);
  const hasLoad = load.parts.length > 0 || load.barometer !== undefined;
  return new Map([
    ['run.csv', log.bytes],
    ['layout.json', json(layout)],
    ['cycle.json', json(cycle)],
    ['expected.json', json({ what, ...expects(truth) })],
    ...(hasLoad ? [['load.json', json(load)] as const] : []),
    ...(isCureEstimated ? [['resin.json', json(plan.resin)] as const] : []),
    ...(args === undefined ? [] : [['args.json', json(args)] as const]),
  ]);
}

/** Ten digits: the dust of binary arithmetic beyond them is no part of the case. */
function json(document: unknown): Uint8Array {
  const text = JSON.stringify(
    document,
    (_, value) => (typeof value === 'number' ? Number(value.toPrecision(10)) : value),
    1,
  );
  return new TextEncoder().encode(`${text}\n`);
}

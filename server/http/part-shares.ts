import type { PartRun, PartView } from '../contract/parts.ts';
import type { Db } from '../store/database.ts';
import { readParticulars, readSharers } from '../store/parts.ts';

/** Parts that share something with one, and what: its loads, its sensors and bag lines there, and its tool. */
export function sharesOf(db: Db, partId: number, serial: string, runs: readonly PartRun[]): PartView['shares'] {
  const what = new Map<string, string[]>();
  const add = (part: string, shared: string) => {
    if (part === serial) return;
    const known = what.get(part);
    if (known === undefined) what.set(part, [shared]);
    else if (!known.includes(shared)) known.push(shared);
  };
  for (const { line, loadMates, sensors } of runs) {
    for (const mate of loadMates) add(mate, `run ${line.run}`);
    for (const { channel, sharedWith } of sensors) {
      for (const mate of sharedWith) add(mate, `${channel} in run ${line.run}`);
    }
  }
  const { tool } = readParticulars(db, partId);
  const sharers = readSharers(db, [...what.keys()], tool);
  for (const sharer of sharers) if (sharer.onTool) add(sharer.serial, `tool ${tool}`);
  return sharers.flatMap(({ serial: part, verdict, failedTest }) => {
    const shared = what.get(part);
    return shared === undefined ? [] : [{ serial: part, verdict, failedTest, what: shared }];
  });
}

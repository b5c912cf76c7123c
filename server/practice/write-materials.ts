import { addItemEvent, extendLife } from '../actions/add-item-event.ts';
import { importMaterial } from '../actions/import-material.ts';
import { receiveRoll } from '../actions/receive-roll.ts';
import { setBatch } from '../actions/set-batch.ts';
import { setPartMaterials } from '../actions/set-part-materials.ts';
import { EXTENSIONS, MATERIALS, ROOM_NOT_WRITTEN } from './plan-materials.ts';
import { ROLLS, type Roll } from './plan-rolls.ts';
import type { PlannedRun } from './plan-run.ts';
import type { PracticeDeed } from './practice-deed.ts';
import { beginRandom, seedFrom } from './simulator/random.ts';

const BEGINS_MS = Date.parse('2025-10-22T08:00:00Z');
const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const LAY_UP_MS = 7 * HOUR_MS;

/** Documents, batches, rolls and their ledgers, and what each part was laid up from, the day before its cure. */
export function materialDeeds(runs: readonly PlannedRun[]): PracticeDeed[] {
  const rolls = Object.values(ROLLS).flatMap((roll) => {
    const uses = runs.filter(({ parts }) => parts.some((part) => part.roll === roll.roll && isLaidUp(part)));
    return uses.length === 0 ? [] : [{ roll, uses }];
  });
  const received = rolls.map(({ roll, uses }) => ({ roll, uses, ...arrival(roll, uses) }));
  return [
    ...MATERIALS.map(
      (material, n): PracticeDeed => ({
        atMs: BEGINS_MS - 2 * HOUR_MS + n * 60_000,
        by: 'process engineer 1',
        does: (parts) => importMaterial(parts, material),
      }),
    ),
    ...batchDeeds(received),
    ...received.flatMap(({ roll, uses, receivedMs, daysBefore }) => [
      receipt(roll, receivedMs, daysBefore),
      ...(daysBefore > 0 ? [] : agedBeforeUse(roll, uses)),
      ...outForLayUp(roll, uses),
    ]),
    ...runs.flatMap((run, n) => laidUp(run, runs.slice(0, n))),
    ...EXTENSIONS.filter(({ roll }) => received.some((one) => one.roll.roll === roll)).map(
      ({ roll, at, ...extension }): PracticeDeed => ({
        atMs: Date.parse(at),
        by: 'inspector 1',
        does: (parts) => extendLife(parts, roll, { life: 'out-life', ...extension }),
      }),
    ),
  ];
}

/** A part that comes in cured brings its material with it. */
function isLaidUp({ kind }: PlannedRun['parts'][number]): boolean {
  return kind !== 'post-cured-strut';
}

function outMs({ startsAt }: PlannedRun): number {
  return Date.parse(startsAt) - 21 * HOUR_MS;
}

function firstOutMs(uses: readonly PlannedRun[]): number {
  return Math.min(...uses.map(outMs));
}

/** Rolls that were in the freezer before the book was begun bring their age along, as written on their sheet. */
function arrival(roll: Roll, uses: readonly PlannedRun[]): { receivedMs: number; daysBefore: number } {
  const receivedMs = firstOutMs(uses) - (roll.daysOut + 5) * DAY_MS;
  return receivedMs >= BEGINS_MS ? { receivedMs, daysBefore: 0 } : { receivedMs: BEGINS_MS, daysBefore: roll.daysOut };
}

function batchDeeds(received: readonly { readonly roll: Roll; readonly receivedMs: number }[]): PracticeDeed[] {
  const batches = [...new Set(received.map(({ roll }) => roll.batch))];
  return batches.map((batch) => {
    const [first] = received
      .filter(({ roll }) => roll.batch === batch)
      .sort((one, other) => one.receivedMs - other.receivedMs);
    if (first === undefined) throw new Error(`the plan has no roll of batch ${batch}`);
    const made = new Date(first.receivedMs - 24 * DAY_MS).toISOString().slice(0, 10);
    const material = MATERIALS.find(({ name }) => name === first.roll.material);
    if (material === undefined) throw new Error(`the plan names ${first.roll.material}, which is not in it`);
    const { code, issue } = material;
    return {
      atMs: first.receivedMs - 600_000,
      by: 'operator 1',
      does: (parts) => setBatch(parts, { batch, material: { code, issue }, made, certificate: `certificate ${batch}` }),
    };
  });
}

function receipt({ roll, batch }: Roll, receivedMs: number, daysBefore: number): PracticeDeed {
  const before = daysBefore === 0 ? {} : { outMinutesBefore: daysBefore * 1440 };
  return {
    atMs: receivedMs,
    by: 'operator 1',
    does: (parts) => receiveRoll(parts, { roll, batch, lengthM: 100, ...before }),
  };
}

/** The days a roll had been out before its first part. */
function agedBeforeUse({ roll, daysOut }: Roll, uses: readonly PlannedRun[]): PracticeDeed[] {
  const backMs = firstOutMs(uses) - 2 * DAY_MS;
  return [takenOut(roll, backMs - daysOut * DAY_MS, 'operator 1'), putBack(roll, backMs, 'operator 1')];
}

/** Out while parts are laid up from it; two loads of one evening share the stay. */
function outForLayUp({ roll }: Roll, uses: readonly PlannedRun[]): PracticeDeed[] {
  return [...uses]
    .sort((one, other) => outMs(one) - outMs(other))
    .flatMap((run, n, sorted) => {
      const fromMs = outMs(run);
      const [before, next] = [sorted[n - 1], sorted[n + 1]];
      const isOutAlready = before !== undefined && outMs(before) + LAY_UP_MS >= fromMs;
      const staysOut = next !== undefined && fromMs + LAY_UP_MS >= outMs(next);
      return [
        ...(isOutAlready ? [] : [takenOut(roll, fromMs, run.operator, !ROOM_NOT_WRITTEN.includes(run.run))]),
        ...(staysOut ? [] : [putBack(roll, fromMs + LAY_UP_MS, run.operator)]),
      ];
    });
}

function takenOut(roll: string, atMs: number, by: string, isRoomWritten = true): PracticeDeed {
  const temperature = Number((20.5 + 2 * beginRandom(seedFrom(`${roll} ${atMs}`)).next()).toFixed(1));
  const room = isRoomWritten ? { room: { temperature, unit: '°C' } as const } : {};
  return { atMs, by, does: (parts) => addItemEvent(parts, roll, { kind: 'out', ...room }) };
}

function putBack(roll: string, atMs: number, by: string): PracticeDeed {
  return { atMs, by, does: (parts) => addItemEvent(parts, roll, { kind: 'in' }) };
}

/** Each part of a load from its roll, one after the other, the evening before; a repair adds to what was there. */
function laidUp(run: PlannedRun, before: readonly PlannedRun[]): PracticeDeed[] {
  return run.parts.filter(isLaidUp).map((part) => {
    const earlier = before.flatMap((one) =>
      one.parts.flatMap((same) => (same.part === part.part ? [useOf(one, same)] : [])),
    );
    const use = useOf(run, part);
    const reason = earlier.length === 0 ? {} : { reason: 'Laid up anew where it was repaired' };
    return {
      atMs: Date.parse(use.laidUpUntil) + 300_000,
      by: run.operator,
      does: (parts) => setPartMaterials(parts, part.part, { materials: [...earlier, use], ...reason }),
    };
  });
}

function useOf(run: PlannedRun, { part, roll }: PlannedRun['parts'][number]) {
  const place = run.parts.findIndex((one) => one.part === part);
  const untilMs = Date.parse(run.startsAt) - 15 * HOUR_MS + place * 600_000;
  const iso = (ms: number) => new Date(ms).toISOString();
  return { item: roll, laidUpFrom: iso(untilMs - 4 * HOUR_MS), laidUpUntil: iso(untilMs) };
}

import { type Course, courseOf, takenFrom } from './course.ts';
import type { MaterialRecords, PartMaterial } from './ledger.ts';
import { dayOf } from './ledger-order.ts';
import { type MaterialState, stateOfCourse } from './material-state.ts';
import type { Stay } from './stays.ts';

/** Whether material in a part had been cured by a run that ended by an instant; what nobody dated was there from the first. */
export function isCured(
  { laidUpFrom }: PartMaterial,
  cures: readonly { readonly fromMs: number; readonly untilMs: number }[],
  byMs: number,
): boolean {
  const laidMs = laidUpFrom === undefined ? Number.NEGATIVE_INFINITY : Date.parse(laidUpFrom);
  return cures.some(({ fromMs, untilMs }) => untilMs <= byMs && laidMs <= fromMs);
}

/** What a part's materials had aged to at an instant, in the order they are on record. */
export function partMaterialStates(records: MaterialRecords, part: string, atMs: number): MaterialState[] {
  const materials = records.parts.find((one) => one.part === part)?.materials ?? [];
  return materials.map((use) => {
    const tackMs = Date.parse(use.laidUpUntil ?? use.laidUpFrom ?? new Date(atMs).toISOString());
    return stateOfCourse(records, courseInPart(records, part, use, atMs), atMs, Math.min(tackMs, atMs));
  });
}

/**
 * The course of material that lies in a part: that of its item until it was laid, then out of the freezer.
 *
 * Where nobody wrote down when it was laid, any time between its item's first and last stay in the freezer may have
 * been spent in the part instead.
 */
export function courseInPart(records: MaterialRecords, part: string, use: PartMaterial, atMs: number): Course {
  const { item, laidUpFrom } = use;
  if (laidUpFrom === undefined) return laidSometime(courseOf(records, item, atMs), part);
  const laidMs = Date.parse(laidUpFrom);
  if (laidMs > atMs) {
    const because = `${item} is on record as laid up into ${part} on ${dayOf(laidMs)}, after heat-on`;
    return withUnknown(courseOf(records, item, atMs), because);
  }
  return takenFrom(courseOf(records, item, laidMs), `${part} was laid up from it`, laidMs, atMs);
}

function laidSometime(course: Course, part: string): Course {
  const firstOut = course.stays.findIndex(({ kind }) => kind === 'out');
  const wentBack = course.stays.some(({ kind }, i) => i > firstOut && kind !== 'out' && kind !== 'unknown');
  if (firstOut >= 0 && !wentBack) return course;
  return withUnknown(course, `when ${course.item} was laid up into ${part} is not on record`);
}

/** The same course with its stays in the freezer left open. */
function withUnknown(course: Course, because: string): Course {
  const firstOut = course.stays.findIndex(({ kind }) => kind === 'out');
  const stays = course.stays.map((stay, i): Stay => {
    const isOpen = i > firstOut && stay.kind !== 'out' && stay.kind !== 'unknown';
    return isOpen ? { kind: 'unknown', fromMs: stay.fromMs, untilMs: stay.untilMs, because } : stay;
  });
  const last = stays.at(-1);
  const end: Stay[] =
    last === undefined || last.kind === 'unknown'
      ? []
      : [{ kind: 'unknown', fromMs: last.untilMs, untilMs: last.untilMs, because }];
  return { ...course, stays: [...stays, ...end] };
}

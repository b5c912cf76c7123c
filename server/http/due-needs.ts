import type { Need } from '../contract/now.ts';
import { listBatchesThatEnd } from '../store/batches.ts';
import type { Db } from '../store/database.ts';
import { listVessels } from '../store/vessels.ts';
import { addDays, DUE_SOON_DAYS, instrumentsView, todayOf, vesselSurveysView } from './instrument-view.ts';

/** What runs out within a fortnight, or has run out, and is still used: the soonest first. */
export function dueNeeds(db: Db, nowMs: number): Need[] {
  const today = todayOf(db, nowMs);
  const needs = [...calibrations(db, nowMs), ...surveys(db, nowMs), ...batches(db, today)];
  return needs.sort((a, b) => (a.due < b.due ? -1 : a.due > b.due ? 1 : 0));
}

type Due = Extract<Need, { readonly due: string }>;

function calibrations(db: Db, nowMs: number): Due[] {
  return instrumentsView(db, nowMs).instruments.flatMap(({ instrument, standing, due, places }): Due[] => {
    if (due === null || places.length === 0 || (standing !== 'due-soon' && standing !== 'out-of-date')) return [];
    const sits = places.map(({ on, channel }) => `${channel} of ${on.name}`);
    return [{ kind: 'calibration-due', instrument, due, isOver: standing === 'out-of-date', places: sits }];
  });
}

function surveys(db: Db, nowMs: number): Due[] {
  return listVessels(db).flatMap(({ name: vessel }) => {
    const view = vesselSurveysView(db, vessel, nowMs);
    const kinds = [
      ['uniformity survey', view.survey],
      ['system accuracy test', view.accuracy],
    ] as const;
    return kinds.flatMap(([what, { standing, due }]): Due[] =>
      due !== null && (standing === 'due-soon' || standing === 'out-of-date')
        ? [{ kind: 'survey-due', vessel, what, due, isOver: standing === 'out-of-date' }]
        : [],
    );
  });
}

function batches(db: Db, today: string): Due[] {
  return listBatchesThatEnd(db, addDays(today, DUE_SOON_DAYS)).map(({ batch, material, expires }) => ({
    kind: 'batch-ends',
    batch,
    material,
    due: expires,
    isOver: expires < today,
  }));
}

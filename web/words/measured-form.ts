import type { Measured } from '../../server/contract/results.ts';
import type { MeasuredKind } from './measured.ts';
import { numberIn } from './typed.ts';

/** What is typed of a measured result; what its kind does not ask for stays empty. */
export const EMPTY_MEASURED = {
  residual: '',
  total: '',
  tg: '',
  criterion: 'storage-onset',
  largest: '',
  strength: '',
  specimens: '',
  limit: '',
  ultimate: '',
  reached: '',
  end: 'held',
  firstBy: '',
  first: '',
  secondBy: '',
  second: '',
  atLoad: '',
  method: '',
};
export type MeasuredForm = typeof EMPTY_MEASURED;

/** As the server takes it; undefined for a test without structure. */
export function measuredOf(kind: MeasuredKind, form: MeasuredForm): Measured | undefined {
  const method = form.method.trim() || null;
  const figure = (typed: string) => numberIn(typed) ?? Number.NaN;
  switch (kind) {
    case 'other':
      return undefined;
    case 'dsc':
      return { kind, residualJG: figure(form.residual), totalJG: figure(form.total), method };
    case 'dma':
      return {
        kind,
        tgC: figure(form.tg),
        criterion: form.criterion as Extract<Measured, { kind: 'dma' }>['criterion'],
        method,
      };
    case 'ultrasonic':
      return { kind, largestMm: numberIn(form.largest), method };
    case 'short-beam':
      return { kind, strengthMpa: figure(form.strength), specimens: numberIn(form.specimens), method };
    case 'load':
      return {
        kind,
        limitKn: numberIn(form.limit),
        ultimateKn: numberIn(form.ultimate),
        reachedKn: figure(form.reached),
        end: form.end as Extract<Measured, { kind: 'load' }>['end'],
        method,
      };
    case 'strain':
      return {
        kind,
        first: { by: form.firstBy.trim(), microstrain: figure(form.first) },
        second: { by: form.secondBy.trim(), microstrain: figure(form.second) },
        loadKn: numberIn(form.atLoad),
        method,
      };
  }
}

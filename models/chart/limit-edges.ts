import type { Cycle } from '../cycle/cycle.ts';
import { figure, lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import type { Finding } from '../evaluation/evaluation.ts';
import { wholeMinutes } from './whole-minutes.ts';

/** The edge a breach of a limit is drawn at, in the written unit; null for what is no edge on a strip. */
export function edgeOf(cycle: Cycle, { limit, observed, atLeast, atMost }: Finding): number | null {
  if (limit === 'ceiling') return cycle.ceiling ?? null;
  if (limit === 'cure/pressure-before-gel') return atLeast;
  if (limit.startsWith('window/')) {
    return atLeast !== null && observed !== null && observed < atLeast ? atLeast : (atMost ?? atLeast);
  }
  const cut = limit.lastIndexOf('/');
  const stage = cycle.stages.find(({ name }) => name === limit.slice(0, Math.max(0, cut)));
  if (stage === undefined) return null;
  if (stage.kind === 'dwell') return limit.endsWith('/upper') ? upperOf(stage) : lowerOf(stage);
  return stage.rate?.over[0] ?? null;
}

/** `112 of 120 min`, `3.4 °C/min`, or the minutes of the stretch with how far it went: `4.2 min, 187.4 °C`. */
export function breachText({ limit, observed, atLeast, atMost, unit }: Finding, minutes: number): string {
  const isTime = limit.endsWith('/time') || limit.endsWith('/longest');
  if (isTime && observed !== null) {
    const asked = atLeast !== null && observed < atLeast ? atLeast : atMost;
    return `${wholeMinutes(observed)}${asked === null ? '' : ` of ${figure(asked)}`} min`;
  }
  const went = observed === null ? '' : `${figure(Math.round(observed * 100) / 100)} ${unit}`.trim();
  if (limit.endsWith('/slowest') || limit.endsWith('/fastest')) return went;
  const lasted = minutes > 0 ? `${figure(Math.max(0.1, Math.round(minutes * 10) / 10))} min` : '';
  return [lasted, went].filter((words) => words !== '').join(', ');
}

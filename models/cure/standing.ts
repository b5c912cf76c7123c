import type { Resin, ResinStatus } from './resin.ts';

/** Whether sets of a status are for tests and trials, and never a limit in a real workshop. */
export function isForTrials(status: ResinStatus): boolean {
  return status === 'recalled' || status === 'illustrative';
}

/** What a set's status keeps it from, as a clause; null for a set that may be a limit. */
export function wordsOfStanding(status: ResinStatus): string | null {
  if (!isForTrials(status)) return null;
  return `${ORIGIN[status]}: for tests and trials, never a limit in a real workshop`;
}

const ORIGIN: Readonly<Record<ResinStatus, string>> = {
  published: 'published',
  fitted: 'fitted',
  recalled: 'recalled from memory',
  illustrative: 'invented to illustrate',
};

/** Why a set may not stand behind a limit where it is used; null where it may. */
export function whyNoLimit({ code, source, forTrialsOnly }: Resin): string | null {
  return forTrialsOnly ? `the set ${code} is ${wordsOfStanding(source.status)}` : null;
}

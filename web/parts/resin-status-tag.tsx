import type { ResinStatus } from '../../models/cure/resin.ts';

export const RESIN_STATUS_WORDS: Readonly<Record<ResinStatus, string>> = {
  published: 'Figures read in the source named. It may be a limit where a cycle’s author writes one.',
  recalled: 'Figures from memory: for tests and trials, never a limit in a real workshop.',
  fitted: 'Fitted to measurements of this material. It may be a limit where a cycle’s author writes one.',
  illustrative:
    'Invented to illustrate: it says nothing of any real material, and is never a limit in a real workshop.',
};

/** A set's standing in a word; one that may never be a limit says so wherever it appears. */
export function ResinStatusTag({ status }: { status: ResinStatus }) {
  return (
    <span class={isNeverALimit(status) ? 'tag for-trials' : 'tag'} title={RESIN_STATUS_WORDS[status]}>
      {TAG_WORDS[status]}
    </span>
  );
}

/** The same with its sentence: what the set may be used for. */
export function ResinStanding({ status, name }: { status: ResinStatus; name?: string | undefined }) {
  return (
    <p class={isNeverALimit(status) ? 'standing for-trials' : 'standing'}>
      {name && <b>{name} </b>}
      <ResinStatusTag status={status} /> {RESIN_STATUS_WORDS[status]}
    </p>
  );
}

const TAG_WORDS: Readonly<Record<ResinStatus, string>> = {
  published: 'published',
  recalled: 'recalled · for trials only',
  fitted: 'fitted',
  illustrative: 'illustrative · for trials only',
};

function isNeverALimit(status: ResinStatus): boolean {
  return status === 'recalled' || status === 'illustrative';
}

import type { ResinStatus } from '../../models/cure/resin.ts';

export const RESIN_STATUS_WORDS: Readonly<Record<ResinStatus, string>> = {
  published: 'Figures read in the source named.',
  recalled: 'Figures from memory: for tests and trials, never a limit in a real workshop.',
  fitted: 'Fitted to measurements of this material.',
  illustrative: 'Invented to illustrate: it says nothing of any real material.',
};

export function ResinStatusTag({ status }: { status: ResinStatus }) {
  return (
    <span class="tag" title={RESIN_STATUS_WORDS[status]}>
      {status}
    </span>
  );
}

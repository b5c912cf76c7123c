import type { Warning } from '../../server/contract/live.ts';

const GRAVE: readonly Warning['kind'][] = ['limit-broken', 'cannot-be-kept'];

/** The shape of a warning: a cross in a square where something is broken or lost, else a triangle. */
export function WarningMark({ kind }: { kind: Warning['kind'] }) {
  const isGrave = GRAVE.includes(kind);
  return (
    <svg
      class={`outcome ${isGrave ? 'outcome-not-met' : 'outcome-cannot-tell'}`}
      viewBox="0 0 20 20"
      fill="none"
      stroke="currentColor"
      stroke-width="2"
      stroke-linejoin="round"
      stroke-linecap="round"
      aria-hidden="true"
    >
      {isGrave ? (
        <>
          <rect x="1.5" y="1.5" width="17" height="17" rx="2.5" />
          <path d="M6 6l8 8M14 6l-8 8" stroke-width="2.4" />
        </>
      ) : (
        <path d="M10 2 18.5 17.5H1.5ZM10 8v4.4M10 15v.1" />
      )}
    </svg>
  );
}

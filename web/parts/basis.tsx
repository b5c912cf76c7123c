import type { ProposalStatement } from '../../server/contract/imports.ts';
import { OutcomeMark } from './outcome-mark.tsx';

/** How sure the proposal is of one thing, in a word, a shape and a reason. */
export function Basis({ statement, isAnswered }: { statement: ProposalStatement | undefined; isAnswered: boolean }) {
  if (isAnswered) return <span class="basis">Said by you.</span>;
  if (!statement) return null;
  const { mark, word } = SHOWN[statement.basis];
  return (
    <span class="basis">
      <OutcomeMark mark={mark} /> <b>{word}</b> {statement.because}
    </span>
  );
}

const SHOWN = {
  proved: { mark: 'met', word: 'Proved.' },
  guessed: { mark: 'cannot-tell', word: 'Guessed.' },
  asked: { mark: 'not-met', word: 'Must be answered.' },
} as const;

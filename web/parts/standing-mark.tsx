import type { InstrumentLine } from '../../server/contract/instruments.ts';
import { STANDING_MARKS, STANDING_WORDS } from '../words/instruments.ts';
import { OutcomeMark } from './outcome-mark.tsx';

/** How a record of validity stands today, and until when. */
export function StandingMark({ standing, due }: Pick<InstrumentLine, 'standing' | 'due'>) {
  const mark = STANDING_MARKS[standing];
  return (
    <span class={`outcome-line outcome-${mark}`}>
      <OutcomeMark mark={mark} />
      {STANDING_WORDS[standing]}
      {due && standing !== 'out-of-use' && `, ${standing === 'out-of-date' ? 'was due on' : 'due on'} ${due}`}
    </span>
  );
}

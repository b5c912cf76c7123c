import type { ItemLine } from '../../server/contract/materials.ts';
import { clock, shortDay } from '../words/clock.ts';
import { dueWords, itemPage, leftWords, placeWords } from '../words/materials.ts';
import { zone } from '../workshop.ts';
import { LifeMark } from './life-lines.tsx';
import { Entry } from './notebook.tsx';

/** A roll or kit on one line of the book; the margin says when its first life ends. */
export function ItemEntry({ line }: { line: ItemLine }) {
  const { state } = line;
  const out = state?.lives.find(({ name }) => name === 'out-life');
  const left = out && leftWords(out);
  const due = state && !line.laidUp && dueWords(state, zone.value);
  return (
    <Entry when={state?.dueAt && !line.laidUp && <Due at={state.dueAt} />}>
      <div class="head">
        <a href={itemPage(line)}>{line.item}</a>
        {line.laidUp ? (
          <span>laid up into a part, and judged there</span>
        ) : (
          state && <LifeMark outcome={state.outcome} />
        )}
        {left && !line.laidUp && <b>{left} of its out-life</b>}
      </div>
      {state && !line.laidUp && (
        <p>
          {placeWords(state, zone.value)} {due}
        </p>
      )}
      {state && !line.laidUp && state.outcome !== 'met' && <p>{state.because}</p>}
      <p class="soft">
        {[
          line.kind === 'kit' ? `kit cut from ${line.cutFrom}` : 'roll',
          line.material && `${line.material.name}, issue ${line.material.issue}`,
          line.batch && `batch ${line.batch}`,
        ]
          .filter(Boolean)
          .join(' · ')}
      </p>
    </Entry>
  );
}

function Due({ at }: { at: string }) {
  return (
    <time dateTime={at}>
      <b>{shortDay(at, zone.value)}</b> {clock(at, zone.value)}
    </time>
  );
}

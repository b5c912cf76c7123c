import { answerAt, withAnswer } from '../words/layout-edits.ts';
import { openQuestions, placeName } from '../words/layouts.ts';
import { zone } from '../workshop.ts';
import type { LayoutEditing } from './layout-editor.tsx';

/** What the file cannot tell, asked first, with the answers that are likely; all others are given in the fields below. */
export function OpenQuestions({ editing }: { editing: LayoutEditing }) {
  const { layout, statements, answered, onChange } = editing;
  const open = openQuestions(layout, statements, answered);
  if (open.length === 0) return null;
  return (
    <section class="notice amber questions" aria-label="Questions to answer first">
      <h2>
        {open.length === 1 ? 'One question the file cannot answer' : `${open.length} questions the file cannot answer`}
      </h2>
      {open.map(({ key, because, choices }) => {
        const offered = choices.length > 0 ? choices : key === 'time.zone' ? [zone.value] : [];
        return (
          <fieldset key={key} class="stack">
            <legend>What is {placeName(key, layout)}?</legend>
            <p>{because}</p>
            <div class="row">
              {offered.map((choice) => (
                <button
                  key={choice}
                  type="button"
                  aria-pressed={answerAt(layout, key) === choice}
                  onClick={() => onChange(withAnswer(layout, key, choice), key)}
                >
                  {choice}
                </button>
              ))}
              <span class="soft">
                {offered.length > 0 ? 'or answer in its field below' : 'Answer in its field below.'}
              </span>
            </div>
          </fieldset>
        );
      })}
    </section>
  );
}

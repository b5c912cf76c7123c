import type { Life } from '../../models/material/lives.ts';
import type { MaterialState } from '../../models/material/material-state.ts';
import { IN_LIFE_WORDS, LIFE_NAMES, leftWords } from '../words/materials.ts';
import { OutcomeMark } from './outcome-mark.tsx';

export function LifeMark({ outcome }: { outcome: Life['outcome'] }) {
  return (
    <span class={`outcome-line outcome-${outcome}`}>
      <OutcomeMark mark={outcome} />
      {IN_LIFE_WORDS[outcome]}
    </span>
  );
}

/** Each life of a roll or kit: what is left, how it stands, and behind it every figure it rests on. */
export function LifeLines({ state }: { state: MaterialState }) {
  return (
    <ul class="lives">
      {state.lives.map((life) => (
        <li key={life.name}>
          <h2>{LIFE_NAMES[life.name]}</h2>
          <p class="left">{leftWords(life) ?? 'not known'}</p>
          <LifeMark outcome={life.outcome} />
          <p>{life.because}</p>
          {life.why.length > 1 && (
            <details>
              <summary>What this rests on</summary>
              <ul>
                {life.why.map((sentence) => (
                  <li key={sentence}>{sentence}</li>
                ))}
              </ul>
            </details>
          )}
        </li>
      ))}
    </ul>
  );
}

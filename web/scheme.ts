import { keptChoice } from './kept-choice.ts';

export type SchemeChoice = 'as-system' | 'light' | 'dark';

/** Light or dark: the system's wish, unless this person chose otherwise on this machine. */
export const schemeChoice = keptChoice<SchemeChoice>('scheme', ['as-system', 'light', 'dark'], 'as-system');

const systemIsDark = matchMedia('(prefers-color-scheme: dark)');

/** Keeps `data-scheme` of the page in step with the choice and the system; calls back after every change. */
export function followScheme(onChange: () => void = () => undefined): () => void {
  const apply = () => {
    const choice = schemeChoice.value;
    document.documentElement.dataset.scheme =
      choice === 'as-system' ? (systemIsDark.matches ? 'dark' : 'light') : choice;
    onChange();
  };
  systemIsDark.addEventListener('change', apply);
  const stop = schemeChoice.subscribe(apply);
  return () => {
    systemIsDark.removeEventListener('change', apply);
    stop();
  };
}

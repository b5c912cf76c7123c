import { useEffect, useState } from 'preact/hooks';
import { keep, readKept } from './kept-choice.ts';

/**
 * What is typed into a form, kept in this browser under `name` until it is handed over or thrown away.
 *
 * `found` says that something typed before was taken up; `clear` forgets it and begins again from `start`.
 */
export function useKeptForm<T>(
  name: string,
  start: T,
): [form: T, setForm: (next: T) => void, kept: { clear: () => void; found: boolean }] {
  const key = `dwellbook.form.${name}`;
  const [begin] = useState(() => ({ start, typed: readForm<T>(key) }));
  const [form, setForm] = useState<T>(begin.typed ?? begin.start);
  useEffect(() => {
    if (form !== begin.start) keep(key, JSON.stringify(form));
  }, [form]);
  const clear = () => {
    keep(key, null);
    setForm(begin.start);
  };
  return [form, setForm, { clear, found: begin.typed !== null && form !== begin.start }];
}

function readForm<T>(key: string): T | null {
  const kept = readKept(key);
  if (kept === null) return null;
  try {
    return JSON.parse(kept) as T;
  } catch {
    // Written by another version or cut short: start afresh.
    return null;
  }
}

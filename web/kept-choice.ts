import { effect, type Signal, signal } from '@preact/signals';

/** A choice of one of a few words, kept in this browser. */
export function keptChoice<T extends string>(name: string, allowed: readonly T[], otherwise: T): Signal<T> {
  const key = `dwellbook.${name}`;
  const kept = readKept(key);
  const choice = signal<T>(allowed.find((word) => word === kept) ?? otherwise);
  effect(() => keep(key, choice.value));
  return choice;
}

export function readKept(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    // Storage switched off: the choice lasts as long as the page.
    return null;
  }
}

export function keep(key: string, value: string | null): void {
  try {
    if (value === null) localStorage.removeItem(key);
    else localStorage.setItem(key, value);
  } catch {
    // Storage switched off or full: see above.
  }
}

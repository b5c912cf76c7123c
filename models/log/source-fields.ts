import { type Read, refuse } from '../document.ts';

/** The one text that may stand there. */
export function only<const T extends string>(word: T): Read<T> {
  return (value, path) => (value === word ? word : refuse(path, `"${word}"`, value));
}

/** An object whose keys are names of channels. */
export function recordOf<T>(read: Read<T>): Read<Readonly<Record<string, T>>> {
  return (value, path) => {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) return refuse(path, 'an object', value);
    return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, read(item, `${path}.${key}`)]));
  };
}

import { type Fields, number, object, type Read, refuse } from '../document.ts';
import type { Bounds, Forgiveness } from './cycle.ts';

/** `atLeast` and `atMost` of an object that has one of them or both, in order. */
export function boundsIn(fields: Fields, path: string, least: Read<number>, most: Read<number> = least): Bounds {
  const bounds: Bounds = { ...fields.optional('atLeast', least), ...fields.optional('atMost', most) };
  if (bounds.atLeast === undefined && bounds.atMost === undefined) {
    return refuse(path, 'atLeast, atMost or both', {});
  }
  if (bounds.atLeast !== undefined && bounds.atMost !== undefined && bounds.atLeast > bounds.atMost) {
    return refuse(fields.pathOf('atLeast'), `at most the atMost beside it, ${bounds.atMost}`, bounds.atLeast);
  }
  return bounds;
}

/** `{ "atLeast": 60, "atMost": 80 }` of a quantity that cannot be negative, and that a most of nothing would forbid. */
export const bounds: Read<Bounds> = (value, path) =>
  object((fields) => boundsIn(fields, path, NOT_NEGATIVE, ABOVE_NOTHING))(value, path);

export const NOT_NEGATIVE = number({ atLeast: 0 });
export const ABOVE_NOTHING = number({ above: 0 });

/** `{ "by": 2, "for": 3, "times": 2, "inTotal": 5 }`. */
export const forgiveness: Read<Forgiveness> = object((fields) => ({
  by: fields.required('by', number({ above: 0 })),
  for: fields.required('for', number({ above: 0 })),
  ...fields.optional('times', number({ atLeast: 1, whole: true })),
  ...fields.optional('inTotal', number({ above: 0 })),
}));

/** Refuses a block that is written but asks nothing: its author meant something by it. */
export function notEmpty<T extends object>(read: Read<T>, keys: string): Read<T> {
  return (value, path) => {
    const block = read(value, path);
    return Object.keys(block).length > 0 ? block : refuse(path, `at least one of ${keys}, or no such block`, value);
  };
}

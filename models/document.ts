import { DomainError } from './errors.ts';

/**
 * Reading a document of unknown shape: every wrong, missing or unknown key is refused by its path.
 *
 * A parser is one `object(…)` whose callback asks for every key the document may have; what it did not ask for is
 * refused when the callback is done.
 */

/** Turns an unknown value into a typed one, or refuses it naming `path`. */
export type Read<T> = (value: unknown, path: string) => T;

export interface Fields {
  /** The value of a key that must be there. */
  required<T>(key: string, read: Read<T>): T;
  /** `{ key: value }` where the key is there, else `{}`: to be spread into the result. */
  optional<K extends string, T>(key: K, read: Read<T>): { readonly [P in K]?: T };
  has(key: string): boolean;
  /** Path of a key of this object, for refusals of the caller's own. */
  pathOf(key: string): string;
}

export function object<T>(read: (fields: Fields) => T): Read<T> {
  return (value, path) => {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) return refuse(path, 'an object', value);
    const entries = value as Record<string, unknown>;
    const asked = new Set<string>();
    const pathOf = (key: string) => (path === '' ? key : `${path}.${key}`);
    const has = (key: string) => Object.hasOwn(entries, key);
    const result = read({
      pathOf,
      has,
      required(key, readValue) {
        asked.add(key);
        if (!has(key)) {
          const there = Object.keys(entries).join(', ');
          throw new DomainError('document-missing-key', `${pathOf(key)} is missing; the keys here are: ${there}`, {
            key: pathOf(key),
          });
        }
        return readValue(entries[key], pathOf(key));
      },
      optional(key, readValue) {
        asked.add(key);
        return (has(key) ? { [key]: readValue(entries[key], pathOf(key)) } : {}) as never;
      },
    });
    for (const key of Object.keys(entries)) {
      if (asked.has(key)) continue;
      throw new DomainError(
        'document-unknown-key',
        `${pathOf(key)} is not a key of this document; here may stand: ${[...asked].join(', ')}`,
        { key: pathOf(key) },
      );
    }
    return result;
  };
}

/** Text that is not blank. */
export const text: Read<string> = (value, path) =>
  typeof value === 'string' && value.trim() !== '' ? value : refuse(path, 'text that is not blank', value);

export const flag: Read<boolean> = (value, path) =>
  typeof value === 'boolean' ? value : refuse(path, 'true or false', value);

export interface NumberRange {
  readonly atLeast?: number;
  readonly atMost?: number;
  readonly above?: number;
  readonly below?: number;
  /** Whole numbers only. */
  readonly whole?: boolean;
}

/** A finite number within a range. */
export function number(range: NumberRange = {}): Read<number> {
  const { atLeast = -Infinity, atMost = Infinity, above = -Infinity, below = Infinity, whole = false } = range;
  const limits = [
    range.atLeast === undefined ? '' : ` of at least ${atLeast}`,
    range.above === undefined ? '' : ` above ${above}`,
    range.atMost === undefined ? '' : ` of at most ${atMost}`,
    range.below === undefined ? '' : ` below ${below}`,
  ].join('');
  const expected = `a ${whole ? 'whole ' : ''}number${limits}`;
  return (value, path) => {
    const good = typeof value === 'number' && Number.isFinite(value) && (!whole || Number.isSafeInteger(value));
    return good && value >= atLeast && value <= atMost && value > above && value < below
      ? value
      : refuse(path, expected, value);
  };
}

/** One of a list of texts. */
export function oneOf<const T extends string>(values: readonly T[]): Read<T> {
  return (value, path) =>
    values.includes(value as T) ? (value as T) : refuse(path, `one of ${values.map(quoted).join(', ')}`, value);
}

export interface ListLength {
  readonly atLeast?: number;
  readonly atMost?: number;
}

/** A list of like things; the path of the second of `stages` is `stages[1]`. */
export function listOf<T>(read: Read<T>, { atLeast = 0, atMost = Infinity }: ListLength = {}): Read<readonly T[]> {
  return (value, path) => {
    if (!Array.isArray(value)) return refuse(path, 'a list', value);
    if (value.length < atLeast) return refuse(path, `a list of at least ${atLeast}`, value);
    if (value.length > atMost) return refuse(path, `a list of at most ${atMost}`, value);
    return value.map((item, i) => read(item, `${path}[${i}]`));
  };
}

/** Two values, as `[50, 100]`. */
export function pairOf<T>(read: Read<T>): Read<readonly [T, T]> {
  return (value, path) => {
    if (!Array.isArray(value) || value.length !== 2) return refuse(path, 'a list of two', value);
    return [read(value[0], `${path}[0]`), read(value[1], `${path}[1]`)];
  };
}

/** The `format` key, without which nothing else can be understood. */
export function format<T extends string>(name: T): Read<T> {
  return (value, path) => {
    if (value === name) return name;
    throw new DomainError('document-wrong-format', `${path} is ${shown(value)}; expected ${quoted(name)}`, {
      key: path,
      expected: name,
    });
  };
}

/** Refuses a name that is used twice, at the path of its second use. */
export function refuseNamedTwice(names: readonly string[], pathOf: (index: number) => string): void {
  const seen = new Set<string>();
  for (const [i, name] of names.entries()) {
    if (seen.has(name)) {
      throw new DomainError('document-name-twice', `${pathOf(i)}: ${quoted(name)} is used twice`, {
        key: pathOf(i),
        name,
      });
    }
    seen.add(name);
  }
}

/** Throws `document-wrong-value`: what stands at `path`, and what was expected there. */
export function refuse(path: string, expected: string, value: unknown): never {
  throw new DomainError(
    'document-wrong-value',
    `${path === '' ? 'the document' : path} is ${shown(value)}; expected ${expected}`,
    { key: path, expected },
  );
}

/** The document in a JSON text. */
export function parseJson(json: string, name: string): unknown {
  try {
    return JSON.parse(json.startsWith('\uFEFF') ? json.slice(1) : json);
  } catch (cause) {
    throw new DomainError('document-not-json', `${name} is not JSON: ${(cause as Error).message}`, { name }, { cause });
  }
}

function shown(value: unknown): string {
  const json = JSON.stringify(value) ?? String(value);
  return json.length <= 60 ? json : `${json.slice(0, 57)}…`;
}

function quoted(value: string): string {
  return `"${value}"`;
}

import { withoutComments } from './read-imports.ts';

const IMPURE: readonly (readonly [RegExp, string])[] = [
  [/\bDate\s*\.\s*now\b/, 'reads the clock (Date.now)'],
  [/\bnew\s+Date\b(?!\s*\(\s*[^)\s])/, 'reads the clock (new Date without an instant)'],
  [/(?<!new\s+|[.\w])Date\s*\(/, 'reads the clock (Date called)'],
  [/\bMath\s*\.\s*random\b/, 'draws lots (Math.random)'],
  [/\b(?:crypto|performance|process|globalThis|localStorage|console|navigator)\s*[.[]/, 'reaches outside itself'],
  [/(?<![.\w])(?:fetch|setTimeout|setInterval|setImmediate|queueMicrotask)\s*\(/, 'reaches outside itself'],
  [/['"]node:/, 'uses a built-in of the server'],
];

/** What makes a source of `models` depend on anything but its arguments. */
export function findImpurities(source: string): string[] {
  const text = withoutComments(source);
  return IMPURE.filter(([pattern]) => pattern.test(text)).map(([, what]) => what);
}

import { PLACES, type Place, placeOf } from './places.ts';
import { type Import, readImports } from './read-imports.ts';

/** File name (from the top, with `/`) to text. */
export type Sources = ReadonlyMap<string, string>;

/** Every import that goes where it must not, one sentence each; empty where the house is in order. */
export function findWrongDirections(sources: Sources): string[] {
  const wrong: string[] = [];
  for (const [file, text] of sources) {
    const from = placeOf(file);
    if (from === null) {
      wrong.push(`${file} lies in no listed place`);
      continue;
    }
    const { imports, nonLiteral } = readImports(text);
    if (nonLiteral > 0 && from !== 'test') wrong.push(`${file} imports by a name that is not written out`);
    for (const one of imports) {
      const because = whyNot(file, from, PLACES[from]!, one, sources);
      if (because !== null) wrong.push(because);
    }
  }
  return wrong;
}

/** Circles of imports, each as `a -> b -> a`. Types are erased when the house is built: they close no circle. */
export function findCircles(sources: Sources): string[] {
  const circles: string[] = [];
  const done = new Set<string>();
  const path: string[] = [];
  const visit = (file: string): void => {
    if (done.has(file)) return;
    const at = path.indexOf(file);
    if (at >= 0) {
      circles.push([...path.slice(at), file].join(' -> '));
      return;
    }
    path.push(file);
    for (const { specifier, typeOnly } of readImports(sources.get(file) ?? '').imports) {
      const target = typeOnly ? null : resolveFrom(file, specifier);
      if (target !== null && sources.has(target)) visit(target);
    }
    path.pop();
    done.add(file);
  };
  for (const file of sources.keys()) visit(file);
  return circles;
}

function whyNot(file: string, from: string, place: Place, one: Import, sources: Sources): string | null {
  if (place.may.includes('*')) return null;
  const target = resolveFrom(file, one.specifier);
  if (target === null) {
    return mayUsePackage(place, one.specifier) ? null : `${file} (${from}) must not use the package ${one.specifier}`;
  }
  if (!sources.has(target) && /\.tsx?$/.test(target)) return `${file} imports ${target}, which is not there`;
  const to = placeOf(target);
  if (to === null) return `${file} (${from}) imports ${target}, which lies in no listed place`;
  if (place.may.includes(to)) return null;
  if (place.mayTypes?.includes(to)) {
    return one.typeOnly ? null : `${file} (${from}) may import only types of ${target} (${to})`;
  }
  return `${file} (${from}) must not import ${target} (${to})`;
}

function mayUsePackage(place: Place, specifier: string): boolean {
  return place.packages.some((allowed) => {
    if (allowed === 'node:') return specifier.startsWith('node:');
    if (allowed === '*') return !specifier.startsWith('node:');
    if (allowed.endsWith('/*')) return specifier.startsWith(allowed.slice(0, -1));
    return specifier === allowed || specifier.startsWith(`${allowed}/`);
  });
}

/** The file a relative specifier names, from the top; null for a package. */
function resolveFrom(file: string, specifier: string): string | null {
  if (!specifier.startsWith('.') && !specifier.startsWith('/')) return null;
  const parts = specifier.startsWith('/') ? ['..'] : file.split('/').slice(0, -1);
  for (const step of specifier.split('?')[0]!.split('/')) {
    if (step === '..' && parts.length > 0 && parts.at(-1) !== '..') parts.pop();
    else if (step !== '.' && step !== '') parts.push(step);
  }
  return parts.join('/');
}

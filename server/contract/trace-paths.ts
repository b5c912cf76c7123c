import { partPath, withQuery } from './paths.ts';

/** Where holds, whereabouts and comparisons are. Builders only, as in `paths.ts`. */

export function partWhereaboutsPath(serial: string): string {
  return `${partPath(serial)}/whereabouts`;
}

export const HOLDS_PATH = '/api/holds';

export function holdPath(hold: number): string {
  return `${HOLDS_PATH}/${hold}`;
}

export function holdCsvPath(hold: number): string {
  return `${holdPath(hold)}/list.csv`;
}

export const FAILED_PARTS_PATH = '/api/trace/failed';

/** Which parts are compared; `failed` are serials, a line each. */
export interface ScopeWords {
  readonly failed?: string;
  readonly drawing?: string;
  readonly cycle?: string;
  readonly from?: string;
  readonly until?: string;
  readonly sound?: string;
}

export function comparePath(scope: ScopeWords): string {
  return withQuery('/api/trace/compare', { ...scope });
}

export function overlayPath(scope: ScopeWords, event: string): string {
  return withQuery('/api/trace/overlay', { ...scope, event });
}

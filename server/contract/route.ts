import type { Role } from './roles.ts';

/** One thing that can be asked of the server over HTTP. */
export interface Route {
  readonly method: 'get' | 'post';
  /** OpenAPI template: `/api/runs/{run}`. */
  readonly path: string;
  readonly summary: string;
  /** Who may use it. */
  readonly roles: readonly Role[];
  /** What is sent along: JSON, a table, or a file as it is. */
  readonly sends: 'nothing' | 'json' | 'bytes' | 'csv';
}

export function route<Sends extends Route['sends'] = 'nothing'>(
  method: Route['method'],
  path: string,
  summary: string,
  roles: readonly Role[],
  sends: Sends = 'nothing' as Sends,
) {
  return { method, path, summary, roles, sends };
}

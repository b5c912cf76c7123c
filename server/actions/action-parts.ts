import type { Role } from '../contract/roles.ts';
import type { Db } from '../store/database.ts';

/** Who does something: named in the audit trail beside every write. */
export interface Actor {
  readonly name: string;
  readonly roles: readonly Role[];
}

/** What every action works with. */
export interface ActionParts {
  readonly db: Db;
  /** Ms since 1970-01-01T00:00:00Z. */
  readonly clock: () => number;
  readonly actor: Actor;
}

export function deedOf({ clock, actor }: ActionParts): { readonly at: string; readonly by: string } {
  return { at: new Date(clock()).toISOString(), by: actor.name };
}

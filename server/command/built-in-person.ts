import { userInfo } from 'node:os';
import type { Actor } from '../actions/action-parts.ts';
import { ROLES } from '../contract/roles.ts';

/** Who acts until accounts come: whoever runs the program, with every role. */
export function builtInPerson(): Actor {
  return { name: systemName() ?? 'workshop', roles: ROLES };
}

/** A user without an entry in the system's list of users has no name. */
function systemName(): string | null {
  try {
    return userInfo().username || null;
  } catch {
    return null;
  }
}

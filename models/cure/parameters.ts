import type { Kinetics, Resin } from './resin.ts';

/**
 * A resin with some constants of its kinetics moved.
 *
 * @param moves By name: a key of `kinetics` and what is added to it, or `ln` and a key and what is added to its natural
 *   logarithm.
 * @returns The resin; null where a name is neither.
 */
export function withParameters(resin: Resin, moves: ReadonlyMap<string, number>): Resin | null {
  const constants: Record<string, unknown> = { ...resin.kinetics };
  for (const [name, move] of moves) {
    const key = name.startsWith('ln') && !(name in constants) ? name.slice(2) : name;
    const constant = constants[key];
    if (typeof constant !== 'number' || (key !== name && constant <= 0)) return null;
    constants[key] = key === name ? constant + move : constant * Math.exp(move);
  }
  return { ...resin, kinetics: constants as unknown as Kinetics };
}

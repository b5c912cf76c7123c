import { refuse } from '../document.ts';
import { DomainError } from '../errors.ts';
import type { Cycle, WindowLimit } from './cycle.ts';

/** Refuses a limit whose unit is not declared, and figures that its unit contradicts. */
export function checkUnits(cycle: Cycle): void {
  const { units, leakTest, cure } = cycle;
  for (const [i, window] of (cycle.windows ?? []).entries()) {
    const path = `windows[${i}]`;
    declared(units[window.quantity], window.quantity, path);
    for (const [event, key] of [
      [window.from, 'from'],
      [window.until, 'until'],
    ] as const) {
      if (event.at.startsWith('pressure-')) declared(units.pressure, 'pressure', `${path}.${key}`);
      if (event.at.startsWith('vacuum-')) declared(units.vacuum, 'vacuum', `${path}.${key}`);
    }
    if (isAbsolute(units[window.quantity])) notNegative(window, path);
  }
  if (cure?.pressureBeforeGel !== undefined) declared(units.pressure, 'pressure', 'cure.pressureBeforeGel');
  if (leakTest !== undefined) declared(units.vacuum, 'vacuum', 'leakTest');
}

function declared(unit: string | undefined, quantity: 'pressure' | 'vacuum', neededBy: string): void {
  if (unit !== undefined) return;
  const key = `units.${quantity}`;
  throw new DomainError('document-missing-key', `${key} is missing; ${neededBy} is written in it`, { key });
}

function notNegative({ atLeast = 0, atMost = 0 }: WindowLimit, path: string): void {
  if (atLeast < 0) refuse(`${path}.atLeast`, 'an absolute pressure, not below zero', atLeast);
  if (atMost < 0) refuse(`${path}.atMost`, 'an absolute pressure, not below zero', atMost);
}

function isAbsolute(unit: string | undefined): boolean {
  return unit?.endsWith(' abs') === true;
}

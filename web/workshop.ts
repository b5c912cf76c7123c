import { computed, signal } from '@preact/signals';
import { WORKSHOP_PATH } from '../server/contract/paths.ts';
import type { Units, Workshop } from '../server/contract/workshop.ts';
import { asProblem, readJson } from './api.ts';
import { keptChoice } from './kept-choice.ts';
import type { ProblemError } from './problem-error.ts';

/** What the server says of the workshop; read once, and again after something was added to it. */
export const workshop = signal<Workshop | null>(null);
export const workshopProblem = signal<ProblemError | null>(null);

export async function readWorkshop(): Promise<void> {
  try {
    workshop.value = await readJson<Workshop>(WORKSHOP_PATH);
    workshopProblem.value = null;
  } catch (error) {
    workshopProblem.value = asProblem(error);
  }
}

/** Zone the shop's clock is in; before it is known, the browser's own. */
export const zone = computed(() => workshop.value?.zone ?? Intl.DateTimeFormat().resolvedOptions().timeZone);

/** Units this person reads charts in; `as-workshop` follows the workshop. What documents wrote stays as written. */
export const temperatureChoice = keptChoice('temperature', ['as-workshop', '°C', '°F'], 'as-workshop');
export const pressureChoice = keptChoice('pressure', ['as-workshop', 'bar', 'kPa', 'MPa', 'psi'], 'as-workshop');
export const vacuumChoice = keptChoice('vacuum', ['as-workshop', 'bar', 'kPa', 'mbar', 'inHg', 'mmHg'], 'as-workshop');

const METRIC: Units = { temperature: '°C', pressure: 'bar', vacuum: 'bar' };

export const shownUnits = computed<Units>(() => {
  const base = workshop.value?.units ?? METRIC;
  return {
    temperature: temperatureChoice.value === 'as-workshop' ? base.temperature : temperatureChoice.value,
    pressure: pressureChoice.value === 'as-workshop' ? base.pressure : pressureChoice.value,
    vacuum: vacuumChoice.value === 'as-workshop' ? base.vacuum : vacuumChoice.value,
  };
});

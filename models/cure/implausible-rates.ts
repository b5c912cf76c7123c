import { refuse } from '../document.ts';
import { DomainError } from '../errors.ts';
import { kelvinFromCelsius } from '../units.ts';
import { beginCure } from './cure-progress.ts';
import type { Resin } from './resin.ts';

/** Degree that the questions ask for: below it no diffusion line and no switch of a law is felt much. */
const FAR = 0.4;
/** Two fifths of a cure in less than this is asked about. */
const HASTY_S = 15;
/** A tenth of a cure that takes longer than this in an oven is asked about: 10 h. */
const ENDLESS_S = 36_000;
const OVEN_C = 180;
/** A resin that is two fifths cured in half an hour at this temperature cures at room temperature, °C and s. */
const WARM_C = 45;
const HALF_AN_HOUR_S = 1800;
/** Cured as fully as it can be, a resin is hottest about here: that far below its own last Tg, °C. */
const BELOW_TG_C = 15;
const ROOM_C = 20;

/**
 * Refuses rate constants of a size that no resin has; `confirm` says how to insist.
 *
 * The bounds come from fourteen published sets (autoclave, oven and out-of-autoclave epoxies, polyester, vinyl ester,
 * polyurethane, a frontal resin): 15 °C below their last Tg two fifths of the cure take 30 s to 20 min, but for those that
 * cure at room temperature; none does it within 5 min at 20 °C. A figure in 1/min taken for 1/s is 60 times too fast.
 */
export function refuseImplausibleRates(resin: Resin, confirm: string): void {
  if (resin.initialDegree >= FAR) return;
  const { kinetics } = resin;
  const free = withoutDiffusion(resin);
  const atRoomS = secondsTo(FAR, free, ROOM_C, HASTY_S);
  if (atRoomS !== null) {
    refuse(
      'kinetics',
      `rate constants in 1/s and energies in J/mol: at ${ROOM_C} °C degree ${FAR} would be reached in ` +
        `${atRoomS.toPrecision(2)} s. Is E in cal/mol, or divided by R; is A in 1/min or 1/h? ${confirm}`,
      kinetics,
    );
  }
  const { hottestC, where, isFitWarm } = hottestOf(resin);
  const mayBeHasty = isFitWarm && secondsTo(FAR, free, WARM_C, HALF_AN_HOUR_S) !== null;
  const hottestS = hottestC === null || mayBeHasty ? null : secondsTo(FAR, free, hottestC, HASTY_S);
  if (hottestS !== null) {
    refuse(
      'kinetics',
      `rate constants in 1/s: at ${where} degree ${FAR} would be reached in ${hottestS.toPrecision(2)} s. ` +
        `Are they in 1/min? Then divide them by 60; ${confirm}`,
      kinetics,
    );
  }
  const ovenC = Math.max(hottestC ?? OVEN_C, OVEN_C);
  if (secondsTo(resin.initialDegree + 0.1, free, ovenC, ENDLESS_S) !== null) return;
  refuse(
    'kinetics',
    `rate constants in 1/s and energies in J/mol: at ${ovenC} °C a tenth of the cure would take more than 10 h. Is A a ` +
      `logarithm, or short of its power of ten; was E multiplied twice? ${confirm}`,
    kinetics,
  );
}

/** Where a resin is cured hottest: at the end of its range or near its last Tg, whichever is lower; null for neither. */
function hottestOf({ validC, glassTransition }: Resin): { hottestC: number | null; where: string; isFitWarm: boolean } {
  const nearTgC = glassTransition === undefined ? Number.POSITIVE_INFINITY : glassTransition.tgInfC - BELOW_TG_C;
  if (nearTgC <= (validC?.[1] ?? Number.MAX_VALUE)) {
    return { hottestC: nearTgC, where: `${nearTgC} °C, ${BELOW_TG_C} °C below tgInfC,`, isFitWarm: true };
  }
  if (validC === undefined) return { hottestC: null, where: '', isFitWarm: true };
  return { hottestC: validC[1], where: `${validC[1]} °C, the hottest of validC,`, isFitWarm: validC[0] <= WARM_C };
}

/** The set with nothing held back by diffusion: its lines are looked at on their own. */
function withoutDiffusion(resin: Resin): Resin {
  const { diffusion: _, ...free } = resin;
  return free.kinetics.law === 'two-term' ? { ...free, kinetics: { ...free.kinetics, alphaC0: 20 } } : free;
}

/** Seconds to a degree at a temperature, if within a time; null where it takes longer, or the law stalls before it. */
function secondsTo(degree: number, resin: Resin, temperatureC: number, withinS: number): number | null {
  const { glassTransition: _, validC: __, ...bare } = resin;
  const temperatureK = kelvinFromCelsius(temperatureC);
  try {
    const trial = beginCure({ ...bare, gel: { degree } }, { tolerance: 1e-4 });
    trial.accept(0, temperatureK);
    trial.accept(withinS, temperatureK);
    return trial.gelS;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    // A law that stalls never gets there, which is said where it is used; one too fast to follow is there at once.
    return error.code === 'cure-out-of-bounds' ? 0 : null;
  }
}

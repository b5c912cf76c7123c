import type { TrialCure } from '../../models/cure/trial-cure.ts';
import type { WithUncertainty } from '../../models/cure/uncertainty-along.ts';
import { type Programme, programmeCorners } from '../../models/cycle/programme.ts';
import {
  celsiusFromKelvin,
  type TemperatureUnit,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../../models/units.ts';
import { asWritten, figure, plain } from './figures.ts';
import { scientific } from './powers.ts';
import type { Trial } from './trial.ts';

export function minutesWords(timeS: number): string {
  return figure(timeS / 60, 'min');
}

/** `0.913 ± 0.010`: the interval with as many decimals as the figure. */
export function withInterval(value: number, expanded: number | null | undefined, digits: number, unit = ''): string {
  const tail = unit === '' ? '' : `\u00a0${unit}`;
  if (!expanded) return `${plain(value, digits)}${tail}`;
  const least = 10 ** -digits;
  if (expanded < least / 2) return `${plain(value, digits)} ± less than ${plain(least, digits)}${tail}`;
  return `${plain(value, digits)} ± ${plain(expanded, digits)}${tail}`;
}

/** `From 20 °C at 2 °C/min to 110 °C, hold 60 min; 105 min in all.` */
export function programmeWords(programme: Programme): string {
  const { unit, start, steps } = programme;
  const words = steps.map((step) =>
    step.kind === 'hold'
      ? `hold ${asWritten(step.minutes, 'min')}`
      : `at ${asWritten(step.rate, `${unit}/min`)} to ${asWritten(step.to, unit)}`,
  );
  const minutes = (programmeCorners(programme).timeS.at(-1) ?? 0) / 60;
  return `From ${asWritten(start, unit)} ${words.join(', ')}; ${figure(minutes, 'min')} in all.`;
}

export function degreeWords({ cure, uncertainty }: Trial): string {
  return withInterval(cure.alpha.at(-1) ?? Number.NaN, uncertainty?.degree.expanded, 3);
}

export function tgWords({ cure, uncertainty }: Trial, unit: TemperatureUnit): string | null {
  const tgK = cure.tgK?.at(-1);
  if (tgK === undefined) return null;
  const expandedK = uncertainty?.tgK?.expanded ?? null;
  const expanded = expandedK === null ? null : temperatureDifferenceFromCelsius(expandedK, unit);
  return withInterval(temperatureFromCelsius(celsiusFromKelvin(tgK), unit), expanded, 1, unit);
}

export function gelWords({ cure, uncertainty }: Trial): string | null {
  if (cure.gelS === null) return null;
  return withInterval(cure.gelS / 60, inMinutes(uncertainty?.gelS), 1, 'min');
}

/** True where an interval was asked for and one of its sides does not have the figure. */
export function isOpenInterval(one: WithUncertainty | null | undefined): boolean {
  return one?.expanded === null;
}

export function outsideMinutes({ outside }: TrialCure): { below: number; above: number } | null {
  if (outside === null) return null;
  const sum = (side: 'below' | 'above') =>
    outside.filter((one) => one.side === side).reduce((total, { fromS, untilS }) => total + (untilS - fromS) / 60, 0);
  return { below: sum('below'), above: sum('above') };
}

/** What the picture of one set shows, for whoever cannot see it. */
export function trialInWords(trial: Trial, unit: TemperatureUnit): string {
  const { resin, cure } = trial;
  const least = cure.viscosity?.least;
  const tg = tgWords(trial, unit);
  const sentences = [
    `${resin.code} over ${minutesWords(cure.timeS.at(-1) ?? 0)}: degree of cure ${plain(trial.startDegree, 3)} to ${degreeWords(trial)}`,
    tg === null ? null : `Tg ${tg} at the end`,
    cure.gelS === null ? null : `gels after ${gelWords(trial)}`,
    cure.vitrifiesS === null ? null : `vitrifies after ${minutesWords(cure.vitrifiesS)}`,
    cure.switchesS === null ? null : `its law switches after ${minutesWords(cure.switchesS)}`,
    least && Number.isFinite(least.viscosityPaS)
      ? `least viscosity ${scientific(least.viscosityPaS)} Pa s after ${minutesWords(least.timeS)}`
      : null,
    cure.stopped === null ? null : `it cannot go on after ${minutesWords(cure.stopped.timeS)}`,
  ];
  return `${sentences.filter((one) => one !== null).join('; ')}.`;
}

function inMinutes(one: WithUncertainty | null | undefined): number | null {
  return one?.expanded ? one.expanded / 60 : null;
}

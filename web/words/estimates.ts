import type { CureEstimate } from '../../models/evaluation/evaluation.ts';
import { type TemperatureUnit, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../../models/units.ts';
import { clock } from './clock.ts';
import { listed, plain } from './figures.ts';

/** `0.913 ± 0.012`; without an interval the figure alone. */
export function degreeWords({ degree, degreeInterval }: CureEstimate): string {
  if (!degreeInterval) return plain(degree, 3);
  const expanded = halfOf(degreeInterval);
  const digits = expanded < 0.0005 ? 4 : 3;
  return `${plain(degree, digits)} ± ${plain(expanded, digits)}`;
}

/** `172 ± 3` in a unit; a dash where the resin gives no Tg. */
export function tgWords({ tgC, tgIntervalC }: CureEstimate, unit: TemperatureUnit): string {
  if (tgC === null) return '–';
  const tg = temperatureFromCelsius(tgC, unit);
  if (!tgIntervalC) return plain(tg, 0);
  const expanded = temperatureDifferenceFromCelsius(halfOf(tgIntervalC), unit);
  const digits = expanded < 2 ? 1 : 0;
  return `${plain(tg, digits)} ± ${plain(expanded, digits)}`;
}

/** `11:29 ± 2.3 min` on the clock of a zone. */
export function gelWords({ gelAt, gelInterval }: CureEstimate, zone: string): string {
  if (gelAt === null) return 'not seen';
  if (!gelInterval) return clock(gelAt, zone);
  const [early, late] = gelInterval.map((instant) => Date.parse(instant) / 60_000);
  return `${clock(gelAt, zone)} ± ${plain(((late ?? 0) - (early ?? 0)) / 2, 1)} min`;
}

/** What the ± is, and for which thermocouples there is none and why. */
export function intervalSentences(estimates: readonly CureEstimate[], hasCovariance: boolean): string[] {
  if (estimates.some(({ degreeInterval }) => degreeInterval === undefined)) {
    return [
      'This judgement was made before uncertainties of estimates were reckoned; judge the run again to see them.',
    ];
  }
  const known = estimates.filter(({ degreeInterval }) => degreeInterval !== null);
  const unknown = estimates.filter(({ degreeInterval }) => degreeInterval === null);
  const openGel = known.filter(({ gelAt, gelInterval }) => gelAt !== null && !gelInterval);
  const from = hasCovariance
    ? 'what the uncertainty of the thermocouple and the covariance of the set’s constants come to'
    : 'what the uncertainty of the thermocouple comes to; the set gives no covariance of its constants';
  return [
    ...(known.length > 0 ? [`± (k = 2) is ${from}. What the model itself leaves out is not in it.`] : []),
    ...(unknown.length > 0 ? [`No uncertainty of ${names(unknown)} is on record, so no ± is given.`] : []),
    ...(openGel.length > 0 ? [`Within its uncertainty ${names(openGel)} may not have gelled by the log’s end.`] : []),
  ];
}

function names(estimates: readonly CureEstimate[]): string {
  return listed(estimates.map(({ channel }) => channel));
}

function halfOf([low, high]: readonly [number, number]): number {
  return (high - low) / 2;
}

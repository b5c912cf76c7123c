import { round9 } from '../units.ts';

/** Round figures from `lowest` to `highest`, steps of 1, 2 or 5 times a power of ten, about `count` of them. */
export function roundTicks(lowest: number, highest: number, count: number): number[] {
  const step = roundStep((highest - lowest) / Math.max(1, count));
  const ticks: number[] = [];
  for (let k = Math.ceil(lowest / step - 1e-9) + 0; k * step <= highest + 1e-9 * step; k++)
    ticks.push(round9(k * step));
  return ticks;
}

/** The round step nearest above `step`: 1, 2 or 5 times a power of ten. */
export function roundStep(step: number): number {
  const power = 10 ** Math.floor(Math.log10(step));
  const multiple = [1, 2, 5, 10].find((one) => one * power >= step * (1 - 1e-9)) ?? 10;
  return round9(multiple * power) || multiple * power;
}

/** Steps of time that people count in, in s. */
const TIME_STEPS_S = [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1800, 3600, 7200, 10_800, 21_600, 43_200, 86_400];

/** Instants from `fromS` to `untilS`, in s, on a step people count in, at most `count` of them. */
export function timeTicksS(fromS: number, untilS: number, count: number): number[] {
  const wanted = (untilS - fromS) / Math.max(1, count);
  const step = TIME_STEPS_S.find((one) => one >= wanted) ?? Math.ceil(wanted / 86_400) * 86_400;
  const ticks: number[] = [];
  for (let k = Math.ceil(fromS / step - 1e-9) + 0; k * step <= untilS + 1e-6; k++) ticks.push(k * step);
  return ticks;
}

/** `2 h`, `2 h 15`, `0 h 05`, `45 s`: hours from heat-on as the axis writes them. */
export function hoursWords(seconds: number): string {
  const sign = seconds < 0 ? '−' : '';
  const whole = Math.round(Math.abs(seconds));
  const hours = Math.floor(whole / 3600);
  const minutes = Math.floor((whole % 3600) / 60);
  const rest = whole % 60;
  const twoDigits = (value: number) => String(value).padStart(2, '0');
  if (rest !== 0) return `${sign}${hours} h ${twoDigits(minutes)}:${twoDigits(rest)}`;
  return minutes === 0 ? `${sign}${hours} h` : `${sign}${hours} h ${twoDigits(minutes)}`;
}

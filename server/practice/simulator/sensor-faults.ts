import type { Random } from './random.ts';

/** What goes wrong with a thermocouple, from a minute of the run on where it can begin later than at the start. */
export type SensorFault = { readonly channel: string } & (
  | { readonly kind: 'open'; readonly fromMin: number; readonly untilMin?: number }
  | { readonly kind: 'stuck'; readonly fromMin: number }
  /** Wired the wrong way round at the instrument: a mirror image about the cold junction. */
  | { readonly kind: 'reversed' }
  /** Reversed at both ends of its extension: plausible, and off by a constant. */
  | { readonly kind: 'offset'; readonly byC: number }
  /** Fell off the part and hangs in the air. */
  | { readonly kind: 'in-the-air'; readonly fromMin: number }
  /** A broken strand that opens and closes as the fan shakes it. */
  | { readonly kind: 'jumping'; readonly fromMin: number; readonly untilMin: number }
  /** The input is set to the other temperature scale. */
  | { readonly kind: 'wrong-unit'; readonly written: '°C' | '°F' }
  /** Socket never plugged: the terminals' own temperature. */
  | { readonly kind: 'unplugged' }
);

/** What one thermocouple indicates, in °C, scan after scan; NaN is an absent reading. */
export type Indication = (minute: number, junctionC: number, airC: number) => number;

/** Temperature of the instrument's terminals. */
const TERMINALS_C = 23;
const JUMPS_EVERY = 0.08;

export function indicationOf(faults: readonly SensorFault[], channel: string, random: Random): Indication {
  return faults
    .filter((fault) => fault.channel === channel)
    .reduce<Indication>(
      (before, fault) => withFault(before, fault, random),
      (_minute, junctionC) => junctionC,
    );
}

function withFault(sound: Indication, fault: SensorFault, random: Random): Indication {
  let held: number | null = null;
  return (minute, junctionC, airC) => {
    const indicated = sound(minute, junctionC, airC);
    switch (fault.kind) {
      case 'open':
        return minute >= fault.fromMin && minute < (fault.untilMin ?? Infinity) ? NaN : indicated;
      case 'stuck':
        if (minute < fault.fromMin) return indicated;
        held ??= indicated;
        return held;
      case 'reversed':
        return 2 * TERMINALS_C - indicated;
      case 'offset':
        return indicated + fault.byC;
      case 'in-the-air':
        return minute < fault.fromMin ? indicated : airC;
      case 'jumping':
        if (minute < fault.fromMin || minute >= fault.untilMin || random.next() >= JUMPS_EVERY) return indicated;
        return indicated + (random.next() < 0.5 ? -1 : 1) * (25 + 30 * random.next());
      case 'wrong-unit':
        return fault.written === '°F' ? indicated * 1.8 + 32 : (indicated - 32) / 1.8;
      case 'unplugged':
        return TERMINALS_C + 0.02 * (airC - TERMINALS_C);
    }
  };
}

/** Whether the indication repeats to the last figure, noise and all. */
export function isFrozen(faults: readonly SensorFault[], channel: string, minute: number): boolean {
  return faults.some((fault) => fault.channel === channel && fault.kind === 'stuck' && minute >= fault.fromMin);
}

import type { RunChannel } from '../run/channel.ts';
import { type PressureUnit, parsePressureUnit, pascalFrom } from '../units.ts';
import type { Judgement } from './judgement.ts';

/**
 * How figures of the cycle and readings of one channel are brought together.
 *
 * A vacuum below ambient and an absolute one run opposite ways; a gauge pressure and an absolute one run the same way
 * from another zero. Going from one to the other needs the barometer.
 */
export interface PressureScale {
  /** A figure of the cycle as the channel would read it, in Pa. */
  readonly paFrom: (figure: number) => number;
  /** A reading in the cycle's unit. */
  readonly figureFrom: (pa: number) => number;
  /** More on the channel is less in the cycle's unit. */
  readonly isFlipped: boolean;
  /** Readings that come to something; beyond them to less than nothing, and barometer or gauge is wrong. */
  readonly leastPa: number;
  readonly greatestPa: number;
}

const ANY_READING = { leastPa: Number.NEGATIVE_INFINITY, greatestPa: Number.POSITIVE_INFINITY };

export type Quantity = 'pressure' | 'vacuum';

/** The cycle's unit of a quantity; refused long before where a limit needs it and none is written. */
export function unitOf(j: Judgement, quantity: Quantity): string {
  return j.cycle.units[quantity] ?? '';
}

/** Decimals of a figure in a sentence: a thousandth of a bar, a hundredth of a psi or inHg, a tenth of a mbar or kPa. */
export function decimalsOf(unit: string): number {
  const { paPerUnit } = parsePressureUnit(unit);
  if (paPerUnit > 50_000) return 3;
  return paPerUnit > 2000 ? 2 : 1;
}

/** The scale between the cycle's unit and a channel; null where it needs a barometer that is not recorded. */
export function pressureScale(j: Judgement, quantity: Quantity, channel: RunChannel): PressureScale | null {
  const written = parsePressureUnit(unitOf(j, quantity));
  const read = channel.pressureUnit!;
  const direct = {
    paFrom: (figure: number) => pascalFrom(figure, written),
    figureFrom: (pa: number) => pa / written.paPerUnit,
  };
  if (written.absolute === read.absolute) return { ...direct, ...ANY_READING, isFlipped: false };
  const barometerPa = j.barometerPa;
  if (barometerPa === null) return null;
  return quantity === 'vacuum' ? vacuumScale(written, barometerPa) : pressureOffset(written, barometerPa);
}

/** Below ambient = barometer − absolute, either way round. */
function vacuumScale(written: PressureUnit, barometerPa: number): PressureScale {
  return {
    paFrom: (figure) => rounded(barometerPa - pascalFrom(figure, written)),
    figureFrom: (pa) => rounded(barometerPa - pa) / written.paPerUnit,
    ...ANY_READING,
    isFlipped: true,
    greatestPa: barometerPa,
  };
}

/** Gauge = absolute − barometer. */
function pressureOffset(written: PressureUnit, barometerPa: number): PressureScale {
  const toRead = written.absolute ? -barometerPa : barometerPa;
  return {
    paFrom: (figure) => rounded(pascalFrom(figure, written) + toRead),
    figureFrom: (pa) => rounded(pa - toRead) / written.paPerUnit,
    ...ANY_READING,
    isFlipped: false,
    // A gauge may well stand below ambient; nothing stands below a perfect vacuum.
    leastPa: written.absolute ? -barometerPa : Number.NEGATIVE_INFINITY,
  };
}

function rounded(pa: number): number {
  return Math.round(pa * 1e6) / 1e6;
}

/** Channels of a quantity that belong to the part or to none. */
export function channelsFor(j: Judgement, quantity: Quantity): RunChannel[] {
  return j.digest
    .withRole(quantity)
    .filter(({ parts }) => parts.length === 0 || j.part === null || parts.includes(j.part.part));
}

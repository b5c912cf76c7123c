import {
  celsiusDifferenceFrom,
  celsiusFrom,
  isTemperatureUnit,
  PA_PER_UNIT,
  parsePressureUnit,
  round9,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../units.ts';
import type { Calibration } from './instrument-records.ts';
import type { LoadSensor } from './load.ts';

/** What a calibration comes to for a channel: corrections and uncertainty in the channel's unit. */
export type InChannelUnit = Pick<LoadSensor, 'corrections' | 'uncertainty'>;

/**
 * A calibration's figures in a channel's unit; null where the two do not measure alike: a temperature and a pressure,
 * or pressures of which one counts from perfect vacuum and the other from ambient.
 */
export function calibrationIn(calibration: Calibration, unit: string): InChannelUnit | null {
  const figures = figuresBetween(calibration.unit, unit);
  if (figures === null) return null;
  const { points, uncertainty } = calibration;
  return {
    ...(points.length === 0
      ? {}
      : {
          corrections: points.map(([reading, by]): [number, number] => [figures.of(reading), figures.difference(by)]),
        }),
    ...(uncertainty === null ? {} : { uncertainty: figures.difference(uncertainty) }),
  };
}

interface Figures {
  readonly of: (figure: number) => number;
  readonly difference: (figure: number) => number;
}

function figuresBetween(from: string, to: string): Figures | null {
  const same = (figure: number) => figure;
  if (from === to) return { of: same, difference: same };
  if (isTemperatureUnit(from) && isTemperatureUnit(to)) {
    return {
      of: (figure) => round9(temperatureFromCelsius(celsiusFrom(figure, from), to)),
      difference: (figure) => round9(temperatureDifferenceFromCelsius(celsiusDifferenceFrom(figure, from), to)),
    };
  }
  if (!isPressure(from) || !isPressure(to)) return null;
  const written = parsePressureUnit(from);
  const asked = parsePressureUnit(to);
  if (written.absolute !== asked.absolute) return null;
  const scaled = (figure: number) => round9((figure * written.paPerUnit) / asked.paPerUnit);
  return { of: scaled, difference: scaled };
}

function isPressure(unit: string): boolean {
  return Object.hasOwn(PA_PER_UNIT, unit.replace(/ abs$/, ''));
}

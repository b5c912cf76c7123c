import { DomainError } from '../errors.ts';

/** Pa in one standard atmosphere: exact by definition (10th CGPM, 1954). */
const PA_PER_ATM = 101325;

/**
 * Least pressure in the resin at which a void of pure water vapour does not grow by diffusion.
 *
 * P = 4962 exp(−4892/T) RH atm, with RH the relative humidity in % at which the resin was stored or laid up.
 *
 * @param temperatureK            Temperature of the resin in K, 273.15 to 473.15.
 * @param relativeHumidityPercent Humidity that the resin took its moisture from, in %, 0 to 100.
 * @returns Absolute pressure in Pa.
 * @throws {DomainError} `option-out-of-range` outside these ranges.
 *
 * Accuracy: 4962 exp(−4892/T) is a straight Clausius–Clapeyron line through 1 atm at 100 °C; against steam tables it is
 *   0.4 % high at 100 °C, 2.7 % at 180 °C and 19 % at 25 °C, nowhere more than 0.2 % low; test/models/cure/void-pressure.test.ts.
 * Limits: the pressure is that of the resin, which the fibre bed, a dry bag or gelation can hold well below the vessel's;
 *   water alone is considered, not solvents or entrapped air; after gel it says nothing.
 * Source: Kardos, Duduković & Dave, Adv Polym Sci 80 (1986) 101–123.
 */
export function leastVoidPressurePa(temperatureK: number, relativeHumidityPercent: number): number {
  refuseOutside('temperatureK', temperatureK, 273.15, 473.15);
  refuseOutside('relativeHumidityPercent', relativeHumidityPercent, 0, 100);
  return 4962 * Math.exp(-4892 / temperatureK) * relativeHumidityPercent * PA_PER_ATM;
}

/**
 * Temperature above which a void of water vapour grows at a pressure in the resin: the inverse of
 * {@link leastVoidPressurePa}.
 *
 * T = 4892 / ln(4962 RH / P), P in atm.
 *
 * @param pressurePa              Absolute pressure of the resin in Pa; > 0.
 * @param relativeHumidityPercent As above; > 0.
 * @returns Temperature in K.
 * @throws {DomainError} `option-out-of-range` outside these ranges.
 *
 * Source: as {@link leastVoidPressurePa}.
 */
export function voidTemperatureK(pressurePa: number, relativeHumidityPercent: number): number {
  refuseOutside('pressurePa', pressurePa, Number.MIN_VALUE, 1e8);
  refuseOutside('relativeHumidityPercent', relativeHumidityPercent, Number.MIN_VALUE, 100);
  return 4892 / Math.log((4962 * relativeHumidityPercent * PA_PER_ATM) / pressurePa);
}

function refuseOutside(name: string, value: number, atLeast: number, atMost: number): void {
  if (value >= atLeast && value <= atMost) return;
  throw new DomainError('option-out-of-range', `${name} is ${value}; expected ${atLeast} to ${atMost}`, {
    [name]: value,
  });
}

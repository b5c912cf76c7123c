/** How a vessel heats and what it takes from what lies in it. */
export interface VesselPhysics {
  /** Full heating of the empty, cold vessel. */
  readonly heatsCPerMin: number;
  /** Full cooling. */
  readonly coolsCPerMin: number;
  /** Time constant of the loss through the walls. */
  readonly lossMin: number;
  /** Time constant with which the load draws the air towards itself. */
  readonly loadMin: number;
  /** Heat transfer to a surface in the mean position, at atmospheric pressure, fan running. */
  readonly hWPerM2K: number;
  /** h grows as absolute pressure to this power: 0.8 for turbulent gas, 0 for platens and blankets. */
  readonly hExponent: number;
  /** Share of h that is left when the fan stands still. */
  readonly stillShare: number;
}

export interface Air {
  readonly temperatureC: number;
  advance(stepS: number, setpointC: number, loadC: number, options: { powered: boolean; mayCool: boolean }): void;
}

/** Share of full power for each °C of error, and the time the integral part takes to add as much again. */
const GAIN_PER_C = 0.12;
const INTEGRAL_S = 540;

/** Air (platen, blanket) under a PI controller that can only give between nothing and full power. */
export function beginAir(physics: VesselPhysics, ambientC: number): Air {
  let temperatureC = ambientC;
  let integral = 0;

  const advance: Air['advance'] = (stepS, setpointC, loadC, { powered, mayCool }) => {
    const error = setpointC - temperatureC;
    const least = mayCool ? -1 : 0;
    const asked = GAIN_PER_C * error + integral;
    const given = powered ? Math.min(1, Math.max(least, asked)) : 0;
    if (powered && asked === given) integral += (GAIN_PER_C * error * stepS) / INTEGRAL_S;
    const driveCPerMin = given >= 0 ? given * physics.heatsCPerMin : given * physics.coolsCPerMin;
    const lossCPerMin = (temperatureC - ambientC) / physics.lossMin;
    const loadCPerMin = (temperatureC - loadC) / physics.loadMin;
    temperatureC += ((driveCPerMin - lossCPerMin - loadCPerMin) * stepS) / 60;
  };
  return {
    get temperatureC() {
      return temperatureC;
    },
    advance,
  };
}

/** Heat transfer at a gauge pressure, W/(m² K). Turbulent gas at equal velocity: h grows as density to the 0.8. */
export function heatTransferAt(physics: VesselPhysics, pressureBar: number, isFanOn: boolean): number {
  const density = (pressureBar + 1.013) / 1.013;
  return physics.hWPerM2K * density ** physics.hExponent * (isFanOn ? 1 : physics.stillShare);
}

import type { ChannelLayout } from '../../../models/log/layout.ts';
import { correctionAt } from '../../../models/run/channel.ts';
import { isTemperatureUnit, parsePressureUnit, temperatureFromCelsius } from '../../../models/units.ts';
import type { History } from './history.ts';
import { beginRandom, seedFrom } from './random.ts';
import type { Figures, Indicator } from './recorder.ts';
import { indicationOf, isFrozen, type SensorFault } from './sensor-faults.ts';

/** A thermocouple as it is wired: its socket, and what its calibration says must be added, in the channel's unit. */
export interface Wired {
  readonly channel: string;
  readonly corrections?: readonly (readonly [number, number])[];
}

export interface Instruments {
  readonly recorder: Indicator;
  /** In the order of the history's points. */
  readonly sensors: readonly Wired[];
  /** In the order of the history's bag lines. */
  readonly lines: readonly string[];
  readonly faults: readonly SensorFault[];
  readonly barometerBar: number;
  readonly pumpBar: number;
  readonly seed: number;
}

/** What a recorder has taken down: one row of figures for each channel of its layout, in the units it writes. */
export interface Recorded {
  readonly instantsMs: readonly number[];
  /** By channel; NaN is an absent reading. */
  readonly values: readonly Float64Array[];
}

/** Reads what really happened through the recorder's instruments: calibration, fault, noise, resolution. */
export function readInstruments(history: History, instruments: Instruments): Recorded {
  const { recorder } = instruments;
  const every = Math.round(recorder.intervalS / history.stepS);
  const count = Math.floor((history.count - 1) / every) + 1;
  const instantsMs = Array.from({ length: count }, (_, n) => history.startMs + n * recorder.intervalS * 1000);
  const values = recorder.layout.channels.map((channel) => {
    const shown = shownBy(channel, history, instruments);
    const row = new Float64Array(count);
    for (let n = 0; n < count; n++) row[n] = shown(n * every);
    return row;
  });
  return { instantsMs, values };
}

type Shown = (step: number) => number;

function shownBy(channel: ChannelLayout, history: History, instruments: Instruments): Shown {
  const { recorder } = instruments;
  const random = beginRandom((instruments.seed ^ seedFrom(channel.name)) >>> 0);
  const rounded = (value: number, { decimals, noise }: Figures): number => {
    const power = 10 ** decimals;
    return Math.round((value + noise * random.normal()) * power) / power;
  };
  if (channel.role === 'pressure') {
    const { paPerUnit, absolute } = parsePressureUnit(channel.unit);
    const zeroBar = absolute ? instruments.barometerBar : 0;
    return (step) => rounded(((history.gaugeBar[step]! + zeroBar) * 1e5) / paPerUnit, recorder.pressure);
  }
  if (channel.role === 'vacuum' || channel.role === 'vacuum-source') {
    const { paPerUnit, absolute } = parsePressureUnit(channel.unit);
    const line = history.vacuumBar[instruments.lines.indexOf(channel.name)];
    return (step) => {
      const bar = line?.[step] ?? blankedBar(history, step, instruments.pumpBar);
      return rounded(((absolute ? instruments.barometerBar - bar : bar) * 1e5) / paPerUnit, recorder.vacuum);
    };
  }
  if (!isTemperatureUnit(channel.unit)) throw new Error(`${channel.name} has no unit of temperature`);
  const { unit } = channel;
  const inUnit = (temperatureC: number) => rounded(temperatureFromCelsius(temperatureC, unit), recorder.temperature);
  if (channel.role === 'setpoint') return (step) => temperatureAs(history.setpointC[step]!, unit, recorder);
  const at = instruments.sensors.findIndex((sensor) => sensor.channel === channel.name);
  if (at < 0) return channel.role === 'part' ? () => NaN : (step) => inUnit(history.airC[step]!);
  return thermocouple(channel, history, instruments, at, rounded, random);
}

/** A port that is blanked off at the manifold shows the pump. */
function blankedBar(history: History, step: number, pumpBar: number): number {
  return pumpBar * (1 - Math.exp((-step * history.stepS) / 20));
}

function temperatureAs(temperatureC: number, unit: '°C' | '°F', { temperature }: Indicator): number {
  const power = 10 ** temperature.decimals;
  return Math.round(temperatureFromCelsius(temperatureC, unit) * power) / power;
}

function thermocouple(
  channel: ChannelLayout,
  history: History,
  { recorder, sensors, faults }: Instruments,
  at: number,
  rounded: (value: number, figures: Figures) => number,
  random: { next(): number; normal(): number },
): Shown {
  const unit = channel.unit as '°C' | '°F';
  const indicated = indicationOf(faults, channel.name, random);
  const { corrections = [] } = sensors[at]!;
  const junctionC = history.junctionC[at]!;
  let last = NaN;
  return (step) => {
    const minute = (step * history.stepS) / 60;
    const temperatureC = indicated(minute, junctionC[step]!, history.airC[step]!);
    if (Number.isNaN(temperatureC)) return NaN;
    const reading = temperatureFromCelsius(temperatureC, unit);
    if (isFrozen(faults, channel.name, minute) && !Number.isNaN(last)) return last;
    last = rounded(reading - correctionAt(reading, corrections), recorder.temperature);
    return last;
  };
}

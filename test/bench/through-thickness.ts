import { heatThrough } from '../../models/cure/heat/heat-through.ts';
import type { Face, Layer } from '../../models/cure/heat/layer.ts';
import { kelvinFromCelsius } from '../../models/units.ts';
import { practiceResin } from './laws.ts';
import { type BenchResult, medianMs } from './result.ts';
import { tenHourRun } from './ten-hour-run.ts';

const MOST_MS = 300;
const MOST_APART_K = 0.05;

/** A 25 mm laminate of 81 nodes on a tool, under ten hours of readings; floor: one pass over the readings. */
export async function benchThroughThickness(): Promise<BenchResult[]> {
  const { timeMs, channels } = tenHourRun();
  const timeS = timeMs.map((ms) => (ms - timeMs[0]!) / 1000);
  const surfaceK = channels[0]!.value.map(kelvinFromCelsius);
  const airK = channels.find(({ channel }) => channel.role === 'air')!.value.map(kelvinFromCelsius);
  const faces: [Face, Face] = [
    { meets: 'thermocouple', temperatureK: surfaceK },
    { meets: 'gas', coefficientWM2K: 50, gasK: airK },
  ];
  const hottestAt = (options: Parameters<typeof heatThrough>[5]) =>
    heatThrough(layers(80), faces, timeS, surfaceK[0]!, practiceResin, options).hottest.temperatureK;
  const hottestK = hottestAt({});
  const value = medianMs(5, () => hottestAt({}));
  const floor = medianMs(5, () => {
    let sum = 0;
    for (let i = 0; i < timeS.length; i += 1) sum += surfaceK[i]! + airK[i]!;
    if (!(sum > 0)) throw new Error('the floor was not measured');
  });
  const apartK = Math.abs(hottestK - hottestAt({ resolveS: 5, toleranceK: 0.001 }));
  return [
    {
      name: 'through-thickness',
      value,
      unit: 'ms',
      floor,
      ratio: value / floor,
      goal: `≤ ${MOST_MS} ms, peak within ${MOST_APART_K} K`,
      holds: value <= MOST_MS && apartK <= MOST_APART_K,
      note: `peak ${(hottestK - 273.15).toFixed(2)} °C, ${apartK.toExponential(1)} K from steps twenty times finer`,
    },
  ];
}

function layers(intervals: number): Layer[] {
  return [
    {
      thicknessM: 0.025,
      densityKgM3: 1580,
      specificHeatJKgK: 1080,
      conductivityWMK: 0.65,
      reactionHeatJM3: 1300 * (1 - 0.573) * 466000,
      intervals,
    },
    {
      thicknessM: 0.01,
      densityKgM3: 8150,
      specificHeatJKgK: 515,
      conductivityWMK: 11,
      reactionHeatJM3: 0,
      intervals: 20,
    },
  ];
}

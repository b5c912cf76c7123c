import { DomainError } from '../../errors.ts';
import type { Layer } from './layer.ts';

/** A stack of layers as nodes: each holds half of the interval on either side of it, an interface node half of each layer. */
export interface Stack {
  /** [n] in m from the outer face of the first layer. */
  readonly positionM: Float64Array;
  /** [n] in J/(m² K). */
  readonly capacity: Float64Array;
  /** [n − 1] in W/(m² K), between a node and the next. */
  readonly conductance: Float64Array;
  /** [n] in J/m² from α = 0 to 1; 0 where nothing reacts. */
  readonly reactionHeat: Float64Array;
}

/** Cuts a stack of layers into nodes; refuses layers that are none. */
export function cutStack(layers: readonly Layer[]): Stack {
  for (const [i, layer] of layers.entries()) refuseBadLayer(layer, i);
  if (layers.length === 0) throw new DomainError('option-out-of-range', 'A stack needs at least one layer');
  const intervals = layers.reduce((sum, layer) => sum + layer.intervals, 0);
  const positionM = new Float64Array(intervals + 1);
  const capacity = new Float64Array(intervals + 1);
  const conductance = new Float64Array(intervals);
  const reactionHeat = new Float64Array(intervals + 1);
  let node = 0;
  for (const layer of layers) {
    const widthM = layer.thicknessM / layer.intervals;
    for (let k = 0; k < layer.intervals; k += 1, node += 1) {
      positionM[node + 1] = positionM[node]! + widthM;
      conductance[node] = layer.conductivityWMK / widthM;
      for (const end of [node, node + 1]) {
        capacity[end]! += (layer.densityKgM3 * layer.specificHeatJKgK * widthM) / 2;
        reactionHeat[end]! += (layer.reactionHeatJM3 * widthM) / 2;
      }
    }
  }
  return { positionM, capacity, conductance, reactionHeat };
}

function refuseBadLayer(layer: Layer, index: number): void {
  const { reactionHeatJM3, intervals, ...rest } = layer;
  const bad = Object.entries(rest).find(([, value]) => !(value > 0 && Number.isFinite(value)));
  if (bad !== undefined) {
    throw new DomainError('option-out-of-range', `Layer ${index + 1}: ${bad[0]} is ${bad[1]}; expected above 0`, {
      layer: index + 1,
      [bad[0]]: bad[1],
    });
  }
  if (!(reactionHeatJM3 >= 0) || !(Number.isInteger(intervals) && intervals >= 2)) {
    throw new DomainError(
      'option-out-of-range',
      `Layer ${index + 1} needs a reaction heat of at least 0 and at least 2 intervals`,
      { layer: index + 1, reactionHeatJM3, intervals },
    );
  }
}

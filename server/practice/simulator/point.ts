import type { ReactionRate } from './reaction.ts';

/**
 * Where a thermocouple lies: a column of tool and laminate between two films of air.
 *
 * All figures are for one square metre.
 */
export interface Point {
  /** ρ·cp·thickness of the tool, J/(m² K). */
  readonly toolJPerM2K: number;
  readonly laminateM: number;
  /** Nodes through the laminate. */
  readonly nodes: number;
  /** Node the junction is in, from the tool: 0 … nodes − 1. */
  readonly junction: number;
  /** Share of the vessel's mean heat transfer that reaches this place. */
  readonly position: number;
  /** Bag, breather and film, m² K/W. */
  readonly bagM2KPerW: number;
  /** Conductance to a cold structure behind the tool side, W/(m² K); 0 where air flows there. */
  readonly sinkWPerM2K?: number;
  /** Degree of cure at the start: what the roll had aged. */
  readonly startDegree: number;
}

/** Laminate: density, specific heat and conductivity through the thickness, handbook size for carbon/epoxy. */
const LAMINATE = { densityKgPerM3: 1570, specificJPerKgK: 1000, conductivityWPerMK: 0.62 };
/** Tool surface to laminate, m² K/W. */
const CONTACT_M2K_PER_W = 8e-4;
/** In units of the fastest node's time constant, by Gershgorin's bound. */
const LONGEST_STEP = 1.8;

export interface PointState {
  /** Temperature at the junction. */
  readonly junctionC: number;
  readonly degree: number;
  /** What the air feels: mean of tool and bag side. */
  readonly surfaceC: number;
  /** Air goes in a straight line from one temperature to the other within the step. */
  advance(stepS: number, airFromC: number, airToC: number, hWPerM2K: number, ambientC: number): void;
}

/**
 * Temperature and degree of cure of one column, step by step.
 *
 * Finite volumes through the thickness, one lump for the tool, Runge's midpoint rule in time; heat of reaction
 * released where it arises, `heatJPerM3` for each unit of degree of cure.
 *
 * Limits: explicit; refuses a step longer than 1.8 times the fastest node's time (the midpoint rule is stable to 2).
 * Source: Incropera et al., Fundamentals of Heat and Mass Transfer, 6th ed., ch. 5 (lumped and explicit nodes).
 */
export function beginPoint(point: Point, startC: number, rate: ReactionRate, heatJPerM3: number): PointState {
  const { nodes } = point;
  const size = 1 + 2 * nodes;
  const nodeM = point.laminateM / nodes;
  const betweenWPerM2K = LAMINATE.conductivityWPerMK / nodeM;
  const halfM2KPerW = nodeM / 2 / LAMINATE.conductivityWPerMK;
  const toolToFirstWPerM2K = 1 / (CONTACT_M2K_PER_W + halfM2KPerW);
  const nodeJPerM2K = LAMINATE.densityKgPerM3 * LAMINATE.specificJPerKgK * nodeM;
  const reactionJPerM2 = heatJPerM3 * nodeM;
  const sink = point.sinkWPerM2K ?? 0;

  const state = new Float64Array(size).fill(startC);
  state.fill(point.startDegree, 1 + nodes);
  const slope = new Float64Array(size);
  const middle = new Float64Array(size);

  // The half step takes the rate of cure of the step before: still of second order, and half the exponentials.
  const findSlope = (at: Float64Array, airC: number, h: number, ambientC: number, isHalfStep: boolean): void => {
    const bagWPerM2K = 1 / (1 / h + point.bagM2KPerW + halfM2KPerW);
    const toolC = at[0]!;
    const firstC = at[1]!;
    const toTool = sink > 0 ? sink * (ambientC - toolC) : h * (airC - toolC);
    let flow = toolToFirstWPerM2K * (toolC - firstC);
    slope[0] = (toTool - flow) / point.toolJPerM2K;
    for (let n = 0; n < nodes; n++) {
      const hereC = at[1 + n]!;
      const out = n + 1 < nodes ? betweenWPerM2K * (hereC - at[2 + n]!) : bagWPerM2K * (hereC - airC);
      const cureRate = isHalfStep ? slope[1 + nodes + n]! : rate(hereC + 273.15, at[1 + nodes + n]!);
      slope[1 + n] = (flow - out + reactionJPerM2 * cureRate) / nodeJPerM2K;
      slope[1 + nodes + n] = cureRate;
      flow = out;
    }
  };
  const nodePerS =
    (2 * Math.max(betweenWPerM2K, toolToFirstWPerM2K) + 2 / (point.bagM2KPerW + halfM2KPerW)) / nodeJPerM2K;
  const advance: PointState['advance'] = (stepS, airFromC, airToC, hWPerM2K, ambientC) => {
    const h = hWPerM2K * point.position;
    const fastestPerS = Math.max(nodePerS, (2 * (h + toolToFirstWPerM2K)) / point.toolJPerM2K);
    if (fastestPerS * stepS > LONGEST_STEP) throw new Error(`a step of ${stepS} s is too long for nodes of ${nodeM} m`);
    findSlope(state, airFromC, h, ambientC, true);
    for (let i = 0; i < size; i++) middle[i] = state[i]! + (stepS / 2) * slope[i]!;
    findSlope(middle, (airFromC + airToC) / 2, h, ambientC, false);
    for (let i = 0; i < size; i++) state[i]! += stepS * slope[i]!;
  };
  return {
    get junctionC() {
      return state[1 + point.junction]!;
    },
    get degree() {
      return state[1 + nodes + point.junction]!;
    },
    get surfaceC() {
      return (state[0]! + state[nodes]!) / 2;
    },
    advance,
  };
}

import type { Point } from './simulator/point.ts';

/** ρ·cp·thickness of tools, J/(m² K), from handbook densities and specific heats. */
export const TOOLS = {
  /** 10 mm of carbon/epoxy: 1550 kg/m³ × 1000 J/(kg K). */
  carbon: 15_500,
  /** 9 mm of Invar: 8100 × 515. */
  invar: 37_500,
  /** 18 mm of mild steel: 7850 × 470. */
  steel: 66_400,
  /** A block of 40 mm of mild steel. */
  'steel block': 147_600,
  /** 12 mm of aluminium: 2700 × 896. */
  aluminium: 29_000,
  /** 6 mm of glass/epoxy. */
  glass: 11_300,
  /** A caul or stand: what is left of a tool for free-standing and pressed parts. */
  stand: 5_500,
} as const;
export type Tool = keyof typeof TOOLS;

/** Where in the vessel: share of the mean heat transfer. */
export const ZONES = { door: 0.88, front: 0.96, middle: 1.02, back: 1.1 } as const;
export type Zone = keyof typeof ZONES;

export type PartKind =
  | 'strut'
  | 'rudder-stock'
  | 'heavy-stock'
  | 'radome'
  | 'radome-skin'
  | 'post-cured-strut'
  | 'repair';

/** What is alike in all parts of a kind. */
export interface Kind {
  readonly title: string;
  readonly drawing: string;
  readonly drawingIssue: string;
  readonly tool: Tool;
  /** Where the part comes in cured: what its earlier cure left it at. */
  readonly startDegree?: number;
  /** Thermocouples: place in the part, and the column it lies in. */
  readonly sensors: readonly {
    readonly place: string;
    readonly column: Omit<Point, 'toolJPerM2K' | 'startDegree'>;
  }[];
}

const BAG = 0.02;

export const KINDS: Readonly<Record<PartKind, Kind>> = {
  strut: {
    title: 'Hydrofoil strut',
    drawing: 'SR-D-1104',
    drawingIssue: 'C',
    tool: 'carbon',
    sensors: [
      { place: 'lead', column: { laminateM: 0.004, nodes: 1, junction: 0, position: 1.08, bagM2KPerW: BAG } },
      { place: 'lag', column: { laminateM: 0.008, nodes: 2, junction: 1, position: 0.94, bagM2KPerW: BAG } },
      { place: 'trailing edge', column: { laminateM: 0.003, nodes: 1, junction: 0, position: 1, bagM2KPerW: BAG } },
    ],
  },
  'rudder-stock': {
    title: 'Rudder stock',
    drawing: 'SR-D-1210',
    drawingIssue: 'A',
    tool: 'aluminium',
    sensors: [
      { place: 'embedded, centre', column: { laminateM: 0.026, nodes: 5, junction: 2, position: 1, bagM2KPerW: BAG } },
      { place: 'lag', column: { laminateM: 0.03, nodes: 5, junction: 4, position: 0.86, bagM2KPerW: BAG } },
      { place: 'end', column: { laminateM: 0.012, nodes: 3, junction: 1, position: 1.06, bagM2KPerW: BAG } },
    ],
  },
  'heavy-stock': {
    title: 'Rudder stock, heavy',
    drawing: 'SR-D-1212',
    drawingIssue: 'A',
    tool: 'aluminium',
    sensors: [
      {
        place: 'bag side, root',
        column: { laminateM: 0.046, nodes: 12, junction: 11, position: 1.13, bagM2KPerW: 0.003 },
      },
      {
        place: 'tool side, root',
        column: { laminateM: 0.046, nodes: 12, junction: 0, position: 1.13, bagM2KPerW: 0.003 },
      },
    ],
  },
  radome: {
    title: 'Instrument radome',
    drawing: 'SR-D-1330',
    drawingIssue: 'B',
    tool: 'glass',
    sensors: [
      { place: 'crown', column: { laminateM: 0.0032, nodes: 1, junction: 0, position: 1.05, bagM2KPerW: 0.03 } },
      { place: 'flange', column: { laminateM: 0.0035, nodes: 1, junction: 0, position: 0.92, bagM2KPerW: 0.03 } },
      { place: 'rim', column: { laminateM: 0.0034, nodes: 1, junction: 0, position: 1, bagM2KPerW: 0.03 } },
    ],
  },
  'radome-skin': {
    title: 'Radome skin',
    drawing: 'SR-D-1331',
    drawingIssue: 'B',
    tool: 'stand',
    sensors: [
      { place: 'middle', column: { laminateM: 0.004, nodes: 1, junction: 0, position: 1, bagM2KPerW: 0.003 } },
      { place: 'edge', column: { laminateM: 0.004, nodes: 1, junction: 0, position: 0.85, bagM2KPerW: 0.005 } },
    ],
  },
  'post-cured-strut': {
    title: 'Hydrofoil strut',
    drawing: 'SR-D-1104',
    drawingIssue: 'C',
    tool: 'stand',
    startDegree: 0.965,
    sensors: [
      { place: 'tip', column: { laminateM: 0.004, nodes: 1, junction: 0, position: 1.05, bagM2KPerW: 0.002 } },
      { place: 'root', column: { laminateM: 0.008, nodes: 2, junction: 1, position: 0.92, bagM2KPerW: 0.002 } },
    ],
  },
  repair: {
    title: 'Repaired radome',
    drawing: 'SR-D-1330',
    drawingIssue: 'B',
    tool: 'glass',
    sensors: [
      {
        place: 'centre',
        column: { laminateM: 0.004, nodes: 1, junction: 0, position: 1.1, bagM2KPerW: 0.004, sinkWPerM2K: 3 },
      },
      {
        place: 'north',
        column: { laminateM: 0.004, nodes: 1, junction: 0, position: 0.95, bagM2KPerW: 0.005, sinkWPerM2K: 4 },
      },
      {
        place: 'south',
        column: { laminateM: 0.004, nodes: 1, junction: 0, position: 0.9, bagM2KPerW: 0.005, sinkWPerM2K: 4.5 },
      },
    ],
  },
};

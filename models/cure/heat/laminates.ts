import { laminateOf } from './mixture.ts';

/** What a laminate is as a slab, near cure temperatures. All vary by product; a workshop's own figures hold. */
export interface LaminateFigures {
  readonly densityKgM3: number;
  readonly specificHeatJKgK: number;
  /** Across the thickness. */
  readonly conductivityWMK: number;
  /** Null where the source does not say; then only a heat by the laminate's mass can be used. */
  readonly resinDensityKgM3: number | null;
}

export interface LaminateEntry {
  readonly name: string;
  /** Fibre by volume that the source gives with its figures. */
  readonly fibreFraction?: number;
  /** True where the figures are made for the fibre fraction asked for. */
  readonly isMixed: boolean;
  readonly source: string;
  /** For a fibre fraction by volume. */
  readonly figuresAt: (fibreFraction: number) => LaminateFigures;
}

/** Laminates to start from. */
export const LAMINATES: readonly LaminateEntry[] = [
  {
    name: 'carbon/epoxy from fibre and resin',
    isMixed: true,
    source:
      'Loos & Springer, J Compos Mater 17 (1983) 135–169, fibre and resin, from memory; mixed by mass and volume, ' +
      'conductivity by Springer & Tsai (1967)',
    figuresAt: (fibreFraction) => ({
      ...laminateOf({
        fibreDensityKgM3: 1790,
        resinDensityKgM3: 1260,
        fibreSpecificHeatJKgK: 712,
        resinSpecificHeatJKgK: 1260,
        fibreConductivityWMK: 26,
        resinConductivityWMK: 0.167,
        fibreFraction,
      }),
      resinDensityKgM3: 1260,
    }),
  },
  {
    name: 'carbon/epoxy AS4/8552',
    fibreFraction: 0.574,
    isMixed: false,
    source:
      'densities and fibre fraction as public lists of the data sheet have them; specific heat (900 to 1250 from 20 ' +
      'to 180 °C) and conductivity (0.5 to 0.7) from memory',
    figuresAt: () => ({
      densityKgM3: 1580,
      specificHeatJKgK: 1080,
      conductivityWMK: 0.6,
      resinDensityKgM3: 1301,
    }),
  },
  {
    name: 'carbon/epoxy AS4/3501-6',
    isMixed: false,
    source: 'Bogetti & Gillespie, J Compos Mater 25 (1991) 239–273, from memory',
    figuresAt: () => ({
      densityKgM3: 1520,
      specificHeatJKgK: 942,
      conductivityWMK: 0.4457,
      resinDensityKgM3: null,
    }),
  },
  {
    name: 'glass/polyester',
    isMixed: false,
    source: 'Bogetti & Gillespie, J Compos Mater 25 (1991) 239–273, from memory',
    figuresAt: () => ({
      densityKgM3: 1890,
      specificHeatJKgK: 1260,
      conductivityWMK: 0.2163,
      resinDensityKgM3: null,
    }),
  },
];

/** Properties of tool materials and of common constituents near cure temperatures. All vary by grade; a workshop's own figures hold. */
export interface Material {
  readonly name: string;
  readonly densityKgM3: number;
  readonly specificHeatJKgK: number;
  /** For a laminate, across the thickness. */
  readonly conductivityWMK: number;
  readonly source: string;
}

export const TOOL_MATERIALS: readonly Material[] = [
  {
    name: 'mild steel',
    densityKgM3: 7850,
    specificHeatJKgK: 470,
    conductivityWMK: 50,
    source: 'handbook values, from memory',
  },
  {
    name: 'stainless steel 304',
    densityKgM3: 8000,
    specificHeatJKgK: 500,
    conductivityWMK: 16,
    source: 'handbook values, from memory',
  },
  {
    name: 'aluminium 6061',
    densityKgM3: 2700,
    specificHeatJKgK: 896,
    conductivityWMK: 167,
    source: 'handbook values, from memory',
  },
  {
    name: 'Invar 36',
    densityKgM3: 8100,
    specificHeatJKgK: 515,
    conductivityWMK: 10.5,
    source: 'handbook values, from memory; density 8050 to 8100 in two public lists',
  },
  {
    name: 'carbon/epoxy tooling laminate',
    densityKgM3: 1550,
    specificHeatJKgK: 1000,
    conductivityWMK: 0.6,
    source: 'common practice, from memory',
  },
];

/** Film coefficients to start from, W/(m² K): what a vessel's own lag test gives holds. */
export const FILM_COEFFICIENTS_WM2K = {
  oven: [5, 40],
  'autoclave near ambient pressure': [20, 60],
  'autoclave at 6 to 7 bar': [60, 200],
} as const;

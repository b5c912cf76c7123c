/** A roll of prepreg, and what it had aged by the day it was laid up. Invented. */
export interface Roll {
  readonly roll: string;
  readonly material: string;
  readonly batch: string;
  /** Days out of the freezer, of 30 allowed. */
  readonly daysOut: number;
  /** Degree of cure it had reached by then. */
  readonly startDegree: number;
}

export const ROLLS: Readonly<Record<string, Roll>> = {
  'K-17': { roll: 'K-17', material: 'skerry-180 tape', batch: 'B-0911', daysOut: 6, startDegree: 0.011 },
  'K-18': { roll: 'K-18', material: 'skerry-180 tape', batch: 'B-0911', daysOut: 8, startDegree: 0.012 },
  'K-20': { roll: 'K-20', material: 'skerry-180 tape', batch: 'B-1007', daysOut: 5, startDegree: 0.011 },
  'K-21': { roll: 'K-21', material: 'skerry-180 tape', batch: 'B-1007', daysOut: 9, startDegree: 0.012 },
  'K-23': { roll: 'K-23', material: 'skerry-180 tape', batch: 'B-1102', daysOut: 27, startDegree: 0.031 },
  'K-24': { roll: 'K-24', material: 'skerry-180 tape', batch: 'B-1102', daysOut: 7, startDegree: 0.011 },
  'K-26': { roll: 'K-26', material: 'skerry-180 tape', batch: 'B-1188', daysOut: 10, startDegree: 0.013 },
  'K-27': { roll: 'K-27', material: 'skerry-180 tape', batch: 'B-1188', daysOut: 4, startDegree: 0.011 },
  'G-05': { roll: 'G-05', material: 'skerry-120 glass fabric', batch: 'C-0204', daysOut: 6, startDegree: 0.021 },
  'G-06': { roll: 'G-06', material: 'skerry-120 glass fabric', batch: 'C-0204', daysOut: 12, startDegree: 0.023 },
  'G-08': { roll: 'G-08', material: 'skerry-120 glass fabric', batch: 'C-0231', daysOut: 5, startDegree: 0.021 },
};

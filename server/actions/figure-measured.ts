import { measuredDegree } from '../../models/measured/measured-degree.ts';
import { strainDifference } from '../../models/measured/strain-difference.ts';
import { ultimateRatio } from '../../models/measured/ultimate-ratio.ts';
import type { Measured } from '../contract/results.ts';

/** The one figure a measured result comes to; refuses what cannot have been measured. */
export function figureMeasured(measured: Measured): { readonly figure: number | null; readonly unit: string | null } {
  switch (measured.kind) {
    case 'dsc':
      return { figure: rounded(100 * measuredDegree(measured.residualJG, measured.totalJG)), unit: '%' };
    case 'dma':
      return { figure: measured.tgC, unit: '°C' };
    case 'ultrasonic':
      return measured.largestMm === null ? NONE : { figure: measured.largestMm, unit: 'mm' };
    case 'short-beam':
      return { figure: measured.strengthMpa, unit: 'MPa' };
    case 'load':
      if (measured.limitKn !== null && measured.ultimateKn !== null) {
        ultimateRatio(measured.limitKn, measured.ultimateKn);
      }
      return { figure: measured.reachedKn, unit: 'kN' };
    case 'strain': {
      const { first, second } = measured;
      return { figure: rounded(100 * strainDifference(first.microstrain, second.microstrain)), unit: '%' };
    }
  }
}

const NONE = { figure: null, unit: null };

/** No balance or gauge gives more digits. */
function rounded(percent: number): number {
  return Number(percent.toPrecision(6));
}

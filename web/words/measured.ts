import { USUAL_ULTIMATE_RATIO, ultimateRatio } from '../../models/measured/ultimate-ratio.ts';
import type { Measured } from '../../server/contract/results.ts';
import { asWritten } from './figures.ts';

export type MeasuredKind = Measured['kind'] | 'other';

export const KIND_NAMES: Readonly<Record<MeasuredKind, string>> = {
  other: 'another test or inspection',
  load: 'load test',
  dsc: 'DSC residual cure',
  dma: 'DMA glass transition',
  ultrasonic: 'ultrasonic',
  'short-beam': 'short-beam shear',
  strain: 'two strain readings compared',
};

export const CRITERIA = {
  'storage-onset': 'onset of storage modulus E′',
  'loss-peak': 'peak of loss modulus E″',
  'tan-delta-peak': 'peak of tan δ',
} as const;

export const ENDS = { held: 'held', broke: 'broke', stopped: 'stopped' } as const;

/** What was measured, in one sentence; the figure stands beside it. */
export function measuredWords(measured: Measured): string {
  const by = measured.method ? ` (${measured.method})` : '';
  switch (measured.kind) {
    case 'dsc':
      return `Residual ${asWritten(measured.residualJG)} of ${asWritten(measured.totalJG, 'J/g')}: measured degree of cure${by}.`;
    case 'dma':
      return `Tg by ${CRITERIA[measured.criterion]}${by}.`;
    case 'ultrasonic':
      return measured.largestMm === null ? `No indication${by}.` : `Largest indication${by}.`;
    case 'short-beam':
      return `Short-beam strength${measured.specimens === null ? '' : ` of ${measured.specimens} specimens`}${by}.`;
    case 'load':
      return loadWords(measured) + (by === '' ? '' : `${by}.`);
    case 'strain': {
      const { first, second, loadKn } = measured;
      const at = loadKn === null ? '' : ` at ${asWritten(loadKn, 'kN')}`;
      return `${first.by} ${asWritten(first.microstrain)} and ${second.by} ${asWritten(second.microstrain, 'µm/m')}${at}: they differ by this of their mean${by}.`;
    }
  }
}

function loadWords({ limitKn, ultimateKn, reachedKn, end }: Extract<Measured, { kind: 'load' }>): string {
  const asked = [
    limitKn === null ? '' : `limit load ${asWritten(limitKn, 'kN')}`,
    ultimateKn === null ? '' : `ultimate load ${asWritten(ultimateKn, 'kN')}`,
  ].filter(Boolean);
  const ratio = limitKn === null || ultimateKn === null ? '' : ` ${ratioWords(limitKn, ultimateKn)}`;
  return `${ENDS[end] === 'broke' ? 'Broke' : ENDS[end] === 'held' ? 'Held' : 'Stopped'} at ${asWritten(reachedKn, 'kN')}${asked.length === 0 ? '' : `; ${asked.join(', ')}`}.${ratio}`;
}

/** The two loads' ratio, beside what is common practice. */
export function ratioWords(limitKn: number, ultimateKn: number): string {
  if (!(limitKn > 0) || !(ultimateKn >= limitKn)) return 'The ultimate load is below the limit load.';
  const ratio = Number(ultimateRatio(limitKn, ultimateKn).toFixed(3));
  const usual = ratio === USUAL_ULTIMATE_RATIO ? 'as' : `${USUAL_ULTIMATE_RATIO}`;
  return `Ultimate is ${asWritten(ratio)} times limit; ${usual === 'as' ? 'that is common practice' : `${usual} is common practice`}.`;
}

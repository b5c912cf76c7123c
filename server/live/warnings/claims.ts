import type { Warning } from '../../contract/live.ts';
import type { SeenVessel } from '../engine/live-engine.ts';

/** Something that is so now, and that a person should know while it is. */
export interface Claim {
  readonly kind: Warning['kind'];
  readonly subject: string;
  readonly text: string;
}

/** What of a vessel a person should know now. */
export function claimsOf({ judged, sources, run }: SeenVessel): Claim[] {
  const claims: Claim[] = sources
    .filter(({ state }) => state === 'silent' || state === 'cannot-be-reached')
    // Between runs a logger may be switched off; while a run is open its silence is a gap in the record.
    .filter(({ lastScan }) => run !== null || lastScan !== null)
    .map(({ name, state, because }) => ({
      kind: 'source-silent',
      subject: name,
      text: `${name} ${state === 'silent' ? 'is silent' : 'cannot be reached'}${because === null ? '' : `: ${because}`}.`,
    }));
  if (judged === null) return claims;
  const { evaluation, forecasts } = judged;
  for (const { part, findings } of evaluation.parts) {
    const whose = part === null ? '' : ` (${part})`;
    for (const { limit, outcome, because } of findings) {
      if (outcome === 'not-met') claims.push({ kind: 'limit-broken', subject: limit + whose, text: because });
    }
  }
  for (const { part, nearing } of forecasts) {
    const whose = part === null ? '' : ` (${part})`;
    for (const { limit, text } of nearing) claims.push({ kind: 'approaching-limit', subject: limit + whose, text });
  }
  for (const { channel, state, faults } of evaluation.sensors) {
    const [fault] = faults;
    if (state === 'suspect' && fault !== undefined) {
      claims.push({ kind: 'sensor-fault', subject: channel, text: `${channel}: ${fault.because}` });
    }
  }
  return claims;
}

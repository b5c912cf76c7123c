import { DomainError } from '../errors.ts';
import type { MaterialRecords } from '../material/ledger.ts';
import type { Life } from '../material/lives.ts';
import type { MaterialState } from '../material/material-state.ts';
import { partMaterialStates } from '../material/part-materials.ts';
import { heatOnMs } from './events.ts';
import { type Found, unfinished } from './finding.ts';
import type { Judgement } from './judgement.ts';

const LIMIT = 'material/out-life';

/** `material/out-life`: every material of the part within each of its lives as the heat came on. */
export function outLifeLimit(j: Judgement): Found {
  const { materials, part } = j;
  const recorded = materials?.parts.find((one) => one.part === part?.part)?.materials;
  if (materials === null || part === null || recorded === undefined || recorded.length === 0) {
    const because = recorded === undefined ? 'Not recorded.' : 'All material on record was cured in an earlier run.';
    return { limit: LIMIT, outcome: 'cannot-tell', unit: '', because };
  }
  const lateMs = heatOnMs(j, 'least');
  if (lateMs === null) {
    const because = j.isOpen
      ? 'The heat is not on yet.'
      : 'The heat never came on, so there is no instant to judge at.';
    return { limit: LIMIT, outcome: unfinished(j), unit: '', because };
  }
  const foundAt = (ms: number) => worstAt(materials, part.part, ms);
  const found = foundAt(lateMs);
  // Where a gap hides the instant, material is oldest at its latest and youngest at its earliest.
  const earlyMs = heatOnMs(j, 'most') ?? lateMs;
  const earliest = earlyMs === lateMs ? found : foundAt(earlyMs);
  if (earliest.outcome === found.outcome) return found;
  return { ...found, outcome: 'cannot-tell', because: `A gap hides when the heat came on: ${found.because}` };
}

const RANK: Readonly<Record<Life['outcome'], number>> = { met: 0, 'cannot-tell': 1, 'not-met': 2 };

function worstAt(materials: MaterialRecords, part: string, heatOn: number): Found {
  let states: readonly MaterialState[];
  try {
    states = partMaterialStates(materials, part, heatOn);
  } catch (error) {
    // A ledger that contradicts the run shows nothing about it; the finding says what contradicts what.
    if (!(error instanceof DomainError) || error.code !== 'event-impossible') throw error;
    return { limit: LIMIT, outcome: 'cannot-tell', unit: '', because: `${error.message}.` };
  }
  const worst = states.reduce((a, b) => (isWorse(b, a) ? b : a));
  const life = worst.lives.find(({ outcome }) => outcome === worst.outcome)!;
  const isClock = life.unit === 'min' && life.atMost !== null;
  const of = life.unit === 'min' ? 1440 : 1;
  const all =
    states.length === 1 ? '' : `All ${states.length} materials were in life as the heat came on; nearest to its end: `;
  return {
    limit: LIMIT,
    outcome: worst.outcome,
    unit: isClock ? 'd' : '',
    ...(life.atMost === null ? {} : { bounds: { atMost: life.atMost / of } }),
    observed: life.atMost === null ? null : life.used / of,
    possible: life.usedAtMost === null ? null : life.usedAtMost / of,
    fromMs: heatOn,
    because: worst.outcome === 'met' ? `${all}${worst.because}` : worst.because,
  };
}

/** Of two in life, the one with less of its out-life left is nearer to its end. */
function isWorse(one: MaterialState, other: MaterialState): boolean {
  if (one.outcome !== other.outcome) return RANK[one.outcome] > RANK[other.outcome];
  return (one.lives[0]!.leftMinutes ?? Infinity) < (other.lives[0]!.leftMinutes ?? Infinity);
}

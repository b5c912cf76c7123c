import type { Warning } from '../../contract/live.ts';
import type { Db } from '../../store/database.ts';
import { isoFromMs } from '../../store/instants.ts';
import { endWarning, insertWarning, listLasting, requireWarning, type WarningRow } from '../../store/warnings.ts';
import type { SeenVessel } from '../engine/live-engine.ts';
import { type Claim, claimsOf } from './claims.ts';

export interface WarningDeskParts {
  readonly db: Db;
  /** Told of each warning as it begins, and again when it is over. */
  readonly tell: (warning: Warning) => void;
}

/** Keeps what a person should know: each begins once, lasts while it is so, and is over. */
export interface WarningDesk {
  /** Looks at what a vessel came to. */
  look(vesselId: number, seen: SeenVessel): void;
  /** What is so of the whole program, such as a disk that fills. */
  lookAtProgram(claims: readonly Claim[], nowMs: number): void;
  /** Something that happened and does not last. */
  note(claim: Claim, nowMs: number, vesselId?: number | null): void;
  lasting(vesselId: number): Warning[];
}

/** A thing that hovers about its limit is one warning: it is over only once it has not been so for a minute. */
const OVER_AFTER_MS = 60_000;

interface Lasting {
  readonly warning: WarningRow;
  /** Since when it is no longer so; null while it is. */
  goneSinceMs: number | null;
}

export function openWarningDesk({ db, tell }: WarningDeskParts): WarningDesk {
  const lasting = new Map<string, Lasting>();
  for (const warning of listLasting(db)) lasting.set(keyOf(warning.vesselId, warning), { warning, goneSinceMs: null });

  const begin = (vesselId: number | null, run: number | null, claim: Claim, nowMs: number) => {
    const id = insertWarning(db, { ...claim, vesselId, run }, isoFromMs(nowMs));
    const warning = requireWarning(db, id);
    tell(warning);
    return warning;
  };

  const end = (key: string, { warning }: Lasting, nowMs: number) => {
    const over = isoFromMs(nowMs);
    endWarning(db, warning.id, over);
    lasting.delete(key);
    tell({ ...warning, over });
  };

  const settle = (vesselId: number | null, run: number | null, claims: readonly Claim[], nowMs: number) => {
    const now = new Set(claims.map((claim) => keyOf(vesselId, claim)));
    for (const claim of claims) {
      const key = keyOf(vesselId, claim);
      const known = lasting.get(key);
      if (known !== undefined && (known.warning.run === run || claim.kind === 'source-silent'))
        known.goneSinceMs = null;
      else {
        if (known !== undefined) end(key, known, nowMs);
        lasting.set(key, { warning: begin(vesselId, run, claim, nowMs), goneSinceMs: null });
      }
    }
    for (const [key, one] of lasting) {
      if (one.warning.vesselId !== vesselId || now.has(key)) continue;
      one.goneSinceMs ??= nowMs;
      // What was of a run that is closed is over with it.
      if (one.warning.run !== run || nowMs - one.goneSinceMs >= OVER_AFTER_MS) end(key, one, nowMs);
    }
  };

  return {
    look: (vesselId, seen) => settle(vesselId, seen.run, claimsOf(seen), seen.nowMs),
    lookAtProgram: (claims, nowMs) => settle(null, null, claims, nowMs),
    note(claim, nowMs, vesselId = null) {
      const { id } = begin(vesselId, null, claim, nowMs);
      endWarning(db, id, isoFromMs(nowMs));
    },
    lasting: (vesselId) =>
      listLasting(db)
        .filter((warning) => warning.vesselId === vesselId || warning.vesselId === null)
        .map(({ vesselId: _vesselId, ...warning }) => warning),
  };
}

function keyOf(vesselId: number | null, { kind, subject }: Pick<Claim, 'kind' | 'subject'>): string {
  return JSON.stringify([vesselId, kind, subject]);
}

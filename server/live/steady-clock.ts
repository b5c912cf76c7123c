/** Further than this, ms, the wall clock did not drift: it was set. */
const JUMP_MS = 2000;

export interface SteadyClockParts {
  /** The wall clock, ms since 1970-01-01T00:00:00Z; people and programs set it. */
  readonly wall: () => number;
  /** Ms since some instant; never set. */
  readonly monotonic: () => number;
  readonly hasOpenRun: (vesselId: number) => boolean;
  /** When the last scan of an open run came, and when the next was due after it, ms; null where there is none. */
  readonly lastOf: (vesselId: number) => { readonly arrivedMs: number; readonly dueMs: number } | null;
  readonly tell: (jump: ClockJump) => void;
}

/** What was noticed of the wall clock. */
export type ClockJump =
  /** The wall clock was set while the program ran; positive is forward. */
  | { readonly kind: 'clock-jumped'; readonly byMs: number }
  /** The program started with a wall clock that stands before the last kept scan: stamps go on after that. */
  | { readonly kind: 'clock-behind'; readonly vesselId: number; readonly byMs: number };

/** Stamps for what we read ourselves, ms since 1970-01-01T00:00:00Z. */
export interface SteadyClock {
  /** The instant now in a vessel. While a run is open in it, it never goes back and never jumps. */
  now(vesselId: number): number;
  /** From now on a vessel has a time of its own, as an invented one has, made of its time now: it is stamped by that. */
  lead(vesselId: number, begin: (nowMs: number) => () => number): void;
}

interface Base {
  readonly wallMs: number;
  readonly monotonicMs: number;
}

/** The wall clock at the start and the time that has passed since; without an open run, the wall clock. */
export function createSteadyClock(parts: SteadyClockParts): SteadyClock {
  const { wall, monotonic, hasOpenRun, tell } = parts;
  const bases = new Map<number, Base>();
  const led = new Map<number, () => number>();
  let watched: Base = { wallMs: wall(), monotonicMs: monotonic() };
  const watchForJump = (wallMs: number, monotonicMs: number) => {
    const byMs = wallMs - steadyMs(watched, monotonicMs);
    // Followed call by call: what drifts slowly is no jump, however far it comes in a year.
    watched = { wallMs, monotonicMs };
    if (Math.abs(byMs) > JUMP_MS) tell({ kind: 'clock-jumped', byMs });
  };
  const begin = (vesselId: number, wallMs: number, monotonicMs: number): Base => {
    const last = parts.lastOf(vesselId);
    if (last === null || last.arrivedMs <= wallMs) return { wallMs, monotonicMs };
    tell({ kind: 'clock-behind', vesselId, byMs: wallMs - last.arrivedMs });
    return { wallMs: last.dueMs, monotonicMs };
  };
  return {
    now(vesselId) {
      const wallMs = wall();
      const monotonicMs = monotonic();
      watchForJump(wallMs, monotonicMs);
      const own = led.get(vesselId);
      if (own !== undefined) return own();
      if (!hasOpenRun(vesselId)) {
        bases.set(vesselId, { wallMs, monotonicMs });
        return wallMs;
      }
      const base = bases.get(vesselId) ?? begin(vesselId, wallMs, monotonicMs);
      bases.set(vesselId, base);
      return steadyMs(base, monotonicMs);
    },
    lead: (vesselId, begin) => void led.set(vesselId, begin(led.get(vesselId)?.() ?? wall())),
  };
}

function steadyMs({ wallMs, monotonicMs }: Base, atMs: number): number {
  return wallMs + (atMs - monotonicMs);
}

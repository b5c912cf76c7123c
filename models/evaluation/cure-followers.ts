import { beginCure, type CureProgress } from '../cure/cure-progress.ts';
import type { Resin } from '../cure/resin.ts';
import { DomainError } from '../errors.ts';
import type { RunDigest } from '../run/digest.ts';
import type { Track } from '../run/track.ts';
import { kelvinFromCelsius } from '../units.ts';

/** How a gap is filled for an estimate: a straight line, or as cold or as hot as the bound on change allows. */
export type CureFill = 'line' | 'cold' | 'hot';

/** The estimated cure of one sensor, carried on as readings come. */
export interface FollowedCure {
  readonly progress: CureProgress;
  /** Why the resin's set gives no estimate; null where it does. */
  readonly refusal: string | null;
}

/** What a follower is asked to follow. */
export interface CureSubject {
  readonly track: Track;
  readonly resin: Resin;
  readonly startDegree: number | null;
  readonly longestGapMs: number;
  /** In °C per ms. */
  readonly changesAtMost: number;
  /** Added to every temperature, K: a thermocouple moved by its uncertainty. */
  readonly offsetK: number;
}

/** No gap takes a temperature beyond what a thermocouple can read, in °C. */
const COLDEST_C = -200;
export const HOTTEST_C = 1300;

const followersOf = new WeakMap<RunDigest, Map<string, Follower>>();
const resinNumbers = new WeakMap<Resin, number>();
let resinsSeen = 0;

/** The cure of a sensor up to its last reading. Asking again after more scans goes on from where it stood. */
export function followCure(digest: RunDigest, subject: CureSubject, fill: CureFill): FollowedCure {
  let followers = followersOf.get(digest);
  if (followers === undefined) {
    followers = new Map();
    followersOf.set(digest, followers);
  }
  const { track, resin, startDegree, longestGapMs, changesAtMost, offsetK } = subject;
  const key = [track.name, numberOf(resin), startDegree, longestGapMs, changesAtMost, offsetK, fill].join('/');
  let follower = followers.get(key);
  if (follower === undefined) {
    follower = new Follower(subject, fill, digest.log.from);
    followers.set(key, follower);
  }
  return follower.extend();
}

function numberOf(resin: Resin): number {
  let number = resinNumbers.get(resin);
  if (number === undefined) {
    number = resinsSeen++;
    resinNumbers.set(resin, number);
  }
  return number;
}

class Follower {
  readonly #subject: CureSubject;
  readonly #fill: CureFill;
  readonly #originMs: number;
  readonly #progress: CureProgress;
  #done = 0;
  #refusal: string | null = null;

  constructor(subject: CureSubject, fill: CureFill, originMs: number) {
    this.#subject = subject;
    this.#fill = fill;
    this.#originMs = originMs;
    this.#progress = beginCure(subject.resin, subject.startDegree === null ? {} : { startDegree: subject.startDegree });
  }

  extend(): FollowedCure {
    const { track } = this.#subject;
    try {
      for (; this.#refusal === null && this.#done < track.length; this.#done++) this.#take(this.#done);
    } catch (error) {
      // A set that cannot be integrated gives no estimate; the rest of the run is judged all the same.
      if (!(error instanceof DomainError)) throw error;
      this.#refusal = error.message;
    }
    return { progress: this.#progress, refusal: this.#refusal };
  }

  #take(i: number): void {
    const { track, longestGapMs } = this.#subject;
    if (this.#fill !== 'line' && i > 0 && track.timeMs(i) - track.timeMs(i - 1) > longestGapMs) this.#crossGap(i);
    this.#accept(track.timeMs(i), track.reading(i));
  }

  /** The furthest way between the two ends of a gap: away from one at the greatest change, back to the other. */
  #crossGap(i: number): void {
    const { track, changesAtMost } = this.#subject;
    const sign = this.#fill === 'hot' ? 1 : -1;
    const [from, until] = [track.timeMs(i - 1), track.timeMs(i)];
    const [before, after] = [track.reading(i - 1), track.reading(i)];
    if (Math.abs(after - before) > changesAtMost * (until - from)) return;
    const turnMs = (from + until) / 2 + (sign * (after - before)) / (2 * changesAtMost);
    const turnC = before + sign * changesAtMost * (turnMs - from);
    const boundC = sign > 0 ? HOTTEST_C : COLDEST_C;
    if (sign * (turnC - boundC) <= 0) {
      if (turnMs > from && turnMs < until) this.#accept(turnMs, turnC);
      return;
    }
    this.#accept(from + Math.abs(boundC - before) / changesAtMost, boundC);
    this.#accept(until - Math.abs(boundC - after) / changesAtMost, boundC);
  }

  #accept(timeMs: number, temperatureC: number): void {
    const temperatureK = kelvinFromCelsius(temperatureC) + this.#subject.offsetK;
    this.#progress.accept((timeMs - this.#originMs) / 1000, temperatureK);
  }
}

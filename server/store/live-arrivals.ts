import type { Db } from './database.ts';

/** Arrivals reserved at once: one write in so many scans. */
const RESERVED_AT_ONCE = 100_000;

interface Reserve {
  last: number;
  until: number;
}

const reserves = new WeakMap<Db, Reserve>();

/**
 * Makes sure that the next `count` arrivals may be given out; outside any transaction, so that a rollback cannot take
 * back a reservation that was used.
 */
export function reserveArrivals(db: Db, count: number): void {
  const reserve = reserveOf(db);
  if (reserve.until - reserve.last >= count) return;
  const from = db
    .transaction(() => {
      const reserved = reservedTo(db);
      db.prepare('UPDATE live_arrivals SET reserved_to = ?').run(reserved + Math.max(count, RESERVED_AT_ONCE));
      return reserved;
    })
    .immediate();
  // Another program may have reserved what follows ours: then ours is left, and arrivals rise all the same.
  if (from !== reserve.until) reserve.last = from;
  reserve.until = from + Math.max(count, RESERVED_AT_ONCE);
}

/** The next arrival; rises for ever. */
export function nextArrival(db: Db): number {
  const reserve = reserveOf(db);
  if (reserve.last >= reserve.until) throw new Error('arrivals are reserved before they are given out');
  reserve.last += 1;
  return reserve.last;
}

/** No scan that is kept has a later arrival. */
export function lastArrival(db: Db): number {
  return reserves.get(db)?.last ?? reservedTo(db);
}

function reserveOf(db: Db): Reserve {
  const known = reserves.get(db);
  if (known !== undefined) return known;
  const from = reservedTo(db);
  const reserve = { last: from, until: from };
  reserves.set(db, reserve);
  return reserve;
}

function reservedTo(db: Db): number {
  return db.prepare<[], number>('SELECT reserved_to FROM live_arrivals').pluck().get() ?? 0;
}

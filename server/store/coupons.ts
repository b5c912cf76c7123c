import type { Coupon } from '../contract/layups.ts';
import type { Db } from './database.ts';

/** Coupons whose latest record says that they belong to this part, by their code. */
export function readCoupons(db: Db, partId: number): Coupon[] {
  return db
    .prepare<[number], Omit<Coupon, 'deed'> & { at: string; by: string }>(
      `SELECT code, run_id AS run, position, reason, at, by FROM coupons AS about
       WHERE part_id = ? AND id = (SELECT max(id) FROM coupons WHERE code = about.code) ORDER BY code`,
    )
    .all(partId)
    .map(({ at, by, ...coupon }) => ({ ...coupon, deed: { at, by } }));
}

export function isCouponKnown(db: Db, code: string): boolean {
  return db.prepare('SELECT 1 FROM coupons WHERE code = ?').get(code) !== undefined;
}

export function insertCoupon(db: Db, partId: number, { deed, ...coupon }: Coupon): void {
  db.prepare(
    `INSERT INTO coupons (code, part_id, run_id, position, reason, at, by)
     VALUES (@code, @partId, @run, @position, @reason, @at, @by)`,
  ).run({ partId, ...coupon, ...deed });
}

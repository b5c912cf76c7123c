import { randomBytes } from 'node:crypto';
import type { MadeKey } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import { insertKey, requireKey } from '../store/sender-keys.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Makes a key with which a sender may push scans of one vessel. The key itself is answered once and kept nowhere. */
export function makeKey(parts: ActionParts, vessel: string, name: string): MadeKey {
  const { db } = parts;
  const key = `dwk_${randomBytes(24).toString('base64url')}`;
  return db
    .transaction(() => {
      const deed = deedOf(parts);
      const vesselId = requireVessel(db, vessel);
      const id = insertKey(db, { vesselId, name, key, ...deed });
      appendAudit(db, { ...deed, verb: 'make-key', subject: `vessel/${vessel}`, details: { key: id, name } });
      return { ...requireKey(db, vesselId, id), key };
    })
    .immediate();
}

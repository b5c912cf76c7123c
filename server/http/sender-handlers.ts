import { makeKey } from '../actions/make-key.ts';
import { revokeKey } from '../actions/revoke-key.ts';
import { pushScans } from '../live/push-scans.ts';
import { listKeys } from '../store/sender-keys.ts';
import { requireVessel } from '../store/vessels.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';

export const senderHandlers: SomeHandlers<'listKeys' | 'makeKey' | 'revokeKey' | 'push'> = {
  listKeys: ({ db }, { params }) => ({ keys: listKeys(db, requireVessel(db, params.vessel ?? '')) }),
  makeKey: (parts, { params, body }) => makeKey(parts, params.vessel ?? '', body.name),
  revokeKey(parts, { params, body }) {
    const { vessel = '' } = params;
    revokeKey(parts, vessel, numberIn(params, 'key'), body.reason);
    return { keys: listKeys(parts.db, requireVessel(parts.db, vessel)) };
  },
  push: (parts, { body, key }) => pushScans(parts, key, body),
};

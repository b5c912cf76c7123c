import { acknowledge } from '../actions/acknowledge-warning.ts';
import { setWarningRoutes } from '../actions/set-warning-routes.ts';
import type { Db } from '../store/database.ts';
import { listWarnings } from '../store/warnings.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';

const MOST_LISTED = 200;

export const warningHandlers: SomeHandlers<
  'listWarnings' | 'acknowledgeWarning' | 'readWarningRoutes' | 'setWarningRoutes'
> = {
  listWarnings: ({ db }) => warningsOf(db),
  acknowledgeWarning(parts, { params, body }) {
    acknowledge(parts, numberIn(params, 'warning'), body.text);
    return warningsOf(parts.db);
  },
  readWarningRoutes: ({ telling }) => telling.view(),
  setWarningRoutes(parts, { body }) {
    setWarningRoutes(parts, body);
    return parts.telling.view();
  },
};

function warningsOf(db: Db) {
  return { warnings: listWarnings(db, MOST_LISTED).map(({ vesselId: _vesselId, ...warning }) => warning) };
}

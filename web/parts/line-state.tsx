import { clockWithSeconds } from '../words/clock.ts';
import { NO_NEWS_MS } from '../words/live.ts';
import { zone } from '../workshop.ts';

/** Whether news are too old to be shown as the present. */
export function isNewsOld(isHeard: boolean, heardMs: number, nowMs: number): boolean {
  return !isHeard || nowMs - heardMs > NO_NEWS_MS;
}

/** Says so where the server is not heard: what stands on the page is then the past. */
export function LineState({ isHeard, heardMs, nowMs }: { isHeard: boolean; heardMs: number; nowMs: number }) {
  if (heardMs === 0 || !isNewsOld(isHeard, heardMs, nowMs)) return null;
  return (
    <div class="notice amber line-state" role="alert">
      <p>
        <b>
          {isHeard ? 'Nothing new' : 'The server is not heard'} since {clockWithSeconds(heardMs, zone.value)}.
        </b>{' '}
        Figures on this page are as of then. {isHeard ? '' : 'It is being asked again by itself.'}
      </p>
    </div>
  );
}

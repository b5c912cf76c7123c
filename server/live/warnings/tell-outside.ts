import type { Warning } from '../../contract/live.ts';
import type { WarningRoutes, WarningRoutesView } from '../../contract/warnings.ts';
import type { Db } from '../../store/database.ts';
import { findMailPassword, findWarningRoutes } from '../../store/warning-routes.ts';

export interface TellingParts {
  readonly db: Db;
  readonly clock: () => number;
  readonly log: { error(facts: object, message: string): void };
}

/** Tells warnings beyond the screen, by webhook and by e-mail where they are set up. */
export interface Telling {
  tell(warning: Warning): void;
  /** Where they are told, and what became of the last message each way. */
  view(): WarningRoutesView;
  /** Resolves when everything that waited was told or given up. */
  close(): Promise<void>;
}

const TIMEOUT_MS = 10_000;
const TRIES = 3;
const PAUSE_MS = 2000;
/** Messages that wait at once; a storm of warnings is on the screen, not in a mailbox. */
const MOST_WAITING = 100;

const CAUTION =
  'Advisory only: this is no safety function, and nothing in it says that a vessel is safe to open. ' +
  'The governing specification, local code and licensed practice decide.';

type Way = 'webhook' | 'mail';

export function startTelling({ db, clock, log }: TellingParts): Telling {
  const last: Record<Way, WarningRoutesView['lastMail']> = { webhook: null, mail: null };
  const waiting: Record<Way, Promise<void>> = { webhook: Promise.resolve(), mail: Promise.resolve() };
  const count: Record<Way, number> = { webhook: 0, mail: 0 };
  let isClosed = false;

  const queue = (way: Way, send: () => Promise<void>) => {
    if (isClosed || count[way] >= MOST_WAITING) return;
    count[way] += 1;
    waiting[way] = waiting[way].then(async () => {
      const problem = await tried(send, () => isClosed);
      count[way] -= 1;
      last[way] = { at: new Date(clock()).toISOString(), problem };
      if (problem !== null) log.error({ way, problem }, 'a warning could not be told');
    });
  };

  return {
    tell(warning) {
      const { webhook, mail } = findWarningRoutes(db);
      if (webhook !== null) queue('webhook', () => postWarning(webhook.url, warning));
      // Its end is on the screen; a mailbox is told what begins.
      if (mail !== null && warning.over === null) queue('mail', () => mailWarning(mail, findMailPassword(db), warning));
    },
    view: () => ({ ...findWarningRoutes(db), lastWebhook: last.webhook, lastMail: last.mail }),
    async close() {
      isClosed = true;
      await Promise.all(Object.values(waiting));
    },
  };
}

/** Tries a few times; answers what was wrong with the last, or null. */
async function tried(send: () => Promise<void>, isOver: () => boolean): Promise<string | null> {
  for (let turn = 1; ; turn += 1) {
    try {
      await send();
      return null;
    } catch (error) {
      // Whoever listens there may be away; what is told is on the screen all the same.
      if (turn === TRIES || isOver()) return error instanceof Error ? error.message : String(error);
      await new Promise((resolve) => setTimeout(resolve, PAUSE_MS * turn).unref());
    }
  }
}

async function postWarning(url: string, warning: Warning): Promise<void> {
  const response = await fetch(url, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ ...warning, caution: CAUTION }),
    redirect: 'error',
    signal: AbortSignal.timeout(TIMEOUT_MS),
  });
  await response.body?.cancel();
  if (!response.ok) throw new Error(`${new URL(url).host} answered ${response.status}`);
}

async function mailWarning(
  { host, port, secure, user, from, to }: NonNullable<WarningRoutes['mail']>,
  password: string | undefined,
  warning: Warning,
): Promise<void> {
  const { createTransport } = await import('nodemailer');
  const transport = createTransport({
    host,
    port,
    secure,
    connectionTimeout: TIMEOUT_MS,
    greetingTimeout: TIMEOUT_MS,
    socketTimeout: TIMEOUT_MS,
    ...(user === null ? {} : { auth: { user, pass: password ?? '' } }),
  });
  try {
    const where = [warning.vessel, warning.run === null ? null : `run ${warning.run}`].filter((one) => one !== null);
    await transport.sendMail({
      from,
      to: [...to],
      subject: `${where.length === 0 ? 'Dwellbook' : where.join(', ')}: ${warning.subject}`,
      text: `${warning.text}\n\nIt began at ${warning.began}.\n\n${CAUTION}\n`,
    });
  } finally {
    transport.close();
  }
}

import { impossible } from './impossible.ts';
import type { LedgerEvent, LedgerItem, Room } from './ledger.ts';
import { dayOf, sortedEvents } from './ledger-order.ts';

/** One unbroken time in the freezer, or out of it. */
export interface Period {
  readonly place: 'frozen' | 'out';
  readonly fromMs: number;
  readonly untilMs: number;
  readonly beganFrozen: boolean;
  /** When the material was said to have warmed; null: nobody said. */
  readonly thawedMs: number | null;
  /** What the room was, from when on; null where nobody said. */
  readonly rooms: readonly { readonly ms: number; readonly room: Room | null }[];
  /** What was made of it while it was there. */
  readonly uses: readonly { readonly ms: number; readonly what: string }[];
}

/** How an item's own ledger begins. */
export interface Beginning {
  readonly ms: number;
  readonly place: 'frozen' | 'out';
  readonly room: Room | null;
  readonly beganFrozen: boolean;
  readonly thawedMs: number | null;
}

type Mark =
  | { readonly kind: 'use'; readonly ms: number; readonly what: string }
  | { readonly kind: 'line'; readonly ms: number; readonly event: LedgerEvent };

/**
 * An item's own periods from its beginning to an instant.
 *
 * @throws {DomainError} `event-impossible`: out while out, in while in, used before it was there or after it was scrapped.
 */
export function periodsOf(item: LedgerItem, begun: Beginning, untilMs: number): Period[] {
  const done: Period[] = [];
  let now: Period = {
    ...begun,
    fromMs: begun.ms,
    untilMs: begun.ms,
    rooms: [{ ms: begun.ms, room: begun.room }],
    uses: [],
  };
  let scrappedMs: number | null = null;
  const turn = (ms: number, next: Pick<Period, 'place' | 'beganFrozen'>, room: Room | null) => {
    done.push({ ...now, untilMs: ms });
    now = { ...next, fromMs: ms, untilMs: ms, thawedMs: null, rooms: [{ ms, room }], uses: [] };
  };
  for (const mark of marksOf(item, begun.ms)) {
    if (mark.ms > untilMs) break;
    if (scrappedMs !== null) {
      impossible(`${item.item}: ${wordsOf(mark)}, after it was scrapped on ${dayOf(scrappedMs)}`, { item: item.item });
    }
    if (mark.kind === 'use') {
      // Put back the minute it was used: the use came first.
      if (mark.ms === now.fromMs && done.at(-1)?.place === 'out') continue;
      now = { ...now, uses: [...now.uses, { ms: mark.ms, what: mark.what }] };
      continue;
    }
    const { event, ms } = mark;
    switch (event.kind) {
      case 'received':
      case 'cut':
        impossible(`${item.item}: ${wordsOf(mark)}, and it was there already`, { item: item.item, at: event.at });
        break;
      case 'out':
        if (now.place === 'out') refuseTwice(item, mark, now, 'it has been out');
        turn(ms, { place: 'out', beganFrozen: true }, event.room ?? null);
        break;
      case 'in':
        if (now.place === 'frozen') refuseTwice(item, mark, now, 'it has been in the freezer');
        turn(ms, { place: 'frozen', beganFrozen: false }, null);
        break;
      case 'room':
        if (now.place === 'frozen') refuseTwice(item, mark, now, 'it has been in the freezer');
        now = { ...now, rooms: [...now.rooms, { ms, room: event.room }] };
        break;
      case 'thawed':
        if (now.place === 'frozen') refuseTwice(item, mark, now, 'it has been in the freezer');
        now = { ...now, thawedMs: now.thawedMs ?? ms };
        break;
      case 'opened':
        now = { ...now, uses: [...now.uses, { ms, what: 'it was opened' }] };
        break;
      case 'scrapped':
        scrappedMs = ms;
        break;
      default:
    }
  }
  const lastMs = Math.max(now.fromMs, scrappedMs ?? untilMs);
  return [...done, { ...now, untilMs: lastMs }];
}

function marksOf(item: LedgerItem, bornMs: number): Mark[] {
  const uses = (item.uses ?? []).map(({ at, what }): Mark => ({ kind: 'use', ms: Date.parse(at), what }));
  for (const use of uses) {
    if (use.ms < bornMs) {
      impossible(`${item.item} was used before it was there: ${wordsOf(use)}; it came on ${dayOf(bornMs)}`, {
        item: item.item,
      });
    }
  }
  const lines = sortedEvents(item.events)
    .slice(1)
    .map((event): Mark => ({ kind: 'line', ms: Date.parse(event.at), event }));
  // A use stands after what happened to the item at the same instant, and before it is scrapped.
  const rank = (mark: Mark) => (mark.kind === 'use' ? 1 : mark.event.kind === 'scrapped' ? 2 : 0);
  return [...lines, ...uses]
    .map((mark, n) => ({ mark, n }))
    .sort((a, b) => a.mark.ms - b.mark.ms || rank(a.mark) - rank(b.mark) || a.n - b.n)
    .map(({ mark }) => mark);
}

function refuseTwice(item: LedgerItem, mark: Mark, now: Period, where: string): never {
  return impossible(`${item.item}: ${wordsOf(mark)}, but ${where} since ${dayOf(now.fromMs)}`, {
    item: item.item,
    at: new Date(mark.ms).toISOString(),
    since: new Date(now.fromMs).toISOString(),
  });
}

const LINE_WORDS: Readonly<Record<LedgerEvent['kind'], string>> = {
  received: 'received',
  cut: 'cut',
  out: 'taken out of the freezer',
  in: 'put back in the freezer',
  room: 'its room measured',
  thawed: 'said to have thawed',
  opened: 'opened',
  excursion: 'its freezer too warm or too cold',
  extended: 'a life extended',
  scrapped: 'scrapped',
};

function wordsOf(mark: Mark): string {
  return `${mark.kind === 'use' ? mark.what : LINE_WORDS[mark.event.kind]} on ${dayOf(mark.ms)}`;
}

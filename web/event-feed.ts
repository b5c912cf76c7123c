/** What hears the news of a feed, by the name of its events. */
export interface Hearing {
  readonly events: Readonly<Record<string, (news: never) => void>>;
  /** Whether the server is heard; false from the moment the line drops. */
  readonly onLine: (isHeard: boolean) => void;
  /** The server refused the feed, or its thread was lost: everything is to be read again. */
  readonly onLost: () => void;
}

/** A feed that was refused is asked for again after so long. */
const AGAIN_MS = 3000;

/**
 * News the server sends as it happens, until the answer is called.
 *
 * The browser goes on by itself after a dropped line and names the last event it heard; only a refusal ends a feed for
 * good, and then it is asked for anew.
 */
export function listenTo(path: string, { events, onLine, onLost }: Hearing): () => void {
  let source: EventSource;
  let timer: ReturnType<typeof setTimeout> | undefined;
  const begin = () => {
    source = new EventSource(path);
    for (const [name, hear] of Object.entries(events)) {
      source.addEventListener(name, (event) => hear(JSON.parse((event as MessageEvent<string>).data) as never));
    }
    source.onopen = () => onLine(true);
    source.onerror = () => {
      onLine(false);
      if (source.readyState !== EventSource.CLOSED) return;
      timer = setTimeout(() => {
        onLost();
        begin();
      }, AGAIN_MS);
    };
  };
  begin();
  return () => {
    clearTimeout(timer);
    source.close();
  };
}

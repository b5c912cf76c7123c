import { setTimeout as wait } from 'node:timers/promises';
import type { MqttReads } from '../../../models/log/live-source.ts';
import { floodGate, mostScansPerSecond } from '../flood-gate.ts';
import { gatherScans } from './gather-scans.ts';
import { type MqttListener, type MqttMessage, openMqtt } from './mqtt-feed.ts';
import { messageReader } from './mqtt-message.ts';
import { sentBefore } from './sent-before.ts';
import type { OneScan, ReadOnceParts, RunningSource, SourceDriver, SourceParts } from './source.ts';

/** A broker's topics, heard as they come. */
export const mqtt: SourceDriver = { start, readOnce };

/** What is wrong is shown so long after it was last so, ms. */
const WRONG_FOR_MS = 60_000;
/** A broker that floods for so long, ms, or with so many messages, is left, and heard again after the pause, ms. */
const FLOODS_MS = 5000;
const MOST_FLOODED = 2000;
const FLOOD_PAUSE_MS = 30_000;

function start({ document, password, take, tell, fault, now }: SourceParts): RunningSource {
  const { channels, intervalS } = document;
  const reads = document.reads as MqttReads;
  const read = messageReader(reads, channels);
  const cameBefore = sentBefore();
  const topics = new Set(Object.values(reads.topics).map(({ topic }) => topic)).size;
  const gate = floodGate(mostScansPerSecond(intervalS) * topics);
  let wrong: { readonly what: string; lastMs: number } | null = null;
  let refused = '';
  let floodsSinceMs: number | null = null;
  let flooded = 0;

  const gathering = gatherScans(channels.length, intervalS * 1000, (scan) => {
    if (wrong !== null && now() - wrong.lastMs > WRONG_FOR_MS) {
      wrong = null;
      tell('reached', refused || null);
    }
    // Nothing waits for the disk: who takes the scan says what failed.
    take([scan]).catch(() => undefined);
  });
  const complain = (what: string) => {
    if (wrong === null) tell('reached', what);
    wrong = { what: wrong?.what ?? what, lastMs: now() };
  };
  const listener: MqttListener = {
    reached(topics) {
      refused = topics.length === 0 ? '' : `the broker does not give ${topics.join(', ')}`;
      tell('reached', wrong?.what ?? (refused || null));
    },
    notReached: (because) => tell('cannot-be-reached', because),
    heard(message) {
      const nowMs = now();
      if (!gate.admits(1, nowMs)) {
        floodsSinceMs ??= nowMs;
        complain(`more than ${gate.perSecond} messages a second; what is beyond that is not taken`);
        flooded += 1;
        if (nowMs - floodsSinceMs > FLOODS_MS || flooded > MOST_FLOODED) leave(nowMs);
        return;
      }
      if (floodsSinceMs !== null && nowMs - (wrong?.lastMs ?? 0) > 1000) {
        floodsSinceMs = null;
        flooded = 0;
      }
      if (message.isRetained) return;
      const said = read(message.topic, message.payload);
      if (said.wrong !== null) complain(said.wrong);
      if (said.figures.length === 0 || cameBefore(message, said)) return;
      gathering.add(said.timeMs ?? Math.round(nowMs), said.sequence, said.figures);
    },
  };
  const feed = openMqtt(reads, password, listener, fault);
  const leave = (nowMs: number) => {
    floodsSinceMs = nowMs;
    flooded = 0;
    feed
      .then((one) => one.leaveFor(FLOOD_PAUSE_MS, `it floods: left for ${FLOOD_PAUSE_MS / 1000} s`))
      .catch(() => undefined);
  };
  feed.catch((error: Error) => tell('cannot-be-reached', error.message));
  return {
    async close() {
      gathering.flush();
      await feed.then(
        (one) => one.close(),
        () => undefined,
      );
    },
  };
}

async function readOnce({ document, password, now }: ReadOnceParts): Promise<OneScan> {
  const { channels, intervalS } = document;
  const reads = document.reads as MqttReads;
  const read = messageReader(reads, channels);
  const waitMs = Math.min(LONGEST_TRY_MS, Math.max(SHORTEST_TRY_MS, intervalS * 2500));
  const figures = new Float64Array(channels.length).fill(NaN);
  const because = channels.map((): string | null => `nothing came in ${Math.round(waitMs / 1000)} s`);
  const endMs = now() + waitMs;
  let notReached: string | null = null;
  let refused: readonly string[] = [];
  const hear = ({ topic, payload, isRetained }: MqttMessage) => {
    const said = read(topic, payload);
    for (const { channel, figure } of said.figures) {
      if (isRetained && because[channel] === null) continue;
      figures[channel] = figure;
      const absent = Number.isNaN(figure) ? (said.wrong ?? 'absent in the message') : null;
      because[channel] = isRetained ? 'kept by the broker, nobody knows since when: not taken as a reading' : absent;
    }
  };
  const feed = await openMqtt(
    reads,
    password,
    {
      heard: hear,
      reached: (topics) => {
        refused = topics;
      },
      notReached: (why) => {
        notReached = why;
      },
    },
    () => undefined,
  );
  try {
    while (now() < endMs && notReached === null && because.some((why) => why !== null)) await wait(20);
  } finally {
    await feed.close();
  }
  if (notReached !== null) throw new Error(notReached);
  for (const [i, { name }] of channels.entries()) {
    if (refused.includes(reads.topics[name]?.topic ?? '')) because[i] = 'the broker does not give this topic';
  }
  return { figures, because };
}

const SHORTEST_TRY_MS = 3000;
const LONGEST_TRY_MS = 10_000;

import { randomBytes } from 'node:crypto';
import type { MqttReads } from '../../../models/log/live-source.ts';
import { growingPause } from './growing-pause.ts';

/** A message as it came. */
export interface MqttMessage {
  readonly topic: string;
  readonly payload: Uint8Array;
  /** The broker had kept it, for how long nobody knows: MQTT 3.1.1, 3.3.1.3. */
  readonly isRetained: boolean;
  /** The broker may have sent it before: MQTT 3.1.1, 3.3.1.1. */
  readonly isSentAgain: boolean;
}

/** All that anyone here can do with a broker: hear, and stop hearing. */
export interface MqttFeed {
  /** Leaves the broker, and hears it again after so long. */
  leaveFor(ms: number, because: string): void;
  close(): Promise<void>;
}

export interface MqttListener {
  heard(message: MqttMessage): void;
  reached(refusedTopics: readonly string[]): void;
  notReached(because: string): void;
}

const KEEP_ALIVE_S = 15;
const CONNECT_MS = 6000;
const WENT_AWAY = 'the broker went away';

/** Hears topics of a broker, again and again where it goes away. The library's client does not leave this function. */
export async function openMqtt(
  { broker, user, topics }: MqttReads,
  password: string | undefined,
  listener: MqttListener,
  fault: (error: unknown) => void,
): Promise<MqttFeed> {
  const { default: library } = await import('mqtt');
  const names = [...new Set(Object.values(topics).map(({ topic }) => topic))];
  const pause = growingPause();
  let isOver = false;
  let timer: NodeJS.Timeout | undefined;
  let why = WENT_AWAY;
  let leftForMs: number | null = null;
  const client = library.connect(broker, {
    clientId: `dwellbook-${randomBytes(6).toString('hex')}`,
    clean: true,
    keepalive: KEEP_ALIVE_S,
    connectTimeout: CONNECT_MS,
    reconnectPeriod: 0,
    resubscribe: false,
    ...(user === undefined ? {} : { username: user }),
    ...(password === undefined ? {} : { password }),
  });
  client.on('error', ({ message }) => {
    why = message;
  });
  client.on('connect', () => {
    client.subscribe(names, { qos: 1 }, (error, granted) => {
      if (error) {
        why = error.message;
        client.stream.destroy();
        return;
      }
      pause.succeeded();
      // A return code of 128 is a refusal: MQTT 3.1.1, 3.9.3.
      listener.reached((granted ?? []).filter(({ qos }) => qos === 128).map(({ topic }) => topic));
    });
  });
  client.on('message', (topic, payload, { retain, dup }) => {
    if (isOver) return;
    try {
      listener.heard({ topic, payload, isRetained: retain, isSentAgain: dup });
    } catch (error) {
      fault(error);
    }
  });
  client.on('close', () => {
    if (isOver) return;
    listener.notReached(why);
    why = WENT_AWAY;
    const now = performance.now();
    pause.failed(now);
    clearTimeout(timer);
    timer = setTimeout(() => client.reconnect(), leftForMs ?? pause.untilMs - now);
    leftForMs = null;
  });
  return {
    leaveFor(ms, because) {
      why = because;
      leftForMs = ms;
      client.stream.destroy();
    },
    async close() {
      isOver = true;
      clearTimeout(timer);
      await client.endAsync(true);
    },
  };
}

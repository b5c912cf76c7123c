import type { MqttMessage } from './mqtt-feed.ts';
import type { ReadMessage } from './mqtt-message.ts';

/** Messages of a topic that are remembered; one comes twice within seconds or never. */
const MOST_REMEMBERED = 1000;

/**
 * Whether a message came before, as QoS 1 allows. It did where sequence number or instant and every figure are the same.
 * Two that carry neither are the same where the broker itself says that it sends one again.
 */
export function sentBefore(): (message: MqttMessage, read: ReadMessage) => boolean {
  const byTopic = new Map<string, Set<string>>();
  return ({ topic, isSentAgain }, { timeMs, sequence, figures }) => {
    const seen = byTopic.get(topic) ?? new Set<string>();
    byTopic.set(topic, seen);
    const key = `${sequence} ${timeMs} ${figures.map(({ figure }) => figure).join(' ')}`;
    const carriesNeither = sequence === null && timeMs === null;
    if (seen.has(key)) {
      if (!carriesNeither || isSentAgain) return true;
      return false;
    }
    if (carriesNeither) seen.clear();
    seen.add(key);
    if (seen.size > MOST_REMEMBERED) seen.delete(seen.values().next().value as string);
    return false;
  };
}

import { flag, object, type Read, refuse, text } from '../document.ts';
import type { MqttTopic, SourceReads } from './live-source.ts';
import { only, recordOf } from './source-fields.ts';

export const readMqtt: Read<SourceReads> = object((fields) => ({
  kind: fields.required('kind', only('mqtt')),
  broker: fields.required('broker', readBroker),
  ...fields.optional('user', text),
  ...fields.optional('hasPassword', flag),
  topics: fields.required('topics', readTopics),
  ...fields.optional('timePointer', readPointer),
  ...fields.optional('sequencePointer', readPointer),
}));

function readBroker(value: unknown, path: string): string {
  const broker = text(value, path);
  const isAddress = /^mqtts?:\/\/[^/@\s]+$/.test(broker) && URL.canParse(broker);
  return isAddress ? broker : refuse(path, 'an address such as "mqtt://broker:1883", without user or password', value);
}

const readTopicKeys = object<MqttTopic>((fields) => ({
  topic: fields.required('topic', readTopicName),
  ...fields.optional('pointer', readPointer),
}));

/** A name and no filter: what a wildcard catches could not be told apart. OASIS MQTT 3.1.1, 4.7. */
function readTopicName(value: unknown, path: string): string {
  const topic = text(value, path);
  const isOne = !/[#+]/.test(topic) && !topic.includes('\0') && topic.length <= 1000;
  return isOne ? topic : refuse(path, 'one topic, without + or #', value);
}

/** RFC 6901, 3: empty, or pieces that each begin with a slash, `~` only as `~0` and `~1`. */
function readPointer(value: unknown, path: string): string {
  const isPointer = typeof value === 'string' && /^(?:\/(?:[^~/]|~[01])*)*$/.test(value);
  return isPointer ? value : refuse(path, 'a JSON pointer, such as "/t" or "/values/3"', value);
}

function readTopics(value: unknown, path: string): Readonly<Record<string, MqttTopic>> {
  const topics = recordOf(readTopicKeys)(value, path);
  const takenBy = new Map<string, string>();
  for (const [channel, { topic, pointer }] of Object.entries(topics)) {
    const place = `${topic}\u0000${pointer ?? '-'}`;
    const other = takenBy.get(place);
    if (other !== undefined) refuse(`${path}.${channel}`, `a figure that ${other} does not read`, topic);
    takenBy.set(place, channel);
  }
  return topics;
}

import { describe, expect, it } from 'vitest';
import { atPointer } from '../../../server/live/sources/json-pointer.ts';
import { driverOf } from '../../../server/live/sources/source.ts';
import { aedesBroker, BROKERS, senderTo } from './brokers.ts';
import { listenTo, sleep, until } from './listening.ts';
import { strangePeer } from './modbus-peers.ts';

const channel = (name: string) => ({ column: name, name, role: 'part', unit: '°C' });

function document(broker: string, topics: Record<string, object>, changes: object = {}) {
  return {
    format: 'dwellbook-source/1',
    name: 'Oven 2 broker',
    intervalS: 0.3,
    reads: { kind: 'mqtt', broker, topics, ...changes },
    channels: Object.keys(topics).map(channel),
  };
}

const WHOLE = { TC1: { topic: 'oven/2', pointer: '/t/0' }, TC2: { topic: 'oven/2', pointer: '/t/1' } };
const APART = { TC1: { topic: 'oven/2/tc1' }, TC2: { topic: 'oven/2/tc2' } };
const AT = Date.parse('2026-03-02T08:14:00Z');

// RFC 6901, 5: its own table of examples.
describe('atPointer', () => {
  const rfc = {
    foo: ['bar', 'baz'],
    '': 0,
    'a/b': 1,
    'c%d': 2,
    'e^f': 3,
    'g|h': 4,
    'i\\j': 5,
    'k"l': 6,
    ' ': 7,
    'm~n': 8,
  };

  it.each([
    ['', rfc],
    ['/foo', ['bar', 'baz']],
    ['/foo/0', 'bar'],
    ['/', 0],
    ['/a~1b', 1],
    ['/c%d', 2],
    ['/e^f', 3],
    ['/g|h', 4],
    ['/i\\j', 5],
    ['/k"l', 6],
    ['/ ', 7],
    ['/m~0n', 8],
    ['/foo/2', undefined],
    ['/foo/01', undefined],
    ['/foo/length', undefined],
    ['/toString', undefined],
    ['/a~1b/c', undefined],
  ])('finds at "%s" %j', (pointer, found) => {
    expect(atPointer(rfc, pointer)).toEqual(found);
  });
});

describe.each(BROKERS)('an MQTT source at %s', (_, begin) => {
  it('makes a scan of each message that has them all, by the sender’s time and number', async () => {
    const broker = await begin();
    const sender = await senderTo(broker);
    const mapped = { timePointer: '/at', sequencePointer: '/n' };
    const heard = await listenTo(document(broker.address, WHOLE, mapped));
    await until(() => heard.told.length > 0);
    await sender.send('oven/2', { at: '2026-03-02T08:14:00Z', n: 1, t: [20.1, 20.2] });
    await sender.send('oven/2', { at: AT / 1000 + 1, n: 2, t: ['21.1', null] });
    await sender.send('oven/2', { at: AT + 2000, n: 3, t: [22.1] });
    await until(() => heard.scans.length >= 3);
    expect(heard.scans.map(({ timeMs, sequence }) => [timeMs - AT, sequence])).toEqual([
      [0, 1],
      [1000, 2],
      [2000, 3],
    ]);
    expect(heard.figures()).toEqual([
      [20.1, 20.2],
      [21.1, null],
      [22.1, null],
    ]);
    expect(heard.told.at(-1)).toEqual(['reached', 'oven/2: nothing at /t/1 (TC2)']);
  });

  it('does not take what the broker had kept for a reading', async () => {
    const broker = await begin();
    const sender = await senderTo(broker);
    await sender.send('oven/2/tc1', '99.9', true);
    const heard = await listenTo(document(broker.address, APART));
    await until(() => heard.told.length > 0);
    await sleep(500);
    expect(heard.scans).toEqual([]);
    // A message that is kept from now on is new to who hears it.
    await sender.send('oven/2/tc1', '21.5', true);
    await until(() => heard.scans.length === 1);
    expect(heard.figures()).toEqual([[21.5, null]]);
  });

  it('drops a message that comes twice, and keeps two that are alike in all but their number', async () => {
    const broker = await begin();
    const sender = await senderTo(broker);
    const heard = await listenTo(document(broker.address, WHOLE, { sequencePointer: '/n' }));
    await until(() => heard.told.length > 0);
    for (const n of [7, 7, 8, 7, 9]) await sender.send('oven/2', { n, t: [20, 20] });
    await until(() => heard.scans.length >= 3);
    await sleep(100);
    expect(heard.scans.map(({ sequence }) => sequence)).toEqual([7, 8, 9]);
  });

  it('joins what arrives together and never repeats what did not', async () => {
    const broker = await begin();
    const sender = await senderTo(broker);
    const heard = await listenTo(document(broker.address, APART));
    await until(() => heard.told.length > 0);
    await sender.send('oven/2/tc1', '20.5');
    await sender.send('oven/2/tc2', '21.5');
    await until(() => heard.scans.length === 1);
    await sender.send('oven/2/tc1', '20.6');
    await until(() => heard.scans.length === 2);
    await sender.send('oven/2/tc2', '21.7');
    await sender.send('oven/2/tc2', '21.8');
    await until(() => heard.scans.length === 4);
    expect(heard.figures()).toEqual([
      [20.5, 21.5],
      [20.6, null],
      [null, 21.7],
      [null, 21.8],
    ]);
    const times = heard.scans.map(({ timeMs }) => timeMs);
    expect(times).toEqual([...times].sort((a, b) => a - b));
  });
});

describe('an MQTT source', () => {
  it('tells rubbish by its first example, takes no reading of it, and goes on', async () => {
    const broker = await aedesBroker();
    const sender = await senderTo(broker);
    const heard = await listenTo(document(broker.address, WHOLE, { timePointer: '/at' }));
    await until(() => heard.told.length > 0);
    await sender.send('oven/2', 'OPEN\u0000{');
    await sender.send('oven/2', '');
    await sender.send('oven/2', 'x'.repeat(70_000));
    await sender.send('oven/2', { at: 12, t: [1, 2] });
    await sender.send('oven/2', { at: AT, t: [20, 21] });
    await until(() => heard.scans.length === 1);
    expect(heard.figures()).toEqual([[20, 21]]);
    expect(heard.told).toEqual([
      ['reached', null],
      ['reached', 'oven/2: "OPEN\\u0000{" is not JSON'],
    ]);
  });

  it('publishes nothing, and hears a broker again that went away', async () => {
    const broker = await aedesBroker();
    const heard = await listenTo(document(broker.address, APART));
    await until(() => heard.told.length > 0);
    await (await senderTo(broker)).send('oven/2/tc1', '20.5');
    await until(() => heard.scans.length === 1);
    await broker.stop();
    await until(() => heard.told.at(-1)?.[0] === 'cannot-be-reached');
    await until(() => /ECONNREFUSED/.test(heard.told.at(-1)?.[1] ?? ''));
    const again = await aedesBroker(Number(new URL(broker.address).port));
    await until(() => heard.told.at(-1)?.[0] === 'reached');
    await (await senderTo(again)).send('oven/2/tc1', '20.7');
    await until(() => heard.figures().at(-1)?.[0] === 20.7);
    expect([...broker.publishers, ...again.publishers].filter((id) => id !== 'device')).toEqual([]);
    expect(again.publishers.size).toBe(1);
  });

  it('says that a broker does not let it in, and is let in by the password beside the document', async () => {
    const broker = await aedesBroker(0, 'open sesame');
    const shut = await listenTo(document(broker.address, APART, { user: 'oven' }), { password: 'wrong' });
    await until(() => /not authori[sz]ed|refused/i.test(shut.told.at(-1)?.[1] ?? ''));
    const open = await listenTo(document(broker.address, APART, { user: 'oven' }), { password: 'open sesame' });
    await until(() => open.told.at(-1)?.[0] === 'reached');
  });

  it('leaves a broker that floods, and says so', async () => {
    const broker = await aedesBroker();
    const sender = await senderTo(broker);
    const slow = { ...document(broker.address, WHOLE), intervalS: 20 };
    const heard = await listenTo(slow);
    await until(() => heard.told.length > 0);
    const end = performance.now() + 7000;
    for (let n = 0; performance.now() < end; n++) await sender.send('oven/2', { t: [n, n] });
    expect(heard.scans.length).toBeLessThanOrEqual(1 * 10 + 8);
    expect(heard.scans.length).toBeGreaterThan(5);
    expect(heard.told.map(([state, because]) => [state, because?.slice(0, 28)])).toEqual([
      ['reached', undefined],
      ['reached', 'more than 1 messages a secon'],
      ['cannot-be-reached', 'it floods: left for 30 s'],
    ]);
  });

  it('survives a peer that sends rubbish and one that says nothing', async () => {
    const rubbish = await strangePeer((socket) => {
      socket.on('data', () => socket.write(Buffer.from([0x20, 0x02, 0, 0, 0xff, 0xff, 0xff, 0xff, 0xff, 1, 2, 3])));
    });
    const silent = await strangePeer(() => undefined);
    const strange = await listenTo(document(`mqtt://127.0.0.1:${rubbish}`, APART));
    const mute = await listenTo(document(`mqtt://127.0.0.1:${silent}`, APART));
    await until(() => strange.told.at(-1)?.[0] === 'cannot-be-reached');
    await until(() => mute.told.at(-1)?.[0] === 'cannot-be-reached');
    expect(strange.scans.length + mute.scans.length).toBe(0);
  });

  it('tries settings nobody has saved: fresh, kept by the broker, missing', async () => {
    const broker = await aedesBroker();
    const sender = await senderTo(broker);
    await sender.send('oven/2/tc2', '99.9', true);
    const { readOnce } = (await driverOf('mqtt'))!;
    const topics = { ...APART, TC3: { topic: 'oven/2/tc3' } };
    const once = readOnce({
      document: document(broker.address, topics) as never,
      now: () => performance.now(),
      inventVessel: null,
    });
    const sending = setInterval(() => void sender.send('oven/2/tc1', '20.5'), 100);
    const one = await once;
    clearInterval(sending);
    expect([...one.figures]).toEqual([20.5, 99.9, NaN]);
    expect(one.because).toEqual([
      null,
      'kept by the broker, nobody knows since when: not taken as a reading',
      'nothing came in 3 s',
    ]);
  });
});

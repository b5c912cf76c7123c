import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ModbusRegister } from '../../../models/log/live-source.ts';
import { registersOf } from '../../../models/log/parse-modbus-reads.ts';
import { modbusFigure } from '../../../server/live/sources/modbus-figure.ts';
import { MOST_REGISTERS, modbusRequests } from '../../../server/live/sources/modbus-requests.ts';
import { driverOf } from '../../../server/live/sources/source.ts';
import { listenTo, sleep, until } from './listening.ts';
import { modbusDevice, strangePeer } from './modbus-peers.ts';

const input = (address: number, changes: object = {}) => ({
  unitId: 1,
  table: 'input',
  address,
  type: 'int16',
  ...changes,
});
const channel = (name: string, changes: object = {}) => ({
  column: name,
  name,
  role: 'part',
  unit: '°C',
  scale: 0.1,
  ...changes,
});

function document(port: number, registers: Record<string, object>, changes: object = {}) {
  return {
    format: 'dwellbook-source/1',
    name: 'Oven 2 gateway',
    intervalS: 0.2,
    reads: { kind: 'modbus-tcp', host: '127.0.0.1', port, registers },
    channels: Object.keys(registers).map((name) => channel(name)),
    ...changes,
  };
}

describe('modbusFigure', () => {
  const register = (changes: object): ModbusRegister => input(0, changes) as ModbusRegister;

  // MODBUS Application Protocol V1.1b3, 4.2 (big-endian) and 6.3 (its example of FC 03 gives 022B hex as 555); −22.0 read
  // as 65316 and 8000 hex as "not available" are the trade's usual traps; IEEE 754: 41BB3333 hex is 23.4.
  it.each([
    [{ type: 'uint16' }, [0x022b], 555],
    [{ type: 'int16' }, [65_316], -220],
    [{ type: 'uint16' }, [65_316], 65_316],
    [{ type: 'int16', notAvailable: [32_768] }, [0x8000], NaN],
    [{ type: 'int16', notAvailable: [-32_768] }, [0x8000], NaN],
    [{ type: 'uint16', notAvailable: [65_535] }, [0xffff], NaN],
    [{ type: 'uint32' }, [0x0001, 0x0002], 65_538],
    [{ type: 'uint32', words: 'low-first' }, [0x0002, 0x0001], 65_538],
    [{ type: 'int32' }, [0xffff, 0xff24], -220],
    [{ type: 'int32', notAvailable: [2_147_483_648] }, [0x8000, 0], NaN],
    [{ type: 'float32' }, [0x41bb, 0x3333], 23.4],
    [{ type: 'float32', words: 'low-first' }, [0x3333, 0x41bb], 23.4],
    [{ type: 'float32' }, [0x7fc0, 0], NaN],
    [{ type: 'float32' }, [0x7f80, 0], NaN],
    [{ type: 'float32', notAvailable: [-9999.9] }, [0xc61c, 0x3f9a], NaN],
  ])('%j in %j is %d', (changes, words, expected) => {
    expect(modbusFigure(register(changes), words, 0)).toBe(expected);
  });

  it('gives back every single-precision number to the last bit', () => {
    const view = new DataView(new ArrayBuffer(4));
    fc.assert(
      fc.property(fc.float({ noNaN: true, noDefaultInfinity: true }), (figure) => {
        view.setFloat32(0, figure);
        const words = [view.getUint16(0), view.getUint16(2)];
        // Minus zero reads as zero.
        expect(Math.fround(modbusFigure(register({ type: 'float32' }), words, 0)) + 0).toBe(figure + 0);
      }),
    );
  });
});

describe('modbusRequests', () => {
  const types = ['int16', 'uint16', 'int32', 'uint32', 'float32'] as const;

  it('asks for every register once, for no other, side by side and at most 125 at a time', () => {
    const places = fc.uniqueArray(
      fc.record({ unitId: fc.integer({ min: 1, max: 2 }), place: fc.integer({ min: 0, max: 400 }) }),
      { selector: ({ unitId, place }) => `${unitId} ${place}`, maxLength: 300 },
    );
    fc.assert(
      fc.property(places, fc.infiniteStream(fc.constantFrom(...types)), (list, kinds) => {
        const registers: Record<string, ModbusRegister> = {};
        for (const { unitId, place } of list) {
          const type = kinds.next().value as ModbusRegister['type'];
          registers[`u${unitId} p${place}`] = { unitId, table: 'input', address: place * 2, type };
        }
        const channels = Object.keys(registers).map((name) => channel(name) as never);
        const requests = modbusRequests({ registers }, channels);
        const wanted = Object.values(registers).flatMap((register) =>
          Array.from({ length: registersOf(register) }, (_, i) => `${register.unitId} ${register.address + i}`),
        );
        const asked = requests.flatMap(({ unitId, address, count }) =>
          Array.from({ length: count }, (_, i) => `${unitId} ${address + i}`),
        );
        expect(asked.sort()).toEqual(wanted.sort());
        for (const { address, count, channels: some } of requests) {
          expect(count).toBeLessThanOrEqual(MOST_REGISTERS);
          for (const { register, at } of some) expect(register.address).toBe(address + at);
        }
        // Two requests that follow one another could not have been one.
        for (const [i, { unitId, address, count }] of requests.entries()) {
          const next = requests[i + 1];
          if (next?.unitId === unitId && next.address === address + count) {
            expect(count + registersOf(next.channels[0]!.register)).toBeGreaterThan(MOST_REGISTERS);
          }
        }
      }),
    );
  });
});

describe('a Modbus TCP source', () => {
  it('reads scaled, signed, long and missing figures at one instant, in two requests, by codes 3 and 4 alone', async () => {
    const device = await modbusDevice();
    device.input.set(100, 1753).set(101, 65_316).set(102, 0x8000).set(103, 0x41bb).set(104, 0x3333);
    device.holding.set(7, 2).set(8, 1);
    const heard = await listenTo(
      document(device.port, {
        TC1: input(100),
        TC2: input(101),
        TC3: input(102, { notAvailable: [32_768] }),
        TC4: input(103, { type: 'float32' }),
        TC5: input(7, { table: 'holding', type: 'uint32', words: 'low-first' }),
      }),
    );
    await until(() => heard.scans.length >= 4);
    expect(heard.figures()[0]).toEqual([1753, -220, null, 23.4, 65_538]);
    expect(device.asked.slice(0, 2).sort()).toEqual(['holding 7+2', 'input 100+5']);
    expect([...new Set(device.functionCodes)].sort()).toEqual([3, 4]);
    expect(heard.told).toEqual([['reached', null]]);
    const times = heard.scans.map(({ timeMs }) => timeMs);
    expect(times.every((timeMs, i) => i === 0 || timeMs > times[i - 1]!)).toBe(true);
    expect(times.some((timeMs) => timeMs % 200 === 0)).toBe(true);
  });

  it('says which registers a device refuses, and reads the others', async () => {
    const device = await modbusDevice();
    device.input.set(1, 201);
    const heard = await listenTo(document(device.port, { TC1: input(1), TC2: input(50) }));
    await until(() => heard.scans.length >= 2);
    expect(heard.figures()[0]).toEqual([201, null]);
    expect(heard.told).toEqual([['reached', 'unit 1, input register 50: exception 2, it has no such register']]);
  });

  it('reaches a device again that went away, with pauses that grow', async () => {
    const device = await modbusDevice();
    device.input.set(1, 201);
    const heard = await listenTo(document(device.port, { TC1: input(1) }));
    await until(() => heard.scans.length >= 2);
    await device.stop();
    await until(() => heard.told.at(-1)?.[0] === 'cannot-be-reached');
    const missed = heard.scans.length;
    await until(() => /ECONNREFUSED/.test(heard.told.at(-1)?.[1] ?? ''));
    const again = await modbusDevice(device.port);
    again.input.set(1, 202);
    await until(() => heard.scans.length > missed);
    expect(heard.figures().at(-1)).toEqual([202]);
    expect(heard.told.at(-1)).toEqual(['reached', null]);
  });

  it('is not held up by another that hangs, nor by one that sends rubbish', async () => {
    const hangs = await strangePeer(() => undefined);
    let seed = 1;
    const rubbish = await strangePeer((socket) => {
      const send = () => {
        const bytes = Buffer.alloc(700);
        for (let i = 0; i < bytes.length; i++) {
          seed = (seed * 48_271) % 2_147_483_647;
          bytes[i] = seed & 255;
        }
        // Some of it looks like the head of an answer: transaction 1, protocol 0, a length, unit 1, code 4.
        Buffer.from([0, 1, 0, 0, 0, seed & 7, 1, 4, 2]).copy(bytes, 0);
        socket.write(bytes);
      };
      socket.on('data', send);
      const timer = setInterval(send, 5);
      socket.on('close', () => clearInterval(timer));
    });
    const device = await modbusDevice();
    device.input.set(1, 201);
    const [good, hung, strange] = await Promise.all(
      [device.port, hangs, rubbish].map((port) => listenTo(document(port, { TC1: input(1) }))),
    );
    await until(() => good!.scans.length >= 12);
    const times = good!.scans.map(({ timeMs }) => timeMs);
    expect(times.at(-1)! - times[0]!).toBeLessThan(times.length * 200 * 3);
    await until(() => hung!.told.length > 0 && strange!.told.length > 0);
    expect(hung!.told[0]).toEqual(['cannot-be-reached', 'unit 1, input register 1: no answer']);
    expect(strange!.told[0]![0]).toBe('cannot-be-reached');
    expect([hung!.scans.length, strange!.scans.length]).toEqual([0, 0]);
    await hung!.source.close();
  });

  it('tries settings nobody has saved, and tells what it met', async () => {
    const device = await modbusDevice();
    device.input.set(1, 201);
    const { readOnce } = (await driverOf('modbus-tcp'))!;
    const parts = { now: Date.now, inventVessel: null };
    const one = await readOnce({
      document: document(device.port, { TC1: input(1), TC2: input(9) }) as never,
      ...parts,
    });
    expect([...one.figures]).toEqual([201, NaN]);
    expect(one.because).toEqual([null, 'unit 1, input register 9: exception 2, it has no such register']);
    await device.stop();
    await expect(readOnce({ document: document(device.port, { TC1: input(1) }) as never, ...parts })).rejects.toThrow(
      'ECONNREFUSED',
    );
    await sleep(0);
  });
});

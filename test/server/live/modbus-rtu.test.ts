import { ServerSerial } from 'modbus-serial';
import { afterEach, describe, expect, it } from 'vitest';
import { listenTo, until } from './listening.ts';
import { type SerialLine, serialLine } from './serial-line.ts';

const closing: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const close of closing.splice(0)) await close();
});

/** Units of the library's own serial server on one end of a line; registers hold what `figure` says of them. */
async function unitsOn(
  line: SerialLine,
  figure: (unit: number, address: number) => number | null,
  slowMs = (_address: number) => 0,
) {
  const functions: string[] = [];
  const later = (address: number, value: number) =>
    new Promise<number>((resolve) => setTimeout(() => resolve(value), slowMs(address)));
  const one = (name: string) => async (address: number, unit: number) => {
    functions.push(name);
    const value = figure(unit, address);
    // A unit that is not there says nothing at all.
    return value === null ? new Promise<number>(() => undefined) : later(address, value);
  };
  const server = new ServerSerial(
    { getInputRegister: one('input'), getHoldingRegister: one('holding'), setRegister: () => functions.push('write') },
    { path: line.there, baudRate: 9600, unitID: 255 },
  );
  server.on('error', () => undefined);
  closing.push(() => new Promise((resolve) => server.close(() => resolve())));
  await new Promise<void>((resolve) => server.once('initialized', () => resolve()));
  return functions;
}

const register = (address: number, changes: object = {}) => ({
  unitId: 1,
  table: 'holding',
  address,
  type: 'int16',
  ...changes,
});

function document(line: SerialLine, registers: Record<string, object>) {
  return {
    format: 'dwellbook-source/1',
    name: 'Press 1 line',
    intervalS: 0.4,
    reads: { kind: 'modbus-rtu', port: line.here, baud: 9600, parity: 'none', stopBits: 1, registers },
    channels: Object.keys(registers).map((name) => ({ column: name, name, role: 'part', unit: '°C', scale: 0.1 })),
  };
}

describe('a Modbus RTU source', () => {
  it('reads the units of a serial line', async () => {
    const line = await serialLine();
    const functions = await unitsOn(line, (unit, address) => unit * 1000 + address);
    const heard = await listenTo(
      document(line, { TC1: register(4), TC2: register(5), TC3: register(4, { unitId: 2 }) }),
    );
    await until(() => heard.scans.length >= 3);
    expect(heard.figures()[0]).toEqual([1004, 1005, 2004]);
    expect([...new Set(functions)]).toEqual(['holding']);
  });

  it('leaves out a unit that is silent and reads the others', async () => {
    const line = await serialLine();
    await unitsOn(line, (unit, address) => (unit === 2 ? null : address));
    const heard = await listenTo(
      document(line, { TC1: register(4), TC2: register(4, { unitId: 2 }), TC3: register(9, { unitId: 3 }) }),
    );
    await until(() => heard.scans.length >= 2);
    expect(heard.figures()[0]).toEqual([4, null, 9]);
    expect(heard.told).toEqual([['reached', 'unit 2, holding register 4: no answer']]);
  });

  it('never takes a late answer for the answer to the next request', async () => {
    const line = await serialLine();
    // The second answer comes when it was given up and, were nobody to wait, the first register is asked for again.
    await unitsOn(
      line,
      (_unit, address) => address,
      (address) => (address === 40 ? 900 : 120),
    );
    const heard = await listenTo({ ...document(line, { TC1: register(4), TC2: register(40) }), intervalS: 1 });
    await until(() => heard.scans.length >= 3);
    expect(heard.figures()).toEqual(heard.scans.map(() => [4, null]));
  });

  it('tells a line that is not there, and one that is pulled out, and takes it up again', async () => {
    const line = await serialLine();
    await unitsOn(line, (_unit, address) => address);
    const heard = await listenTo(document(line, { TC1: register(4) }));
    await until(() => heard.scans.length >= 1);
    await line.cut();
    await until(() => heard.told.at(-1)?.[0] === 'cannot-be-reached');
    await until(() => /here/.test(heard.told.at(-1)?.[1] ?? ''));
    await heard.source.close();
  });
});

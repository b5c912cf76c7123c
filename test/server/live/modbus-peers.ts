import type { AddressInfo } from 'node:net';
import { createServer, type Socket } from 'node:net';
import { ServerTCP } from 'modbus-serial';
import { afterEach } from 'vitest';

const running: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const stop of running.splice(0).reverse()) await stop();
});

export interface Device {
  readonly port: number;
  /** Function codes as they came over the wire. */
  readonly functionCodes: number[];
  /** Requests as `table address+count` in the order they came. */
  readonly asked: string[];
  /** Registers by table and address; what is not there is refused with exception 2. */
  readonly input: Map<number, number>;
  readonly holding: Map<number, number>;
  stop(): Promise<void>;
}

/** A device by the library's own server, which is none of our code. What comes over the wire is read beside it. */
export async function modbusDevice(port = 0): Promise<Device> {
  const input = new Map<number, number>();
  const holding = new Map<number, number>();
  const functionCodes: number[] = [];
  const asked: string[] = [];
  const answer = (table: Map<number, number>, name: string) => (address: number, length: number) => {
    asked.push(`${name} ${address}+${length}`);
    return Array.from({ length }, (_, i) => {
      const value = table.get(address + i);
      if (value === undefined) throw Object.assign(new Error('no such register'), { modbusErrorCode: 2 });
      return value;
    });
  };
  const free = port === 0 ? await freePort() : port;
  const server = new ServerTCP(
    {
      getInputRegister: (address: number) => answer(input, 'input')(address, 1)[0] ?? 0,
      getHoldingRegister: (address: number) => answer(holding, 'holding')(address, 1)[0] ?? 0,
      getMultipleInputRegisters: answer(input, 'input'),
      getMultipleHoldingRegisters: answer(holding, 'holding'),
      setCoil: () => undefined,
      setRegister: () => undefined,
      setRegisterArray: () => undefined,
    },
    { host: '127.0.0.1', port: free, unitID: 255 },
  );
  await new Promise<void>((resolve) => server.once('initialized', () => resolve()));
  const inner = (server as unknown as { readonly _server: { on(event: 'connection', f: (s: Socket) => void): void } })
    ._server;
  const sockets = new Set<Socket>();
  inner.on('connection', (socket) => {
    sockets.add(socket);
    // MODBUS Messaging on TCP/IP V1.0b, 3.1: the function code stands behind seven bytes of header.
    socket.on('data', (bytes) => {
      for (let at = 0; at + 8 <= bytes.length; at += 6 + bytes.readUInt16BE(at + 4)) functionCodes.push(bytes[at + 7]!);
    });
  });
  let isStopped = false;
  const stop = async () => {
    if (isStopped) return;
    isStopped = true;
    for (const socket of sockets) socket.destroy();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  };
  running.push(stop);
  return { port: free, functionCodes, asked, input, holding, stop };
}

/** A peer that does with what comes whatever it is told. */
export async function strangePeer(onSocket: (socket: Socket) => void): Promise<number> {
  const sockets = new Set<Socket>();
  const server = createServer((socket) => {
    sockets.add(socket);
    socket.on('error', () => undefined);
    onSocket(socket);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  running.push(async () => {
    for (const socket of sockets) socket.destroy();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  });
  return (server.address() as AddressInfo).port;
}

async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  await new Promise<void>((resolve) => server.close(() => resolve()));
  return port;
}

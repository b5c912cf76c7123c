import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { type AddressInfo, createServer, type Server, type Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Aedes } from 'aedes';
import mqtt from 'mqtt';
import { afterEach } from 'vitest';

const ended: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const end of ended.splice(0).reverse()) await end();
});

export interface Broker {
  readonly address: string;
  /** Client ids that published something; empty where the broker cannot be asked. */
  readonly publishers: Set<string>;
  stop(): Promise<void>;
}

export async function aedesBroker(port = 0, password?: string): Promise<Broker> {
  const broker = await Aedes.createBroker({
    authenticate: (_client, _user, given, done) => done(null, password === undefined || String(given) === password),
  });
  const publishers = new Set<string>();
  broker.on('publish', (_packet, client) => {
    if (client) publishers.add(client.id);
  });
  const sockets = new Set<Socket>();
  const server = createServer((socket) => {
    sockets.add(socket);
    broker.handle(socket);
  });
  await listening(server, port);
  const stop = once(async () => {
    for (const socket of sockets) socket.destroy();
    await new Promise<void>((resolve) => server.close(() => resolve()));
    await new Promise<void>((resolve) => broker.close(() => resolve()));
  });
  ended.push(stop);
  return { address: `mqtt://127.0.0.1:${portOf(server)}`, publishers, stop };
}

const MOSQUITTO = ['/usr/sbin/mosquitto', '/usr/bin/mosquitto', '/usr/local/sbin/mosquitto'].find((path) =>
  existsSync(path),
);

/** Brokers this machine has: aedes always, Debian's mosquitto where it is installed. */
export const BROKERS: readonly (readonly [string, () => Promise<Broker>])[] = [
  ['aedes', () => aedesBroker()],
  ...(MOSQUITTO === undefined ? [] : ([['mosquitto', () => mosquittoBroker(MOSQUITTO)]] as const)),
];

async function mosquittoBroker(path: string): Promise<Broker> {
  const free = createServer();
  await listening(free, 0);
  const port = portOf(free);
  await new Promise<void>((resolve) => free.close(() => resolve()));
  const folder = mkdtempSync(join(tmpdir(), 'dwellbook-broker-'));
  const settings = join(folder, 'settings');
  writeFileSync(settings, `listener ${port} 127.0.0.1\nallow_anonymous true\npersistence false\n`);
  const running = spawn(path, ['-c', settings], { stdio: 'ignore' });
  const over = new Promise<void>((resolve) => running.once('exit', () => resolve()));
  const stop = once(async () => {
    running.kill();
    await over;
    rmSync(folder, { recursive: true, force: true });
  });
  ended.push(stop);
  return { address: `mqtt://127.0.0.1:${port}`, publishers: new Set(), stop };
}

/** A broker in a process of its own that sends whoever hears it as much as it can. */
export async function floodingBroker(topic: string): Promise<string> {
  const script = `
    import { createServer } from 'node:net';
    import { Aedes } from 'aedes';
    const broker = await Aedes.createBroker();
    let n = 0;
    const flood = () => {
      for (let i = 0; i < 50; i++) broker.publish({ topic: ${JSON.stringify(topic)}, payload: String(n++), qos: 0 }, () => {});
      setImmediate(flood);
    };
    broker.once('subscribe', flood);
    const server = createServer(broker.handle);
    server.listen(0, '127.0.0.1', () => process.stdout.write(String(server.address().port)));`;
  const child = spawn(process.execPath, ['--input-type=module', '-e', script], {
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const over = new Promise<void>((resolve) => child.once('exit', () => resolve()));
  ended.push(async () => {
    child.kill();
    await over;
  });
  const port = await new Promise((resolve) => child.stdout.once('data', resolve));
  return `mqtt://127.0.0.1:${port}`;
}

export interface Sender {
  send(topic: string, payload: string | object, retain?: boolean): Promise<void>;
}

/** A device that publishes, by QoS 1. */
export async function senderTo({ address }: Pick<Broker, 'address'>): Promise<Sender> {
  const client = mqtt.connect(address, { clientId: 'device', reconnectPeriod: 50 });
  client.on('error', () => undefined);
  await new Promise<void>((resolve) => client.once('connect', () => resolve()));
  ended.push(() => client.endAsync(true));
  return {
    async send(topic, payload, retain = false) {
      const text = typeof payload === 'string' ? payload : JSON.stringify(payload);
      await client.publishAsync(topic, text, { qos: 1, retain });
    },
  };
}

function listening(server: Server, port: number): Promise<void> {
  return new Promise((resolve) => server.listen(port, '127.0.0.1', resolve));
}

function portOf(server: Server): number {
  return (server.address() as AddressInfo).port;
}

function once(end: () => Promise<void>): () => Promise<void> {
  let ending: Promise<void> | undefined;
  return () => {
    ending ??= end();
    return ending;
  };
}

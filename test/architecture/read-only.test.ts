import { describe, expect, it } from 'vitest';
import { readImports, withoutComments } from './read-imports.ts';
import { readSources } from './read-sources.ts';

const sources = readSources();
const live = [...sources.keys()].filter((file) => file.startsWith('server/live/'));
const reading = live.filter((file) => file.startsWith('server/live/sources/'));

/** What could change something at a source, by the names libraries and Node give it. */
const WRITES: readonly RegExp[] = [
  /** modbus-serial: function codes 05, 06, 15, 16, 22, 23 and those of one's own; `writeFC3` and `writeFC4` are not used. */
  /\b(?:writeCoils?|writeRegisters?|writeRegisterEnron|maskWriteRegister|customFunction|writeFC\d+|writeCustomFC)\b/,
  /** mqtt: sending a message, and leaving one to be sent at our death. */
  /\bpublish(?:Async)?\b|\bwill\s*:/,
  /** A socket or serial port of our own, by which anything could be sent. */
  /['"](?:node:)?(?:net|dgram|tls|child_process|serialport)['"]/,
  /** Files of a watched folder. */
  /\b(?:writeFile|appendFile|createWriteStream|truncate|unlink|rename|rmdir|rm|mkdir|copyFile|utimes|chmod)(?:Sync)?\b/,
  /** A way around the names above. */
  /\bclient\s*\[|\blibrary\s*\[|\bReflect\b|\b_port\b/,
];

function writesOf(text: string): string[] {
  return WRITES.flatMap((pattern) => pattern.exec(withoutComments(text))?.[0] ?? []);
}

describe('the sources', () => {
  it('were seen', () => {
    for (const file of ['modbus-port.ts', 'mqtt-feed.ts', 'growing-files.ts', 'practice.ts']) {
      expect(reading).toContain(`server/live/sources/${file}`);
    }
  });

  it('name nothing that writes', () => {
    expect(reading.flatMap((file) => writesOf(sources.get(file)!).map((what) => `${file} ${what}`))).toEqual([]);
  });

  it('hold each library that could write in one file, which hands out reading alone', () => {
    const importers = (name: string) =>
      [...sources.keys()].filter(
        (file) =>
          file.startsWith('server/') && readImports(sources.get(file)!).imports.some((one) => one.specifier === name),
      );
    expect(importers('modbus-serial')).toEqual(['server/live/sources/modbus-port.ts']);
    expect(importers('mqtt')).toEqual(['server/live/sources/mqtt-feed.ts']);
    expect(importers('serialport')).toEqual([]);
  });

  it.each([
    'await client.writeRegister(4, 1)',
    'await client.writeRegisters(4, [1])',
    'client.writeFC16(1, 4, [1], next)',
    'client.customFunction(6, [0, 1])',
    "client.publish('a', 'b')",
    "connect(broker, { will: { topic: 'a' } })",
    "import { connect } from 'node:net'",
    "const { SerialPort } = await import('serialport')",
    'await writeFile(path, text)',
    'renameSync(a, b)',
    "client['write' + 'Register'](4, 1)",
    'client._port.write(bytes)',
  ])('would be noticed if they held %s', (text) => {
    expect(writesOf(text)).not.toEqual([]);
  });
});

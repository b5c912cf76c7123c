import type { SourceReads } from '../../../models/log/live-source.ts';
import type { ModbusRequest } from './modbus-requests.ts';

/** All that anyone here can do with a Modbus device: ask for registers. */
export interface ModbusPort {
  /**
   * The registers asked for: function code 04 for input, 03 for holding registers.
   *
   * @throws {ModbusException} where the device answers that it will not; any other error where it does not answer.
   */
  read(request: Pick<ModbusRequest, 'unitId' | 'table' | 'address' | 'count'>): Promise<readonly number[]>;
  readonly isOpen: boolean;
  close(): Promise<void>;
}

/** A device's own refusal: it is there, but does not give these registers. */
export class ModbusException extends Error {
  override readonly name = 'ModbusException';
}

export type ModbusPlace = Extract<SourceReads, { readonly kind: 'modbus-tcp' | 'modbus-rtu' }>;

/** Opens the way to a device. The library's client, which could do more, does not leave this function. */
export async function openModbus(place: ModbusPlace, timeoutMs: number): Promise<ModbusPort> {
  const { default: library } = await import('modbus-serial');
  const client = new library.default();
  // A device that goes away is noticed by the next request; an error nobody listens for would end the program.
  client.on('error', () => undefined);
  client.setTimeout(timeoutMs);
  const port: ModbusPort = {
    async read({ unitId, table, address, count }) {
      client.setID(unitId);
      try {
        const answer = await (table === 'input'
          ? client.readInputRegisters(address, count)
          : client.readHoldingRegisters(address, count));
        return answer.data;
      } catch (error) {
        throw asSaid(error);
      }
    },
    get isOpen() {
      return client.isOpen;
    },
    close: () => closed(place, client),
  };
  try {
    if (place.kind === 'modbus-tcp') await client.connectTCP(place.host, { port: place.port });
    else await client.connectRTUBuffered(place.port, lineOf(place));
  } catch (error) {
    await port.close();
    throw error;
  }
  return port;
}

function lineOf({ baud, parity, stopBits }: Extract<ModbusPlace, { readonly kind: 'modbus-rtu' }>) {
  return { baudRate: baud, dataBits: 8, parity, stopBits };
}

interface Closable {
  readonly isOpen: boolean;
  close(callback: () => void): void;
  destroy(callback: () => void): void;
}

/** A socket is dropped: one whose peer hangs would not end of itself. A serial line is given back. */
function closed(place: ModbusPlace, client: Closable): Promise<void> {
  return new Promise((resolve) => {
    if (!client.isOpen) resolve();
    else setTimeout(resolve, LONGEST_CLOSE_MS).unref();
    if (place.kind === 'modbus-tcp') client.destroy(resolve);
    else if (client.isOpen) client.close(resolve);
  });
}

const LONGEST_CLOSE_MS = 500;

function asSaid(error: unknown): Error {
  const { modbusCode, message } = error as { readonly modbusCode?: number; readonly message?: string };
  if (modbusCode === undefined) return error instanceof Error ? error : new Error(message ?? String(error));
  return new ModbusException(`exception ${modbusCode}, ${EXCEPTIONS[modbusCode] ?? 'of its own kind'}`);
}

/** MODBUS Application Protocol V1.1b3, 7. */
const EXCEPTIONS: Readonly<Record<number, string>> = {
  1: 'it does not know this function',
  2: 'it has no such register',
  3: 'it does not give so many registers',
  4: 'it has failed',
  5: 'it needs longer',
  6: 'it is busy',
  8: 'its memory is damaged',
  10: 'the gateway has no path to it',
  11: 'the gateway has no answer from it',
};

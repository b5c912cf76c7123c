import { setTimeout as wait } from 'node:timers/promises';
import { modbusFigure } from './modbus-figure.ts';
import { ModbusException, type ModbusPort } from './modbus-port.ts';
import type { ModbusRequest } from './modbus-requests.ts';
import type { OneScan } from './source.ts';

/** A scan, with how much of the device answered. */
export interface ModbusScan extends OneScan {
  /** Registers came. */
  readonly gave: boolean;
  /** Something answered, though it may have been a refusal. */
  readonly answered: boolean;
}

/**
 * Asks for everything once. What does not answer is absent and the rest goes on; a unit that has let a request time out
 * is not asked again in this scan.
 *
 * `quietMs` is waited after a time-out where answers carry no number of their own, as on a serial line: an answer that
 * comes late is then over before the next request, and cannot be taken for its answer.
 */
export async function readModbusScan(
  port: ModbusPort,
  requests: readonly ModbusRequest[],
  channels: number,
  quietMs: number,
): Promise<ModbusScan> {
  const figures = new Float64Array(channels).fill(NaN);
  const because: (string | null)[] = Array.from({ length: channels }, () => null);
  const silentUnits = new Set<number>();
  let gave = false;
  let answered = false;
  for (const request of requests) {
    const absent = (why: string) => {
      for (const { channel } of request.channels) because[channel] = `${placeOf(request)}: ${why}`;
    };
    if (silentUnits.has(request.unitId)) {
      absent('no answer');
      continue;
    }
    try {
      const words = await port.read(request);
      gave = true;
      answered = true;
      for (const { channel, register, at } of request.channels) {
        const figure = modbusFigure(register, words, at);
        figures[channel] = figure;
        if (Number.isNaN(figure)) because[channel] = `${placeOf(request)}: "not available"`;
      }
    } catch (error) {
      const why = error as Error;
      if (why instanceof ModbusException) {
        answered = true;
        absent(why.message);
        continue;
      }
      absent(why.message === 'Timed out' ? 'no answer' : why.message);
      silentUnits.add(request.unitId);
      if (!port.isOpen) break;
      if (quietMs > 0) await wait(quietMs);
    }
  }
  return { figures, because, gave, answered };
}

function placeOf({ unitId, table, address, count }: ModbusRequest): string {
  const registers = count === 1 ? `register ${address}` : `registers ${address} to ${address + count - 1}`;
  return `unit ${unitId}, ${table} ${registers}`;
}

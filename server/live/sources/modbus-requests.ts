import type { ChannelLayout } from '../../../models/log/layout.ts';
import type { ModbusReads, ModbusRegister } from '../../../models/log/live-source.ts';
import { registersOf } from '../../../models/log/parse-modbus-reads.ts';

/** Most registers one request may ask for: MODBUS Application Protocol V1.1b3, 6.3 and 6.4. */
export const MOST_REGISTERS = 125;

/** Registers that stand side by side, read in one request. */
export interface ModbusRequest {
  readonly unitId: number;
  readonly table: ModbusRegister['table'];
  readonly address: number;
  readonly count: number;
  readonly channels: readonly RequestedChannel[];
}

export interface RequestedChannel {
  /** Its place among the source's channels. */
  readonly channel: number;
  readonly register: ModbusRegister;
  /** Where its figure begins in the answer. */
  readonly at: number;
}

/**
 * The fewest requests that ask for these registers and no others: a register nobody named may be one that changes by
 * being read, or none at all, at which a device refuses the whole request.
 */
export function modbusRequests({ registers }: ModbusReads, channels: readonly ChannelLayout[]): ModbusRequest[] {
  const asked = channels
    .flatMap(({ name }, channel) => {
      const register = registers[name];
      return register === undefined ? [] : [{ channel, register }];
    })
    .sort((a, b) => inOrder(a.register, b.register));
  const requests: (ModbusRequest & { count: number; channels: RequestedChannel[] })[] = [];
  for (const { channel, register } of asked) {
    const { unitId, table, address } = register;
    const width = registersOf(register);
    const last = requests.at(-1);
    const joins =
      last !== undefined &&
      last.unitId === unitId &&
      last.table === table &&
      last.address + last.count === address &&
      last.count + width <= MOST_REGISTERS;
    if (joins) {
      last.channels.push({ channel, register, at: last.count });
      last.count += width;
    } else {
      requests.push({ unitId, table, address, count: width, channels: [{ channel, register, at: 0 }] });
    }
  }
  return requests;
}

function inOrder(a: ModbusRegister, b: ModbusRegister): number {
  return a.unitId - b.unitId || (a.table < b.table ? -1 : a.table > b.table ? 1 : a.address - b.address);
}

import { listOf, number, object, oneOf, type Read, refuse, text } from '../document.ts';
import type { ModbusRegister, SourceReads } from './live-source.ts';
import { only, recordOf } from './source-fields.ts';

const TYPES = ['int16', 'uint16', 'int32', 'uint32', 'float32'] as const;

/** Registers a figure stands in. */
export function registersOf({ type }: ModbusRegister): 1 | 2 {
  return type === 'int16' || type === 'uint16' ? 1 : 2;
}

const port = number({ atLeast: 1, atMost: 65_535, whole: true });

export const readModbusTcp: Read<SourceReads> = object((fields) => ({
  kind: fields.required('kind', only('modbus-tcp')),
  host: fields.required('host', text),
  port: fields.required('port', port),
  registers: fields.required('registers', readRegisters),
}));

export const readModbusRtu: Read<SourceReads> = object((fields) => ({
  kind: fields.required('kind', only('modbus-rtu')),
  port: fields.required('port', text),
  baud: fields.required('baud', number({ atLeast: 300, atMost: 921_600, whole: true })),
  parity: fields.required('parity', oneOf(['none', 'even', 'odd'])),
  stopBits: fields.required('stopBits', (value, path) =>
    value === 1 || value === 2 ? value : refuse(path, '1 or 2', value),
  ),
  registers: fields.required('registers', readRegisters),
}));

const readRegisterKeys = object<ModbusRegister>((fields) => ({
  unitId: fields.required('unitId', number({ atLeast: 0, atMost: 255, whole: true })),
  table: fields.required('table', oneOf(['input', 'holding'])),
  address: fields.required('address', number({ atLeast: 0, atMost: 65_535, whole: true })),
  type: fields.required('type', oneOf(TYPES)),
  ...fields.optional('words', oneOf(['high-first', 'low-first'])),
  ...fields.optional('notAvailable', listOf(number(), { atLeast: 1 })),
}));

function readRegister(value: unknown, path: string): ModbusRegister {
  const register = readRegisterKeys(value, path);
  const width = registersOf(register);
  if (width === 1 && register.words !== undefined) {
    refuse(`${path}.words`, 'no such key: the figure is one register', register.words);
  }
  if (register.address + width > 65_536) {
    refuse(`${path}.address`, 'at most 65534 for a figure of two registers', register.address);
  }
  for (const [i, code] of (register.notAvailable ?? []).entries()) {
    const [least, most] = RANGES[register.type];
    const isPossible = register.type === 'float32' || (Number.isInteger(code) && code >= least && code <= most);
    if (!isPossible) refuse(`${path}.notAvailable[${i}]`, `a figure that ${register.type} can hold`, code);
  }
  return register;
}

/** A code may be written as the signed figure or as the bits are counted: −32768 and 32768 are the same two bytes. */
const RANGES: Readonly<Record<ModbusRegister['type'], readonly [number, number]>> = {
  int16: [-(2 ** 15), 2 ** 16 - 1],
  uint16: [0, 2 ** 16 - 1],
  int32: [-(2 ** 31), 2 ** 32 - 1],
  uint32: [0, 2 ** 32 - 1],
  float32: [-Infinity, Infinity],
};

/** Every register belongs to one channel: two that share one are a slip in an address or a type. */
function readRegisters(value: unknown, path: string): Readonly<Record<string, ModbusRegister>> {
  const registers = recordOf(readRegister)(value, path);
  const takenBy = new Map<string, string>();
  for (const [channel, register] of Object.entries(registers)) {
    const { unitId, table, address } = register;
    for (let at = address; at < address + registersOf(register); at++) {
      const place = `${unitId} ${table} ${at}`;
      const other = takenBy.get(place);
      if (other !== undefined) {
        refuse(
          `${path}.${channel}.address`,
          `registers that ${other} does not read (unit ${unitId}, ${table})`,
          address,
        );
      }
      takenBy.set(place, channel);
    }
  }
  return registers;
}

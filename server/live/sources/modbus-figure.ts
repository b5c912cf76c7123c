import type { ModbusRegister } from '../../../models/log/live-source.ts';

/**
 * The figure in one or two registers; NaN where they say that there is no reading.
 *
 * Registers are 16 bits, high byte first; of a figure of two, the high word comes first unless the document says else.
 *
 * @param register  How the figure is written.
 * @param words     [n], the registers of an answer, each 0 to 65535.
 * @param at        Where the figure begins.
 * @returns The figure before any scale; `NaN` for a code of `notAvailable` and for what is no finite number.
 *
 * Source: MODBUS Application Protocol V1.1b3, 4.2; IEEE 754-2019 for `float32`.
 */
export function modbusFigure(
  { type, words: order, notAvailable }: ModbusRegister,
  words: readonly number[],
  at: number,
) {
  const isLong = type === 'int32' || type === 'uint32' || type === 'float32';
  const lowFirst = isLong && order === 'low-first';
  VIEW.setUint16(0, words[lowFirst ? at + 1 : at] ?? 0);
  VIEW.setUint16(2, isLong ? (words[lowFirst ? at : at + 1] ?? 0) : 0);
  const figure = READ[type]();
  const bits = isLong ? VIEW.getUint32(0) : VIEW.getUint16(0);
  for (const code of notAvailable ?? []) {
    if (code === figure || (type === 'float32' ? Math.fround(code) === figure : code === bits)) return NaN;
  }
  return Number.isFinite(figure) ? figure : NaN;
}

const VIEW = new DataView(new ArrayBuffer(4));

const READ: Readonly<Record<ModbusRegister['type'], () => number>> = {
  int16: () => VIEW.getInt16(0),
  uint16: () => VIEW.getUint16(0),
  int32: () => VIEW.getInt32(0),
  uint32: () => VIEW.getUint32(0),
  float32: () => shortest(VIEW.getFloat32(0)),
};

/** The shortest decimal that is this number in single precision: 23.4 and not 23.399999618530273. */
function shortest(figure: number): number {
  if (!Number.isFinite(figure)) return figure;
  for (let digits = 6; digits < 9; digits++) {
    const rounded = Number(figure.toPrecision(digits));
    if (Math.fround(rounded) === figure) return rounded;
  }
  return figure;
}

import { constants, deflateRawSync, inflateRawSync } from 'node:zlib';

/**
 * One column of readings as bytes, exactly.
 *
 * Byte 0 says how: 1 or 2 = decimal figures as whole numbers of 10^-byte1, first or second differences, zigzag, plus
 * one (0 is an absent reading), base-128 varints; 0 = float64, little endian, where a figure is no short decimal.
 * What follows is deflated with Huffman codes alone: noise in the last digit leaves no repeats worth looking for.
 */
export function packColumn(value: Float64Array, order: 1 | 2): Buffer {
  const decimals = decimalsOf(value);
  if (decimals === null) return Buffer.concat([Uint8Array.of(0, 0), deflate(float64Bytes(value))]);
  return Buffer.concat([Uint8Array.of(order, decimals), deflate(encodeDifferences(value, order, decimals))]);
}

/** The column that {@link packColumn} was given; absent readings are `NaN`. */
export function unpackColumn(packed: Uint8Array, scans: number): Float64Array {
  const order = packed[0];
  const body = inflateRawSync(packed.subarray(2));
  if (order === 0) return float64FromBytes(body, scans);
  return decodeDifferences(body, scans, order === 2, packed[1] ?? 0);
}

/** Beyond this a second difference, zigzagged, is no longer a whole number a double holds. */
const MOST_SCALED = 2 ** 49;
const MOST_DECIMALS = 12;

/** The least number of decimals with which every figure of the column is exact; null where there is none. */
function decimalsOf(value: Float64Array): number | null {
  let decimals = 0;
  let power = 1;
  for (const figure of value) {
    if (Number.isNaN(figure)) continue;
    while (Math.round(figure * power) / power !== figure) {
      if (decimals === MOST_DECIMALS || !Number.isFinite(figure)) return null;
      decimals += 1;
      power = 10 ** decimals;
    }
  }
  for (const figure of value) if (Math.abs(figure * power) > MOST_SCALED) return null;
  return decimals;
}

function encodeDifferences(value: Float64Array, order: 1 | 2, decimals: number): Uint8Array {
  const power = 10 ** decimals;
  const bytes = new Uint8Array(value.length * 8);
  let at = 0;
  let last = 0;
  let lastDifference = 0;
  for (const figure of value) {
    if (Number.isNaN(figure)) {
      bytes[at++] = 0;
      continue;
    }
    const scaled = Math.round(figure * power);
    const difference = scaled - last;
    const coded = order === 2 ? difference - lastDifference : difference;
    last = scaled;
    lastDifference = difference;
    let rest = (coded >= 0 ? 2 * coded : -2 * coded - 1) + 1;
    while (rest >= 128) {
      bytes[at++] = (rest % 128) | 128;
      rest = Math.floor(rest / 128);
    }
    bytes[at++] = rest;
  }
  return bytes.subarray(0, at);
}

function decodeDifferences(bytes: Uint8Array, scans: number, second: boolean, decimals: number): Float64Array {
  const power = 10 ** decimals;
  const value = new Float64Array(scans);
  let at = 0;
  let last = 0;
  let lastDifference = 0;
  for (let scan = 0; scan < scans; scan += 1) {
    let byte = bytes[at++] ?? 0;
    let token = byte & 127;
    for (let weight = 128; byte >= 128; weight *= 128) {
      byte = bytes[at++] ?? 0;
      token += (byte & 127) * weight;
    }
    if (token === 0) {
      value[scan] = Number.NaN;
      continue;
    }
    const zigzag = token - 1;
    const coded = zigzag % 2 === 0 ? zigzag / 2 : -(zigzag + 1) / 2;
    const difference = second ? coded + lastDifference : coded;
    last += difference;
    lastDifference = difference;
    value[scan] = last / power;
  }
  return value;
}

function float64Bytes(value: Float64Array): Uint8Array {
  const bytes = Buffer.alloc(value.length * 8);
  value.forEach((figure, scan) => {
    bytes.writeDoubleLE(figure, scan * 8);
  });
  return bytes;
}

function float64FromBytes(bytes: Buffer, scans: number): Float64Array {
  return Float64Array.from({ length: scans }, (_, scan) => bytes.readDoubleLE(scan * 8));
}

function deflate(bytes: Uint8Array): Buffer {
  return deflateRawSync(bytes, { strategy: constants.Z_HUFFMAN_ONLY });
}

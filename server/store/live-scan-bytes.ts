/** A scan's figures as they are kept and hashed: binary64, little endian, absent and zero each of one bit pattern. */
export function packScan(figures: Float64Array): Buffer {
  const packed = Buffer.allocUnsafe(figures.length * 8);
  for (let n = 0; n < figures.length; n += 1) {
    const figure = figures[n] ?? Number.NaN;
    if (Number.isNaN(figure)) packed.writeBigUInt64LE(ABSENT, n * 8);
    else packed.writeDoubleLE(figure + 0, n * 8);
  }
  return packed;
}

export function unpackScan(packed: Buffer): Float64Array {
  const figures = new Float64Array(packed.length / 8);
  for (let n = 0; n < figures.length; n += 1) figures[n] = packed.readDoubleLE(n * 8);
  return figures;
}

const ABSENT = 0x7ff8000000000000n;

import { type CompositionSums, packedSums, sumsFromPacked } from '../standing/composition-sums';

const NUMBER_BYTES = 8;

/** The sums of a composition as bytes: 64-bit floats, little-endian, in the order that standing/ gives. */
export function packSums(sums: CompositionSums): Buffer {
  const numbers = packedSums(sums);
  const packed = Buffer.allocUnsafe(numbers.length * NUMBER_BYTES);
  numbers.forEach((value, index) => packed.writeDoubleLE(value, index * NUMBER_BYTES));
  return packed;
}

/** Undefined where a row has none, and for bytes that this release can't have packed. */
export function unpackSums(packed: Buffer | null): CompositionSums | undefined {
  if (packed === null) return undefined;
  const numbers = Array.from({ length: Math.floor(packed.length / NUMBER_BYTES) }, (_, index) =>
    packed.readDoubleLE(index * NUMBER_BYTES),
  );
  return sumsFromPacked(numbers);
}

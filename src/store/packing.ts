import type { Measurement, PolarPerPhase } from '../contract/feed';

/**
 * The terminals' measurements of one instant as bytes, so that every derived figure can be computed again from
 * them: numbers as 64-bit floats, exactly as they came. Little-endian; a version byte stands first.
 */

const VERSION = 1;
const VALIDITIES = ['good', 'questionable', 'invalid'] as const;
const SOURCES = ['satellite', 'channel', 'free'] as const;
const HAS = { current: 1, voltage: 2, reported: 4, channel: 8, breakerOpen: 16, test: 32 } as const;
// one scratch for all: nothing here waits between the first byte and the copy
const scratch = Buffer.allocUnsafe(4096);

export interface PackedTerminal {
  readonly terminalId: number;
  readonly measurement: Measurement;
}

/** The instant itself is the row's key and is not packed. */
export function packMeasurements(terminals: readonly PackedTerminal[]): Buffer {
  const writer = createWriter(scratch);
  writer.byte(VERSION);
  writer.byte(terminals.length);
  for (const { terminalId, measurement } of terminals) {
    writer.integer(terminalId);
    writer.byte(presentParts(measurement));
    writer.byte(VALIDITIES.indexOf(measurement.validity));
    writer.byte(SOURCES.indexOf(measurement.clock.source));
    writer.number(measurement.clock.error_us);
    writer.number(measurement.frequency);
    writer.number(measurement.seq);
    if (measurement.current !== undefined) writePolar(writer, measurement.current);
    if (measurement.voltage !== undefined) writePolar(writer, measurement.voltage);
    if (measurement.reported !== undefined)
      for (const value of [...measurement.reported.differential, ...measurement.reported.restraint])
        writer.number(value);
    if (measurement.channel !== undefined) {
      writer.number(measurement.channel.send_ms);
      writer.number(measurement.channel.receive_ms);
      writer.number(measurement.channel.loss_ppm);
      writer.text(measurement.channel.path);
    }
  }
  return writer.written();
}

export function unpackMeasurements(packed: Buffer, at: Date): PackedTerminal[] {
  const reader = createReader(packed);
  const version = reader.byte();
  if (version !== VERSION)
    throw new Error(`A stored snapshot is packed in version ${version}, which this release does not read.`);
  return Array.from({ length: reader.byte() }, () => readTerminal(reader, at.toISOString()));
}

function presentParts(measurement: Measurement): number {
  return (
    (measurement.current === undefined ? 0 : HAS.current) |
    (measurement.voltage === undefined ? 0 : HAS.voltage) |
    (measurement.reported === undefined ? 0 : HAS.reported) |
    (measurement.channel === undefined ? 0 : HAS.channel) |
    (measurement.breaker === 'open' ? HAS.breakerOpen : 0) |
    (measurement.test ? HAS.test : 0)
  );
}

function readTerminal(reader: Reader, at: string): PackedTerminal {
  const terminalId = reader.integer();
  const parts = reader.byte();
  const validity = VALIDITIES[reader.byte()]!;
  const source = SOURCES[reader.byte()]!;
  const error_us = reader.number();
  const frequency = reader.number();
  const seq = reader.number();
  const has = (part: keyof typeof HAS): boolean => (parts & HAS[part]) !== 0;
  const measurement: Measurement = {
    at,
    seq,
    ...(has('current') && { current: readPolar(reader) }),
    ...(has('voltage') && { voltage: readPolar(reader) }),
    ...(has('reported') && { reported: { differential: readThree(reader), restraint: readThree(reader) } }),
    ...(has('channel') && { channel: readChannel(reader) }),
    frequency,
    breaker: has('breakerOpen') ? 'open' : 'closed',
    clock: { source, error_us },
    validity,
    test: has('test'),
  };
  return { terminalId, measurement };
}

function writePolar(writer: Writer, { a, b, c }: PolarPerPhase): void {
  for (const [magnitude, degrees] of [a, b, c]) {
    writer.number(magnitude);
    writer.number(degrees);
  }
}

function readPolar(reader: Reader): PolarPerPhase {
  const polar = (): [number, number] => [reader.number(), reader.number()];
  return { a: polar(), b: polar(), c: polar() };
}

const readThree = (reader: Reader): [number, number, number] => [
  reader.number(),
  reader.number(),
  reader.number(),
];

const readChannel = (reader: Reader): NonNullable<Measurement['channel']> => ({
  send_ms: reader.number(),
  receive_ms: reader.number(),
  loss_ppm: reader.number(),
  path: reader.text(),
});

interface Writer {
  byte(value: number): void;
  integer(value: number): void;
  number(value: number): void;
  text(value: string): void;
  written(): Buffer;
}

function createWriter(buffer: Buffer): Writer {
  let at = 0;
  return {
    byte: (value) => void (at = buffer.writeUInt8(value, at)),
    integer: (value) => void (at = buffer.writeInt32LE(value, at)),
    number: (value) => void (at = buffer.writeDoubleLE(value, at)),
    text(value) {
      const length = buffer.write(value, at + 1, 'utf8');
      buffer.writeUInt8(length, at);
      at += 1 + length;
    },
    written: () => Buffer.from(buffer.subarray(0, at)),
  };
}

interface Reader {
  byte(): number;
  integer(): number;
  number(): number;
  text(): string;
}

function createReader(buffer: Buffer): Reader {
  let at = 0;
  const moved = <T>(value: T, bytes: number): T => {
    at += bytes;
    return value;
  };
  return {
    byte: () => moved(buffer.readUInt8(at), 1),
    integer: () => moved(buffer.readInt32LE(at), 4),
    number: () => moved(buffer.readDoubleLE(at), 8),
    text() {
      const length = buffer.readUInt8(at);
      return moved(buffer.toString('utf8', at + 1, at + 1 + length), 1 + length);
    },
  };
}

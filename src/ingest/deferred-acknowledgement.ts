import type { IPublishPacket, MqttClient } from 'mqtt';
import type { Duplex } from 'node:stream';

/** What has to be acknowledged once its snapshot is stored: a packet id, and the connection it is valid on. */
export interface Receipt {
  readonly stream: Duplex;
  readonly messageId: number;
}

export interface Delivery {
  readonly topic: string;
  readonly payload: Buffer;
  readonly retained: boolean;
  /** undefined at QoS 0: there is nothing to acknowledge */
  readonly receipt: Receipt | undefined;
}

// The client sends its PUBACK from this callback and delivers the next packet only after it. An error skips the
// PUBACK and keeps delivering, so that a commit may come later without stalling the stream.
const WITHHELD = new Error('The acknowledgement follows the commit.');
const PUBACK = 0x40;
const PUBACK_BYTES = 4;

/**
 * Hands every delivery to `take` and withholds its acknowledgement until `acknowledge` is called with its receipt.
 * When `take` returns a promise, delivery stalls until that settles: this is how a full queue holds the broker back.
 * Relies on how MQTT.js 5.16 treats handleMessage's callback: the version is pinned and a test holds it to that.
 */
export function deferAcknowledgements(
  client: MqttClient,
  take: (delivery: Delivery) => Promise<void> | undefined,
): { acknowledge(receipts: readonly Receipt[]): void } {
  client.handleMessage = (packet: IPublishPacket, callback) => {
    const held = take(deliveryOf(client, packet));
    const proceed = () => callback(packet.qos === 1 ? WITHHELD : undefined);
    if (held === undefined) proceed();
    else void held.then(proceed, proceed);
  };
  return { acknowledge: (receipts) => writeAcknowledgements(client, receipts) };
}

function deliveryOf(client: MqttClient, packet: IPublishPacket): Delivery {
  const payload = typeof packet.payload === 'string' ? Buffer.from(packet.payload) : packet.payload;
  const receipt =
    packet.qos === 1 && packet.messageId !== undefined
      ? { stream: client.stream, messageId: packet.messageId }
      : undefined;
  return { topic: packet.topic, payload, retained: packet.retain, receipt };
}

/** A receipt of a connection that has gone is dropped: the broker delivers again, and may reuse the id. */
function writeAcknowledgements(client: MqttClient, receipts: readonly Receipt[]): void {
  const valid = receipts.filter(({ stream }) => stream === client.stream && !stream.destroyed);
  if (valid.length === 0 || !client.connected) return;
  const packets = Buffer.allocUnsafe(valid.length * PUBACK_BYTES);
  valid.forEach(({ messageId }, index) => {
    const at = index * PUBACK_BYTES;
    packets[at] = PUBACK;
    packets[at + 1] = 2;
    packets.writeUInt16BE(messageId, at + 2);
  });
  client.stream.write(packets);
}

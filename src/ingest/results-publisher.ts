import type { MqttClient } from 'mqtt';
import { resultTopic } from '../contract/result';
import { conditionOf, type LineWatch } from './line-watch';
import { resultMessage } from './result-message';

/**
 * Publishes the newest result of a line, retained, at QoS 0. When snapshots come faster than batches are committed,
 * those in between are stored but not published: a result is where the line stands.
 */
export function publishResult(client: MqttClient, watch: LineWatch, nowMs: number): void {
  // while the broker is away nothing is queued: what it gets when it is back is the newest
  if (!client.connected) return;
  const result = resultMessage(watch.line, watch.newest, { condition: conditionOf(watch), nowMs });
  client.publish(resultTopic(watch.line.key), JSON.stringify(result), { qos: 0, retain: true });
}

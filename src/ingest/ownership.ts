import { createHash } from 'node:crypto';

/**
 * Which of n workers takes a line, by rendezvous hashing (Thaler and Ravishankar, 1998): the one with the highest
 * weight. When n grows by one, a line either stays or moves to the new worker.
 */
export function ownerOf(lineKey: string, workerCount: number): number {
  let owner = 0;
  let highest = -1n;
  for (let worker = 0; worker < workerCount; worker += 1) {
    const weight = createHash('sha256').update(`${worker}/${lineKey}`).digest().readBigUInt64BE();
    if (weight > highest) [owner, highest] = [worker, weight];
  }
  return owner;
}

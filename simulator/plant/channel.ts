import { smoothNoise } from './noise';

/** One way for messages between terminals; asymmetry is what sending takes longer than receiving. */
export type ChannelPath = { readonly path: string; readonly delayMs: number; readonly asymmetryMs: number };

export type ChannelTruth = {
  readonly usual: ChannelPath;
  readonly lossPpm: number;
  /** a lasting change of path, in days from the site's epoch */
  readonly change?: { readonly atDay: number; readonly to: ChannelPath };
};

/** What a terminal other than the first sees of its channel; the first sees the two directions swapped. */
export type ChannelState = {
  readonly path: string;
  readonly sendMs: number;
  readonly receiveMs: number;
  readonly lossPpm: number;
};

const DAY_MS = 86_400_000;

export function channelState(
  channel: ChannelTruth,
  seed: number,
  { atMs, epochMs }: { readonly atMs: number; readonly epochMs: number },
): ChannelState {
  const changed = channel.change !== undefined && atMs >= epochMs + channel.change.atDay * DAY_MS;
  const way = changed ? channel.change.to : channel.usual;
  const minutes = atMs / 60_000;
  const half = (way.asymmetryMs + 0.006 * smoothNoise(seed, minutes)) / 2;
  const delay = way.delayMs + 0.03 * smoothNoise(seed ^ 1, minutes / 8);
  const loss = channel.lossPpm * (1 + 0.5 * smoothNoise(seed ^ 2, minutes / 30));
  return { path: way.path, sendMs: delay + half, receiveMs: delay - half, lossPpm: loss };
}

/**
 * How far a terminal that takes its time from the channel has its samples ahead of the first terminal's, in
 * radians: it halves the round trip, and so is off by half of what the two directions differ.
 */
export const channelAngleRad = (channel: ChannelState, frequencyHz: number): number =>
  2 * Math.PI * frequencyHz * ((channel.sendMs - channel.receiveMs) / 2) * 1e-3;

import type { ReplaySide, ReplaySummary } from '../contract/replay';
import type { SettingsVersion } from '../contract/settings-version';
import { PHASES } from './phase';
import type { PhasePoint, SideDrawn } from './replay-drawing';
import { worstOf } from './replay-words';

/** Both characteristics with the greatest point of each phase. The recorded one is that which judged the worst. */
export function sidesDrawn(
  { settings, recorded, replayed }: ReplaySummary,
  versions: readonly SettingsVersion[],
  inForce: SettingsVersion | undefined,
): { replayed: SideDrawn; recorded: SideDrawn | undefined } {
  const judging = worstOf(recorded)?.point.settingsVersion;
  const version = versions.find(({ id }) => id === judging) ?? inForce;
  return {
    replayed: { characteristic: settings.characteristic, points: pointsOf(replayed) },
    recorded: version && {
      characteristic: version.characteristic,
      points: pointsOf(recorded).filter(({ point }) => point.settingsVersion === version.id),
    },
  };
}

const pointsOf = (side: ReplaySide): PhasePoint[] =>
  PHASES.flatMap((phase) => {
    const point = side.phases[phase].greatest;
    return point === null ? [] : [{ phase, point }];
  });

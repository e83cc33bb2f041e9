import type { RegisterLine } from '../contract/register';
import type { ReplaySettings } from '../contract/replay';
import { isThresholdCharacteristic } from '../protection/characteristic';
import { schemeProblems } from '../protection/scheme';
import type { SettingProblem } from '../protection/setting-problem';

export type ReplayLine = Pick<RegisterLine, 'key' | 'name' | 'goesBy' | 'capacitanceNfPerKm'> & {
  readonly terminals: readonly Pick<RegisterLine['terminals'][number], 'key' | 'substationName'>[];
};

/** Everything that keeps settings from being tried on a line, at once, each beside its field. */
export function replayProblems(settings: ReplaySettings, line: ReplayLine): SettingProblem[] {
  const { characteristic, chargingCompensation } = settings;
  const problems = [...schemeProblems(settings, { terminals: line.terminals.map(({ key }) => key) })];
  if (line.goesBy === 'reported' && !isThresholdCharacteristic(characteristic))
    problems.push({
      field: 'characteristic.kind',
      problem: 'This kind weighs phasors, and this line’s feed holds reported magnitudes alone.',
    });
  if (chargingCompensation && line.goesBy === 'reported')
    problems.push({
      field: 'chargingCompensation',
      problem: 'Nothing can be taken out of magnitudes that a terminal reported: this needs phasors.',
    });
  else if (chargingCompensation && line.capacitanceNfPerKm === null)
    problems.push({
      field: 'chargingCompensation',
      problem: 'The charging current can be compensated only when the line’s capacitance is recorded.',
    });
  return problems;
}

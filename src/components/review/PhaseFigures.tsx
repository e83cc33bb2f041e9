import type { ReactNode } from 'react';
import { PHASES } from '../../view/phase';
import type { PhaseName } from '../../view/phase';
import type { PhaseLetters } from '../../view/site-custom';
import { PhaseSign } from '../marks/PhaseMarker';

interface Row {
  readonly head: string;
  /** how the figure is formed: on hover, and read out */
  readonly title: string;
  readonly of: (phase: PhaseName) => ReactNode;
  readonly strong?: boolean;
}

interface Props {
  readonly caption: string;
  readonly letters: PhaseLetters;
  readonly rows: readonly Row[];
}

/** Figures of the three phases side by side, each with its convention on hover. */
export function PhaseFigures({ caption, letters, rows }: Props) {
  return (
    <table className="figures">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">
            <span className="sr-only">figure</span>
          </th>
          {PHASES.map((phase) => (
            <th key={phase} scope="col" className="figure">
              <span className="inline-flex items-center gap-1.5 text-ink">
                <PhaseSign phase={phase} />
                {letters[phase]}
              </span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map(({ head, title, of, strong = false }) => (
          <tr key={head} title={title} className={strong ? 'font-semibold' : ''}>
            <th scope="row" className={strong ? '!text-ink !font-semibold' : ''}>
              {head}
            </th>
            {PHASES.map((phase) => (
              <td key={phase} className="figure">
                {of(phase)}
              </td>
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

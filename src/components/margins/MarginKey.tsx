import { percentText } from '../../view/figures';
import { PHASES } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { KeySign } from '../marks/KeySign';
import { PhaseSign } from '../marks/PhaseMarker';

/** How to read the strip of a row, in one line. */
export function MarginKey({ site }: { site: SiteCustom }) {
  return (
    <p className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-1 text-caption text-ink-2">
      {PHASES.map((phase) => (
        <span key={phase} className="inline-flex items-center gap-1">
          <PhaseSign phase={phase} size={3.2} /> {site.phaseLetters[phase]}
        </span>
      ))}
      <KeySign words="expected">
        <path d="M7 1V11" stroke="var(--accent)" strokeWidth="1.75" />
      </KeySign>
      <KeySign words={`near mark, ${percentText(site.nearRatio)}`}>
        <path d="M7 0V12" stroke="currentColor" strokeWidth="1.25" strokeDasharray="1.25 2.5" />
      </KeySign>
      <KeySign words="pickup">
        <path d="M7 0V12" stroke="var(--ink)" />
      </KeySign>
      <span>– not computable</span>
    </p>
  );
}

import { percentText } from '../../view/figures';
import { PHASES } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
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
      <Sign words="expected">
        <path d="M7 1V11" stroke="var(--accent)" strokeWidth="1.75" />
      </Sign>
      <Sign words={`near mark, ${percentText(site.nearRatio)}`}>
        <path d="M7 0V12" stroke="currentColor" strokeWidth="1.25" strokeDasharray="1.25 2.5" />
      </Sign>
      <Sign words="pickup">
        <path d="M7 0V12" stroke="var(--ink)" />
      </Sign>
      <span>– not computable</span>
    </p>
  );
}

function Sign({ words, children }: { words: string; children: React.ReactNode }) {
  return (
    <span className="inline-flex items-center gap-1">
      <svg width="14" height="12" viewBox="0 0 14 12" aria-hidden="true">
        {children}
      </svg>
      {words}
    </span>
  );
}

import { PHASES } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { PhaseSign } from './PhaseMarker';

/** How to read a strip, in one line. */
export function StripKey({ site }: { site: SiteCustom }) {
  return (
    <p className="flex flex-wrap items-center gap-x-4 gap-y-1 text-caption text-ink-2">
      {PHASES.map((phase) => (
        <span key={phase} className="inline-flex items-center gap-1">
          <PhaseSign phase={phase} size={3.2} /> {site.phaseLetters[phase]}
        </span>
      ))}
      <Sign words="last 24 h">
        <rect x="0" y="3" width="14" height="6" fill="var(--band)" />
      </Sign>
      <Sign words="near">
        <path d="M7 0V12" stroke="currentColor" strokeWidth="1.25" strokeDasharray="1.25 2.5" />
      </Sign>
      <Sign words="pickup">
        <path d="M7 0V12" stroke="var(--ink)" />
      </Sign>
      <Sign words="threshold">
        <path d="M5 0H9V12H5Z" fill="var(--ink)" />
      </Sign>
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

import { PHASES } from '../../view/phase';
import type { SiteCustom } from '../../view/site-custom';
import { KeySign } from './KeySign';
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
      <KeySign words="last 24 h">
        <rect x="0" y="3" width="14" height="6" fill="var(--band)" />
      </KeySign>
      <KeySign words="near">
        <path d="M7 0V12" stroke="currentColor" strokeWidth="1.25" strokeDasharray="1.25 2.5" />
      </KeySign>
      <KeySign words="pickup">
        <path d="M7 0V12" stroke="var(--ink)" />
      </KeySign>
      <KeySign words="threshold">
        <path d="M5 0H9V12H5Z" fill="var(--ink)" />
      </KeySign>
    </p>
  );
}

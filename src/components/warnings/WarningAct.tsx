import type { LineSummary } from '../../contract/lines';
import type { Warning } from '../../contract/warning';
import { instantText } from '../../view/figures';
import type { SiteCustom } from '../../view/site-custom';
import { AcknowledgeButton } from './AcknowledgeButton';

interface WarningActProps {
  warnings: LineSummary['warnings'];
  lineKey: string;
  site: SiteCustom;
  nowMs: number;
  mayAcknowledge: boolean;
  onAcknowledged: (warning: Warning) => void;
}

/** What to do next about a line: acknowledge what stands open, or read what was noted, and open the line. */
export function WarningAct({
  warnings,
  lineKey,
  site,
  nowMs,
  mayAcknowledge,
  onAcknowledged,
}: WarningActProps) {
  const standing = warnings.filter((warning) => warning.returnedAt === null);
  const waiting = standing.find((warning) => warning.state === 'unacknowledged');
  const noted = standing.find((warning) => warning.acknowledgedAt !== null);
  const open = (
    <a href={`/lines/${lineKey}`} className="button">
      Open
    </a>
  );
  if (waiting !== undefined && mayAcknowledge)
    return (
      <div className="mt-2">
        <AcknowledgeButton warning={waiting} onAcknowledged={onAcknowledged} beside={open} />
      </div>
    );
  return (
    <>
      {noted !== undefined && waiting === undefined && (
        <p className="mt-1 line-clamp-4 text-ink-2">
          Acknowledged by {noted.acknowledgedBy ?? 'someone'},{' '}
          {instantText(noted.acknowledgedAt!, nowMs, site.timeZone)}
          {noted.note === null ? '.' : `: “${noted.note}”`}
        </p>
      )}
      {waiting !== undefined && <p className="mt-1 text-ink-2">Not acknowledged yet.</p>}
      <div className="mt-2">{open}</div>
    </>
  );
}

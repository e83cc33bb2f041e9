import type { PolygonCause } from '../../view/composition-polygon';
import { CAUSE_STROKES } from './cause-stroke';

/** The stroke of a cause, to stand beside its name. */
export function StrokeOfCause({ cause, ink }: { cause: PolygonCause | 'differential'; ink: string }) {
  const { width, dash } = CAUSE_STROKES[cause];
  return (
    <svg
      width="26"
      height="8"
      viewBox="0 0 26 8"
      aria-hidden="true"
      className={`inline-block shrink-0 ${ink}`}
    >
      <line x1="0" y1="4" x2="26" y2="4" stroke="currentColor" strokeWidth={width} strokeDasharray={dash} />
    </svg>
  );
}

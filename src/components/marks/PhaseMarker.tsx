import type { PhaseName } from '../../view/phase';

interface PhaseMarkerProps {
  phase: PhaseName;
  /** half the height, px */
  size?: number;
  /** drawn as an outline: the value is stale or only predicted */
  hollow?: boolean;
}

/** A phase's shape around the origin of an SVG: circle, diamond, square for a, b, c; takes the current colour. */
export function PhaseMarker({ phase, size = 5, hollow = false }: PhaseMarkerProps) {
  const ink = hollow
    ? { fill: 'var(--panel)', stroke: 'currentColor', strokeWidth: 1.25 }
    : { fill: 'currentColor', stroke: 'none' };
  if (phase === 'a') return <circle r={size} {...ink} />;
  if (phase === 'b') {
    const reach = size * 1.2;
    return <path d={`M0 ${-reach}L${reach} 0L0 ${reach}L${-reach} 0Z`} {...ink} />;
  }
  const half = size * 0.9;
  return <rect x={-half} y={-half} width={2 * half} height={2 * half} {...ink} />;
}

/** The same shape as a mark of its own, to stand beside a phase's letter in a table or a legend. */
export function PhaseSign({ phase, size = 4.5 }: { phase: PhaseName; size?: number }) {
  const box = size * 2.6;
  return (
    <svg
      width={box}
      height={box}
      viewBox={`${-box / 2} ${-box / 2} ${box} ${box}`}
      aria-hidden="true"
      className="inline-block shrink-0"
    >
      <PhaseMarker phase={phase} size={size} />
    </svg>
  );
}

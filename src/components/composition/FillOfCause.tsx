import type { StackedCause } from '../../view/composition-history';

/** The fill of a cause's share, to stand beside its name. */
export function FillOfCause({ cause }: { cause: StackedCause }) {
  return (
    <svg
      width="26"
      height="12"
      viewBox="0 0 26 12"
      aria-hidden="true"
      className="inline-block shrink-0 text-ink-2"
    >
      {cause === 'charging' && <rect width="26" height="12" fill="var(--band)" />}
      {cause === 'ratio' && (
        <path d="M-4 12 8 0M4 12 16 0M12 12 24 0M20 12 32 0" stroke="currentColor" strokeWidth="1" />
      )}
      {cause === 'angle' &&
        [3, 8, 13, 18, 23].map((x, index) => (
          <circle key={x} cx={x} cy={index % 2 === 0 ? 4 : 8} r="1" fill="currentColor" />
        ))}
      <rect x="0.5" y="0.5" width="25" height="11" fill="none" stroke="currentColor" strokeWidth="0.75" />
    </svg>
  );
}

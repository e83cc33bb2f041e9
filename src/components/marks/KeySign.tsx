import type { ReactNode } from 'react';

/** One sign of a strip's key, with what it stands for. */
export function KeySign({ words, children }: { words: string; children: ReactNode }) {
  return (
    <span className="inline-flex items-center gap-1">
      <svg width="14" height="12" viewBox="0 0 14 12" aria-hidden="true">
        {children}
      </svg>
      {words}
    </span>
  );
}

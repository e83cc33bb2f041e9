import { useState } from 'react';
import type { ReviewPeriod } from '../../view/review-period';

interface Props {
  readonly period: Extract<ReviewPeriod, { kind: 'between' }>;
  readonly onPeriod: (period: ReviewPeriod) => void;
}

const inField = (atMs: number): string => new Date(atMs).toISOString().slice(0, 16);

/** A period between two instants, in UTC as the archive keeps them. */
export function PeriodFields({ period, onPeriod }: Props) {
  const [from, setFrom] = useState(inField(period.fromMs));
  const [to, setTo] = useState(inField(period.toMs));
  const [fromMs, toMs] = [from, to].map((text) => Date.parse(`${text}Z`));
  const inOrder = fromMs !== undefined && toMs !== undefined && fromMs < toMs;
  return (
    <form
      className="flex flex-wrap items-center gap-x-2 gap-y-1"
      onSubmit={(event) => {
        event.preventDefault();
        if (inOrder) onPeriod({ kind: 'between', fromMs, toMs });
      }}
    >
      <label>
        <span className="text-ink-2">from </span>
        <input
          className="field"
          type="datetime-local"
          value={from}
          onChange={(event) => setFrom(event.target.value)}
        />
      </label>
      <label>
        <span className="text-ink-2">to </span>
        <input
          className="field"
          type="datetime-local"
          value={to}
          aria-invalid={!inOrder}
          onChange={(event) => setTo(event.target.value)}
        />
      </label>
      <span className="text-ink-2">UTC</span>
      <button type="submit" className="button" disabled={!inOrder}>
        Show
      </button>
      {!inOrder && <span className="field-problem">The period begins before it ends.</span>}
    </form>
  );
}

import type { Condition } from '../../contract/condition';
import { CONDITION_INK, CONDITION_MEANING } from '../../view/condition-words';

interface ConditionMarkProps {
  condition: Condition;
  /** the value is not live: the word is followed by this, such as "42 s ago" */
  age?: string | undefined;
  /** without its colour: the page is not live */
  faded?: boolean;
  className?: string;
}

/** A line's condition: its shape and its word, in its colour. Over is the only one that is filled. */
export function ConditionMark({ condition, age, faded = false, className = '' }: ConditionMarkProps) {
  const ink = condition === 'over' ? 'bg-over px-1.5 text-on-over' : CONDITION_INK[condition];
  const shown = faded || age !== undefined ? 'text-ink-2' : ink;
  return (
    <span
      className={`inline-flex items-center gap-1.5 font-semibold whitespace-nowrap ${shown} ${className}`}
      title={CONDITION_MEANING[condition]}
    >
      <ConditionShape condition={condition} />
      <span>
        {condition}
        {age !== undefined && <span className="font-normal">, {age}</span>}
      </span>
    </span>
  );
}

const stroked = { fill: 'none', stroke: 'currentColor', strokeWidth: 1.75 } as const;

/** Each condition has a silhouette of its own, readable without colour and without the word. */
const SHAPES: Readonly<Record<Condition, React.ReactNode>> = {
  // a level beam
  settled: <path d="M1 6H11" {...stroked} strokeWidth={2.25} />,
  // climbing, with a fall between
  rising: <path d="M0.8 9.6 4 5.6 6.4 7.8 11 2.4" {...stroked} strokeWidth={2} />,
  near: <path d="M6 1 11.6 11H0.4Z" fill="currentColor" />,
  // past the post
  over: <path d="M1 1H3.4V11H1ZM5 1.4 11.6 6 5 10.6Z" fill="currentColor" />,
  // an outline that does not close
  blind: <circle cx="6" cy="6" r="4.7" {...stroked} strokeDasharray="2.6 2.32" />,
  'not evaluated': (
    <path d="M0.8 4.9H3V7.1H0.8ZM4.9 4.9H7.1V7.1H4.9ZM9 4.9H11.2V7.1H9Z" fill="currentColor" />
  ),
  // an open switch
  'out of service': <path d="M0 9H3.2L9.4 3.4M8.8 9H12" {...stroked} strokeWidth={1.5} />,
};

export function ConditionShape({ condition }: { condition: Condition }) {
  return (
    <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="shrink-0">
      {SHAPES[condition]}
    </svg>
  );
}

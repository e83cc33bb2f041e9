import { useEffect, useId, useState } from 'react';
import {
  characteristicDrawing,
  settingsTyped,
  type CharacteristicDrawing,
} from '../../view/register-drawing';

interface CharacteristicSketchProps {
  /** the fields' values when the page was made */
  typed: Readonly<Record<string, string>>;
  /** the form to follow while it is typed in; without it the drawing stands still */
  formId?: string;
}

const BOX = { width: 340, height: 190, left: 6, bottom: 20 };

/** The characteristic that the form's fields make, drawn as it is typed. */
export function CharacteristicSketch({ typed, formId }: CharacteristicSketchProps) {
  const [values, setValues] = useState(typed);
  useEffect(() => (formId === undefined ? undefined : followForm(formId, setValues)), [formId]);
  const settings = settingsTyped(values);
  const drawing = characteristicDrawing(settings, BOX);
  if (drawing === undefined)
    return (
      <p className="flex aspect-[34/19] w-full max-w-[22rem] items-center justify-center border border-dashed border-rule px-6 text-center text-ink-2">
        {isComplete(settings)
          ? 'No scheme can have these figures, so there is nothing to draw.'
          : 'Drawn once pickup, knee and both slopes are typed.'}
      </p>
    );
  return <Sketch drawing={drawing} />;
}

const isComplete = ({ pickupAmps, slope1, kneeAmps, slope2 }: ReturnType<typeof settingsTyped>): boolean =>
  [pickupAmps, slope1, kneeAmps, slope2].every(Number.isFinite);

function followForm(
  formId: string,
  take: (values: Record<string, string>) => void,
): (() => void) | undefined {
  const form = document.getElementById(formId);
  if (!(form instanceof HTMLFormElement)) return undefined;
  const read = () => {
    const entries = [...new FormData(form)].filter(
      (entry): entry is [string, string] => typeof entry[1] === 'string',
    );
    take(Object.fromEntries(entries));
  };
  // A browser may have put back what was typed before the page was left
  read();
  form.addEventListener('input', read);
  return () => form.removeEventListener('input', read);
}

function Sketch({ drawing }: { drawing: CharacteristicDrawing }) {
  const hatchId = useId();
  const floor = BOX.height - BOX.bottom;
  const line = drawing.threshold.map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join(' ');
  const operates = `${line} ${BOX.width},0 ${BOX.left},0`;
  return (
    <svg
      viewBox={`0 0 ${BOX.width} ${BOX.height}`}
      className="w-full max-w-[22rem]"
      role="img"
      aria-label={`Threshold against restraint: pickup ${drawing.pickupLabel}${
        drawing.kneeX === undefined ? '' : `, knee at ${drawing.kneeLabel}`
      }.`}
    >
      <defs>
        <pattern
          id={hatchId}
          width="6"
          height="6"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <line x1="0" y1="0" x2="0" y2="6" stroke="var(--rule)" strokeWidth="0.6" />
        </pattern>
      </defs>
      <polygon points={operates} fill={`url(#${hatchId})`} opacity="0.7" />
      <path d={`M${BOX.left} 0V${floor}H${BOX.width}`} fill="none" stroke="var(--rule)" />
      <path
        d={`M${BOX.left} ${drawing.pickupY.toFixed(1)}H${BOX.width}`}
        stroke="var(--ink-2)"
        strokeWidth="0.75"
        strokeDasharray="2 3"
      />
      {drawing.kneeX !== undefined && (
        <path
          d={`M${drawing.kneeX.toFixed(1)} 0V${floor}`}
          stroke="var(--ink-2)"
          strokeWidth="0.75"
          strokeDasharray="2 3"
        />
      )}
      <polyline points={line} fill="none" stroke="var(--ink)" strokeWidth="2" strokeLinejoin="round" />
      <g fontSize="11" fill="var(--ink-2)">
        <text x={BOX.width - 2} y={drawing.pickupY + 12} textAnchor="end">
          pickup {drawing.pickupLabel}
        </text>
        <text x={BOX.left} y={BOX.height - 5}>
          0
        </text>
        {drawing.kneeX !== undefined && (
          <text x={drawing.kneeX} y={BOX.height - 5} textAnchor="middle">
            knee {drawing.kneeLabel}
          </text>
        )}
        <text x={BOX.width - 2} y={BOX.height - 5} textAnchor="end">
          {drawing.restraintLabel}
        </text>
      </g>
      <text
        x={BOX.left + 10}
        y="16"
        fontSize="11"
        fill="var(--ink)"
        stroke="var(--panel)"
        strokeWidth="3"
        paintOrder="stroke"
      >
        operates
      </text>
    </svg>
  );
}

import type { ReplayField } from '../../view/replay-fields';

interface Props {
  readonly field: ReplayField;
  /** the terminal whose fields begin here */
  readonly heading: string | undefined;
  readonly value: string;
  /** the figure in force; undefined where another kind is, or none */
  readonly recorded: string | undefined;
  readonly problem: string | undefined;
  readonly onType: (value: string) => void;
}

/** One figure with its unit; once it differs from the one in force, that stands below it. */
export function FigureField({ field, heading, value, recorded, problem, onType }: Props) {
  const id = `replay-${field.name}`;
  const changed = recorded !== undefined && recorded !== value;
  return (
    <>
      {heading !== undefined && <p className="col-span-2 -mb-2 pt-1 font-medium">{heading}</p>}
      <div className="min-w-0">
        <label htmlFor={id} className="block text-caption text-ink-2">
          {field.label}
        </label>
        <div className="mt-0.5 flex items-baseline gap-1.5">
          <input
            id={id}
            value={value}
            inputMode="decimal"
            autoComplete="off"
            aria-invalid={problem !== undefined}
            aria-describedby={`${id}-recorded ${id}-problem`}
            onChange={(event) => onType(event.target.value)}
            onFocus={(event) => event.target.select()}
            className={`field w-full min-w-0 ${changed ? 'font-semibold' : ''}`}
          />
          {field.unit !== '' && <span className="whitespace-nowrap text-ink-2">{field.unit}</span>}
        </div>
        <p id={`${id}-recorded`} className="mt-0.5 text-caption text-ink-2 empty:hidden">
          {changed ? `recorded: ${recorded} ${field.unit}` : ''}
        </p>
        <p id={`${id}-problem`} role="alert" className="field-problem mt-0.5 text-caption empty:hidden">
          {problem}
        </p>
      </div>
    </>
  );
}

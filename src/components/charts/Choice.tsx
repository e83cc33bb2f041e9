interface Props<Value extends string> {
  /** what is being chosen, for whoever doesn't see the group */
  readonly legend: string;
  readonly name: string;
  readonly value: Value;
  readonly options: readonly { readonly value: Value; readonly label: string }[];
  readonly onChoose: (value: Value) => void;
}

/** One of a few, side by side: radio buttons underneath, so arrow keys move within the group. */
export function Choice<Value extends string>({ legend, name, value, options, onChoose }: Props<Value>) {
  return (
    <fieldset className="m-0 flex min-w-0 flex-wrap gap-x-3.5 border-0 p-0">
      <legend className="sr-only">{legend}</legend>
      {options.map((option) => (
        <label
          key={option.value}
          className="relative inline-flex min-h-7 cursor-pointer items-center border-b-2 border-transparent text-ink-2 has-checked:border-ink has-checked:font-medium has-checked:text-ink has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-accent hover:text-ink"
        >
          <input
            type="radio"
            className="absolute inset-0 m-0 cursor-pointer opacity-0"
            name={name}
            value={option.value}
            checked={option.value === value}
            onChange={() => onChoose(option.value)}
          />
          {option.label}
        </label>
      ))}
    </fieldset>
  );
}

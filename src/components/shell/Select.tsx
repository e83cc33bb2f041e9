interface SelectProps {
  label: string;
  name: string;
  value: string;
  options: readonly (readonly [value: string, words: string])[];
  onChoose: (value: string) => void;
}

export function Select({ label, name, value, options, onChoose }: SelectProps) {
  return (
    <label className="grid gap-0.5 text-caption text-ink-2">
      {label}
      <select
        name={name}
        value={value}
        onChange={(event) => onChoose(event.target.value)}
        className="field max-w-44 text-body"
      >
        {options.map(([key, words]) => (
          <option key={key} value={key}>
            {words}
          </option>
        ))}
      </select>
    </label>
  );
}

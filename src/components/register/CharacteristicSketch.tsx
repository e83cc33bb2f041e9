import { useEffect, useState } from 'react';
import { characteristicSchema } from '../../contract/settings-version';
import { characteristicFromTyped } from '../../view/register-scheme-typed';
import { SchemeSketch } from './SchemeSketch';

interface CharacteristicSketchProps {
  /** the fields' values when the page was made */
  typed: Readonly<Record<string, string>>;
  /** keys of the line's terminals */
  terminals: readonly string[];
  /** the form to follow while it is typed in */
  formId: string;
}

/** The characteristic that the form's fields make, drawn as it is typed. */
export function CharacteristicSketch({ typed, terminals, formId }: CharacteristicSketchProps) {
  const [values, setValues] = useState(typed);
  useEffect(() => followForm(formId, setValues), [formId]);
  const settings = characteristicSchema.safeParse(characteristicFromTyped(values, terminals));
  return (
    <SchemeSketch
      characteristics={settings.success ? [settings.data] : []}
      nothing={
        settings.success
          ? 'No scheme can have these figures, so there is nothing to draw.'
          : 'Drawn once all figures of this kind are typed.'
      }
    />
  );
}

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

import type { SettingsVersion } from '../../contract/settings-version';
import { settingsRows } from '../../view/line-settings-rows';
import type { SettingsRow } from '../../view/line-settings-rows';

interface Props {
  /** the line's key */
  readonly line: string;
  readonly settings: readonly SettingsVersion[];
  readonly nowMs: number;
  readonly timeZone: string;
}

/** The versions of the recorded settings: copies to compare with, never sent to a device. */
export function SettingsPanel({ line, settings, nowMs, timeZone }: Props) {
  const rows = settingsRows(settings, { nowMs, timeZone });
  return (
    <section className="panel min-w-0 p-4 sm:p-[1.125rem]" aria-labelledby="settings-title">
      <h2 id="settings-title" className="m-0 text-body font-semibold">
        Recorded settings
      </h2>
      <p className="mt-0.5 text-caption text-ink-2">
        A copy to compare with, in amperes primary; Tareline neither reads nor writes the devices
      </p>
      {rows.length === 0 ? (
        <p className="mt-3 text-ink-2">
          None are recorded, so this line is not evaluated. An engineer can record a version in the register.
        </p>
      ) : (
        <ol className="m-0 mt-2 list-none p-0">
          {rows.map((row) => (
            <Version key={row.id} row={row} line={line} />
          ))}
        </ol>
      )}
    </section>
  );
}

const STATES: Readonly<Record<SettingsRow['state'], string>> = {
  'in force': 'in force',
  past: 'until the next version',
  'not yet': 'not yet in force',
};

function Version({ row, line }: { row: SettingsRow; line: string }) {
  const inForce = row.state === 'in force';
  return (
    <li
      className={`border-b border-hairline py-2.5 last:border-b-0 ${inForce ? 'border-l-[3px] border-l-ink pl-3' : 'pl-[0.9375rem] text-ink-2'}`}
    >
      <p className="flex flex-wrap justify-between gap-x-4">
        <span className={inForce ? 'font-semibold' : ''}>from {row.validFrom}</span>
        <span>{STATES[row.state]}</span>
      </p>
      <dl className="m-0 mt-1 grid grid-cols-[6.5rem_1fr] gap-x-3 gap-y-0.5 sm:grid-cols-[6.5rem_1fr_6.5rem_1fr]">
        {row.values.map(({ name, value }) => (
          <div key={name} className="contents">
            <dt className="text-ink-2">{name}</dt>
            <dd className="m-0">{value}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-1 text-pretty">
        {row.note} <span className="whitespace-nowrap text-ink-2">({row.recorded})</span>
      </p>
      {row.state !== 'not yet' && (
        <a
          className="link text-caption"
          href={`/lines/${line}/compare?at=${row.day}`}
          aria-label={`Compare before and after ${row.validFrom}`}
        >
          Compare before and after
        </a>
      )}
    </li>
  );
}

import { useState } from 'react';
import type { LineSummary } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import type { NotComputable } from '../../protection/evaluation';
import type { PickupWindow } from '../../protection/pickup-window';
import { ampsText } from '../../view/figures';
import { csvName } from '../../view/line-csv';
import { MULTIPLE_BOUNDS } from '../../view/review-number';
import { pickupStrip } from '../../view/review-pickup-strip';
import { pickupTable } from '../../view/review-tables';
import { pickupWords } from '../../view/review-words';
import type { SiteCustom } from '../../view/site-custom';
import { ChartPanel } from '../charts/ChartPanel';
import { Assumptions } from './Assumptions';

interface Props {
  readonly line: LineSummary;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly convention: string;
  readonly window: (PickupWindow & { readonly pickupAmps: number }) | NotComputable;
  readonly multiple: string;
  readonly onMultiple: (multiple: string) => void;
  readonly mayRegister: boolean;
}

/** Between which bounds a pickup makes sense here, and where the recorded one lies. */
export function PickupWindowPanel(props: Props) {
  const { line, site, nowMs, convention, window, multiple, onMultiple, mayRegister } = props;
  return (
    <ChartPanel
      title="Pickup window"
      caption={`From ${multiple} times the expected standing level without compensation to the least internal fault`}
      controls={<MultipleField multiple={multiple} onMultiple={onMultiple} />}
      table={isComputable(window) ? pickupTable(window, convention) : undefined}
      fileName={csvName([line.key, 'pickup window'], nowMs)}
      timeZone={site.timeZone}
    >
      {isComputable(window) ? (
        <div className="min-w-0" title={convention}>
          <Strip window={window} />
          <p className="mt-2 text-pretty">{pickupWords(window, window.pickupAmps)}</p>
          {window.upperAmps === undefined && (
            <p className="mt-1 text-pretty">
              The upper bound is not recorded: enter the least internal fault current of the owner’s
              short-circuit study, in amperes primary, with the line in the{' '}
              {mayRegister ? (
                <a className="link" href={`/register/${line.key}`}>
                  register
                </a>
              ) : (
                'register'
              )}
              .
            </p>
          )}
          <Assumptions
            sentences={[
              'Expected level: the causes as independent, charging included even where the scheme compensates it, so that a lost voltage does not make it operate. The multiple is the owner’s.',
            ]}
          />
        </div>
      ) : (
        <p className="py-2 text-ink-2">{window.notComputable}</p>
      )}
    </ChartPanel>
  );
}

function MultipleField({ multiple, onMultiple }: Pick<Props, 'multiple' | 'onMultiple'>) {
  const [typed, setTyped] = useState(multiple);
  const { least, most } = MULTIPLE_BOUNDS;
  const allowed = typed.trim() !== '' && Number(typed) >= least && Number(typed) <= most;
  return (
    <label className="flex flex-wrap items-center gap-x-2">
      <span className="text-ink-2">multiple</span>
      <input
        className="field w-20"
        type="number"
        inputMode="decimal"
        min={least}
        max={most}
        step="0.1"
        value={typed}
        aria-invalid={!allowed}
        onChange={({ target }) => {
          setTyped(target.value);
          const next = Number(target.value);
          if (target.value.trim() !== '' && next >= least && next <= most) onMultiple(String(next));
        }}
      />
      {!allowed && (
        <span className="field-problem">
          Give a number from {least} to {most}.
        </span>
      )}
    </label>
  );
}

const percent = (share: number): string => `${(100 * share).toFixed(2)}%`;

/** The window as a band on a scale from zero, open to the right while the upper bound is not recorded. */
function Strip({ window }: { window: PickupWindow & { readonly pickupAmps: number } }) {
  const { band, pickup, mostAmps, open } = pickupStrip(window);
  return (
    <div aria-hidden="true" className="mt-1">
      <div className="relative h-6 bg-lane">
        {band !== undefined && (
          <span
            className={`absolute inset-y-0 border-l border-ink-2 bg-band ${open ? '' : 'border-r'}`}
            style={{ left: percent(band.from), width: percent(band.to - band.from) }}
          />
        )}
        <span className="absolute -inset-y-1 w-[3px] bg-ink" style={{ left: percent(pickup) }} />
      </div>
      <div className="mt-1.5 flex justify-between text-caption text-ink-2">
        <span>0</span>
        <span>{ampsText(mostAmps)}</span>
      </div>
      <p className="text-caption text-ink-2">
        Heavy line: recorded pickup {ampsText(window.pickupAmps)}; band: {ampsText(window.lowerAmps)}
        {window.upperAmps === undefined ? ' and up' : ` to ${ampsText(window.upperAmps)}`}
      </p>
    </div>
  );
}

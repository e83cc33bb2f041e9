import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { LineDetail } from '../../contract/lines';
import { isComputable } from '../../protection/evaluation';
import type { PhaseName } from '../../view/phase';
import { basisInAddress } from '../../view/review-basis';
import type { MismatchBasis } from '../../view/review-basis';
import type { ReviewLine } from '../../view/review-line';
import { broughtBy, terminalsInService } from '../../view/review-line';
import { reviewPickupWindow } from '../../view/review-margins';
import type { LagChoice } from '../../view/review-number';
import type { ReviewPeriod } from '../../view/review-period';
import { conventionWords } from '../../view/review-words';
import type { SiteCustom } from '../../view/site-custom';
import { worstStandingPhase } from '../../view/trend-phase';
import { versionInForce } from '../../view/trend-pickup';
import { CurrentSumPanel } from '../line/CurrentSumPanel';
import { useAddressSwitch } from '../line/use-address';
import { useLine } from '../line/use-line';
import { ExpectedPanel } from './ExpectedPanel';
import { LoadPanel } from './LoadPanel';
import { PickupWindowPanel } from './PickupWindowPanel';
import { PlanePanel } from './PlanePanel';
import { ReviewHeader } from './ReviewHeader';
import { SensitivityPanel } from './SensitivityPanel';
import { SequencePanel } from './SequencePanel';
import { resultOnLineSide, useLiveSnapshot } from './use-live-snapshot';
import { useCloud, useFigures, usePeriod } from './use-review';

export interface ReviewPageProps {
  /** what the server knew when it made the page */
  readonly detail: LineDetail;
  readonly review: ReviewLine;
  readonly site: SiteCustom;
  /** whether this person may open the register */
  readonly mayRegister: boolean;
  /** the switches as the address had them */
  readonly address: {
    readonly period: ReviewPeriod;
    readonly basis: MismatchBasis;
    readonly lag: LagChoice;
    readonly multiple: number;
  };
}

/** One line under review: where it stands under which convention, why, and how much room that leaves. */
export function ReviewPage(props: ReviewPageProps) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { retry: 1 } } }));
  return (
    <QueryClientProvider client={client}>
      <ReviewView {...props} />
    </QueryClientProvider>
  );
}

const lagKept = (lag: LagChoice) => (lag === '30' ? undefined : lag);
const multipleKept = (multiple: string) => (multiple === '2.5' ? undefined : multiple);

function ReviewView({ detail: initial, review, site, mayRegister, address }: ReviewPageProps) {
  const { detail, line, result, nowMs, faded } = useLine(initial);
  const [period, setPeriod] = usePeriod(address.period);
  const [basis, setBasis] = useAddressSwitch('mismatch', address.basis, basisInAddress);
  const [lag, setLag] = useAddressSwitch('angle', address.lag, lagKept);
  const [multiple, setMultiple] = useAddressSwitch('multiple', String(address.multiple), multipleKept);
  const [summed, setSummed] = useState<PhaseName>(() => worstStandingPhase(initial.line, site.nearRatio));
  const minuteMs = Math.floor(nowMs / 60_000) * 60_000;
  const inForce = useMemo(() => versionInForce(detail.settings, minuteMs), [detail.settings, minuteMs]);
  const cloud = useCloud(line.key, period, nowMs);
  const live = useLiveSnapshot(review, inForce, result);
  const figures = useFigures({ review, detail, inForce }, { basis, lagDeg: Number(lag) });
  const shared = { line, site, nowMs, faded };
  const header = <ReviewHeader {...shared} inForce={inForce} period={period} onPeriod={setPeriod} />;
  if (inForce === undefined || figures === undefined) {
    return (
      <div className="grid gap-4">
        {header}
        <p className="panel p-4">
          No settings are recorded for this line, so there is nothing to review it against. Once a version is
          in the register, its plane and its margins stand here.
        </p>
      </div>
    );
  }
  const convention = conventionWords(inForce);
  const told = { ...shared, convention };
  const { expected } = figures;
  const uncompensatedAmps = isComputable(expected) ? expected.uncompensatedAmps : undefined;
  const onLineSide = resultOnLineSide(result, live);
  return (
    <div className="grid gap-4">
      {header}
      <div className="grid gap-4 lg:grid-cols-2 lg:gap-x-6">
        <div className="grid min-w-0 content-start gap-4">
          <PlanePanel
            {...told}
            inForce={inForce}
            period={period}
            cloud={cloud.data}
            cloudError={cloud.error}
            onTryAgain={() => void cloud.refetch()}
            live={live}
            load={figures.load}
          />
          <ExpectedPanel {...told} expected={expected} />
          <PickupWindowPanel
            {...told}
            window={reviewPickupWindow(
              { line: review, recorded: inForce },
              { multiple: Number(multiple), uncompensatedAmps },
            )}
            multiple={multiple}
            onMultiple={setMultiple}
            mayRegister={mayRegister}
          />
        </div>
        <div className="grid min-w-0 content-start gap-4">
          <CurrentSumPanel
            {...shared}
            inService={terminalsInService(review)}
            result={onLineSide}
            unit="amperes"
            phase={summed}
            onPhase={setSummed}
            broughtBy={broughtBy(review, line.compensation)}
          />
          <LoadPanel
            {...told}
            load={figures.load}
            basis={basis}
            onBasis={setBasis}
            lag={lag}
            onLag={setLag}
            hasTransformer={review.inZoneTransformer !== null}
          />
          <SensitivityPanel {...told} seen={figures.seen} />
          <SequencePanel {...told} live={live} />
        </div>
      </div>
    </div>
  );
}

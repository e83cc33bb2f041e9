import { QueryClient, QueryClientProvider, useQueryClient } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { LineDetail } from '../../contract/lines';
import { causeSpanInAddress } from '../../view/composition-history';
import type { CauseSpan } from '../../view/composition-history';
import type { CurrentUnit } from '../../view/line-unit';
import type { PhaseName } from '../../view/phase';
import { TAIL_MS } from '../../view/plane-tail';
import { broughtBy } from '../../view/review-line';
import type { ReviewLine } from '../../view/review-line';
import type { SiteCustom } from '../../view/site-custom';
import { worstStandingPhase } from '../../view/trend-phase';
import type { TrendPhase } from '../../view/trend-phase';
import { versionInForce } from '../../view/trend-pickup';
import { spanInAddress } from '../../view/trend-span';
import type { TrendSpan } from '../../view/trend-span';
import { CauseHistory } from '../composition/CauseHistory';
import { WhyPanel } from '../composition/WhyPanel';
import { resultOnLineSide, useLiveSnapshot } from '../review/use-live-snapshot';
import { CurrentSumPanel } from './CurrentSumPanel';
import { LineHeader } from './LineHeader';
import { OperatingPlane } from './OperatingPlane';
import { PhasesPanel } from './PhasesPanel';
import { SettingsPanel } from './SettingsPanel';
import { StandingTrend } from './StandingTrend';
import { TerminalsPanel } from './TerminalsPanel';
import { useAddressSwitch } from './use-address';
import { useLine } from './use-line';
import { useLiveReadings, useRecentReadings } from './use-readings';
import { WarningsPanel } from './WarningsPanel';

export interface LinePageProps {
  /** what the server knew when it made the page */
  readonly detail: LineDetail;
  /** the line's constants, by which its currents are brought to one side */
  readonly review: ReviewLine;
  readonly site: SiteCustom;
  readonly mayAcknowledge: boolean;
  /** the switches as the address had them */
  readonly address: {
    readonly unit: CurrentUnit;
    readonly span: TrendSpan;
    readonly causes: CauseSpan;
    readonly phase: TrendPhase | undefined;
  };
}

/** One line, from its operating point now to its warnings of the past. */
export function LinePage(props: LinePageProps) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { retry: 1 } } }));
  return (
    <QueryClientProvider client={client}>
      <LineView {...props} />
    </QueryClientProvider>
  );
}

const unitInAddress = (unit: CurrentUnit) => (unit === 'per unit' ? 'pu' : undefined);
const spanKept = (span: TrendSpan) => (span === 'two months' ? undefined : spanInAddress(span));
const phaseKept = (phase: TrendPhase) => phase;

function LineView({ detail: initial, review, site, mayAcknowledge, address }: LinePageProps) {
  const client = useQueryClient();
  const { detail, line, result, warnings, nowMs, faded } = useLine(initial);
  const [unit, setUnit] = useAddressSwitch('unit', address.unit, unitInAddress);
  const [span, setSpan] = useAddressSwitch('span', address.span, spanKept);
  const [worst] = useState<PhaseName>(() => worstStandingPhase(initial.line, site.nearRatio));
  const [phase, setPhase] = useAddressSwitch<TrendPhase>('phase', address.phase ?? worst, phaseKept);
  const [causes, setCauses] = useAddressSwitch('causes', address.causes, causeSpanInAddress);
  const one = phase === 'all' ? worst : phase;
  const live = useLiveReadings(result);
  const recent = useRecentReadings(line.key, live, { nowMs, windowMs: TAIL_MS, enabled: true });
  const minuteMs = Math.floor(nowMs / 60_000) * 60_000;
  const inForce = useMemo(() => versionInForce(detail.settings, minuteMs), [detail.settings, minuteMs]);
  const snapshot = useLiveSnapshot(review, inForce, result);
  const inService = detail.terminals.filter((terminal) => terminal.inService).map(({ key }) => key);
  const shared = { line, site, nowMs, faded };
  return (
    <div className="grid gap-4">
      <LineHeader
        {...shared}
        terminalCount={detail.terminals.length}
        inForce={inForce}
        mayAcknowledge={mayAcknowledge}
        onAcknowledged={() => void client.invalidateQueries({ queryKey: ['line', line.key] })}
        unit={unit}
        onUnit={setUnit}
      />
      <div className="grid gap-4 lg:grid-cols-[minmax(0,0.87fr)_minmax(0,1fr)] lg:gap-x-6">
        <div className="grid min-w-0 content-start gap-4">
          <OperatingPlane
            {...shared}
            inForce={inForce}
            readings={recent.readings}
            tailError={recent.error}
            unit={unit}
            live={snapshot}
          />
          <CurrentSumPanel
            {...shared}
            inService={inService}
            result={resultOnLineSide(result, snapshot)}
            unit={unit}
            phase={one}
            onPhase={setPhase}
            broughtBy={broughtBy(review, line.compensation)}
          />
        </div>
        <div className="grid min-w-0 content-start gap-4">
          <WhyPanel
            line={line}
            standing={detail.standing}
            site={site}
            unit={unit}
            phase={one}
            onPhase={setPhase}
          />
          <PhasesPanel {...shared} unit={unit} restraint={inForce?.restraint} />
        </div>
      </div>
      <StandingTrend
        {...shared}
        settings={detail.settings}
        standing={detail.standing}
        works={detail.works}
        terminals={detail.terminals}
        live={live}
        unit={unit}
        span={span}
        onSpan={setSpan}
        phase={phase}
        onPhase={setPhase}
      />
      <CauseHistory
        line={line}
        standing={detail.standing}
        site={site}
        nowMs={minuteMs}
        unit={unit}
        phase={one}
        span={causes}
        onSpan={setCauses}
      />
      <TerminalsPanel {...shared} terminals={detail.terminals} result={result} />
      <div className="grid gap-4 lg:grid-cols-2 lg:gap-x-6">
        <SettingsPanel line={line.key} settings={detail.settings} nowMs={minuteMs} timeZone={site.timeZone} />
        <WarningsPanel {...shared} warnings={warnings} />
      </div>
    </div>
  );
}

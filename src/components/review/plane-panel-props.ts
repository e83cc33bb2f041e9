import type { LineSummary } from '../../contract/lines';
import type { ReviewCloud } from '../../contract/review';
import type { SettingsVersion } from '../../contract/settings-version';
import type { NotComputable } from '../../protection/evaluation';
import type { ReviewPeriod } from '../../view/review-period';
import type { SiteCustom } from '../../view/site-custom';
import type { LiveSnapshot } from './use-live-snapshot';
import type { ReviewFigures } from './use-review';

export interface PlanePanelProps {
  readonly line: LineSummary;
  readonly inForce: SettingsVersion;
  readonly site: SiteCustom;
  readonly nowMs: number;
  readonly faded: boolean;
  readonly convention: string;
  readonly period: ReviewPeriod;
  readonly cloud: ReviewCloud | undefined;
  readonly cloudError: Error | null;
  readonly onTryAgain: () => void;
  readonly live: LiveSnapshot | NotComputable | undefined;
  readonly load: ReviewFigures['load'];
}

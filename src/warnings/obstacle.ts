import { expectedTerminals } from '../contract/expected-terminals';
import type { RegisterLine } from '../contract/register';

/** Why a line can't be evaluated whatever its terminals send; undefined when it can. */
export function obstacle(
  line: Pick<RegisterLine, 'goesBy' | 'terminals' | 'settings' | 'inZoneTransformer'>,
): string | undefined {
  const expectedCount = expectedTerminals(line).length;
  if (line.inZoneTransformer !== null && line.inZoneTransformer.otherTerminals.length === 0)
    return 'A transformer stands in the zone, and the register does not say which terminals are behind it.';
  if (expectedCount === 0) return 'The register holds no terminal in service for this line.';
  if (expectedCount === 1 && line.goesBy === 'phasors')
    return 'The register holds one terminal in service; a differential needs at least two.';
  if (line.settings.length === 0) return 'The register holds no settings for this line.';
  return undefined;
}

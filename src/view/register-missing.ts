import type { RegisterLine } from '../contract/register';
import { ctClassNamed } from '../protection/ct-class';

/** A constant that the register lacks, and what cannot be told without it. */
export interface MissingConstant {
  readonly constant: string;
  readonly needed: string;
}

export function missingConstants(line: RegisterLine): MissingConstant[] {
  const classless = line.terminals.filter(({ ctClass }) => ctClassNamed(ctClass) === undefined);
  const missing: MissingConstant[] = [];
  if (line.capacitanceNfPerKm === null)
    missing.push({
      constant: 'Capacitance',
      needed: 'the expected charging current, its compensation, and the expected standing level',
    });
  if (line.leastInternalFaultAmps === null)
    missing.push({
      constant: 'Least internal fault current',
      needed: 'the upper end of the window that the pickup belongs in',
    });
  if (classless.length > 0)
    missing.push({
      constant: `Transformer class at ${classless.map(({ substationName }) => substationName).join(', ')}`,
      needed:
        'the part of the expected standing level that transformers may cause (5P, 10P, 5PR, PX, TPX, TPY, TPZ)',
    });
  if (line.inZoneTransformer?.otherTerminals.length === 0)
    missing.push({
      constant: 'Terminals behind the transformer',
      needed:
        'bringing their currents to the line’s voltage; as recorded, every terminal counts as on the line',
    });
  return missing;
}

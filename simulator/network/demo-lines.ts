import type { NewLine } from '../../src/contract/register';
import type { LineTruth } from '../plant/truth';
import { lines110 } from './lines-110';
import { lines220 } from './lines-220';
import { lines380 } from './lines-380';

const network = [...lines380, ...lines220, ...lines110];

/** The register's entries of the invented network: 24 lines in 9 substations. */
export const demoLines: readonly NewLine[] = network.map((entry) => entry.line);

/** What is physically so on each of them; nothing of Tareline reads this. */
export const demoTruths: readonly LineTruth[] = network.map((entry) => entry.truth);

import { CT_CLASSES, ctClassNamed } from '../protection/ct-class';
import type { CtClass } from '../protection/ct-class';
import type { NotComputable } from '../protection/evaluation';
import { listed } from './line-words';
import { terminalsInService } from './review-line';
import type { ReviewLine } from './review-line';

/** The classes of the transformers of the terminals in service, in their order, or whose is not known. */
export function reviewClasses(line: Pick<ReviewLine, 'terminals'>): readonly CtClass[] | NotComputable {
  const terminals = terminalsInService(line).map((key) => line.terminals.find((each) => each.key === key)!);
  const named = terminals.map(({ ctClass }) => ctClassNamed(ctClass));
  const unknown = terminals.filter((_, index) => named[index] === undefined);
  if (unknown.length > 0) {
    const who = listed(unknown.map(({ substationName }) => substationName));
    return {
      notComputable: `The register names no class of IEC 61869-2 for the transformers at ${who}, so there is no class budget.`,
    };
  }
  return named.flatMap((name) => (name === undefined ? [] : [CT_CLASSES[name]]));
}

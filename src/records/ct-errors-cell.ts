import type { CtErrorAllowance } from '../protection/adaptive';
import { amount } from '../view/register-amount';

/** The transformer errors of an adaptive scheme in one cell: "arden 0.01 0.05 2400; birk 0.01 0.05 2400". */
export const ctErrorsCell = (ctErrors: readonly CtErrorAllowance[]): string =>
  ctErrors
    .map(({ terminal, errorBelow, errorAbove, limitAmps }) =>
      [terminal, errorBelow, errorAbove, limitAmps].join(' '),
    )
    .join('; ');

const FORM =
  'Give for each terminal its key, the error up to the limit current and beyond it as ratios, and the limit in amperes: arden 0.01 0.05 2400; birk 0.01 0.05 2400.';

export function ctErrorsOf(
  cell: string,
): { ok: true; value: CtErrorAllowance[] } | { ok: false; problem: string } {
  const value: CtErrorAllowance[] = [];
  for (const part of cell.split(';').filter((text) => text.trim() !== '')) {
    const [terminal = '', ...figures] = part.trim().split(/\s+/);
    const [errorBelow, errorAbove, limitAmps] = figures.map(amount);
    if (
      figures.length !== 3 ||
      typeof errorBelow !== 'number' ||
      typeof errorAbove !== 'number' ||
      typeof limitAmps !== 'number'
    )
      return { ok: false, problem: FORM };
    value.push({ terminal, errorBelow, errorAbove, limitAmps });
  }
  return value.length === 0 ? { ok: false, problem: FORM } : { ok: true, value };
}

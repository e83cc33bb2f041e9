import type { RegisterOutcome } from '../../actions/register';
import type { Typed } from '../../view/register-form';

/** What a form shows: values by field, and after a refusal what was said of them. */
export interface FormState {
  readonly values: Typed;
  readonly problem: string | undefined;
  readonly byField: Readonly<Record<string, string>>;
}

/** A form as typed when it came back refused, else with the values that stand. */
export function formState(outcome: RegisterOutcome | undefined, standing: Typed): FormState {
  if (outcome === undefined || outcome.done) return { values: standing, problem: undefined, byField: {} };
  return { values: outcome.typed, problem: outcome.problem, byField: outcome.byField };
}

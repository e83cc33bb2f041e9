import { defineAction } from 'astro:actions';
import type { APIContext } from 'astro';
import type { z } from 'zod';
import type { Ability } from '../auth/abilities';
import { requireAbility, roleSentence } from '../auth/guard';
import type { Problem } from '../contract/problem';
import {
  linePatchSchema,
  newLineSchema,
  newSettingsVersionSchema,
  newTerminalSchema,
  terminalPatchSchema,
} from '../contract/register';
import { parseSent } from '../server/problems';
import { refusalStatus } from '../server/register-answer';
import { databaseIsAway } from '../store/database-away';
import { readRegister, readRegisterLine } from '../store/register';
import type { Editing, RegisterEdit } from '../store/register-change';
import {
  insertLine,
  insertSettingsVersion,
  insertTerminal,
  patchLine,
  patchTerminal,
  removeTerminal,
} from '../store/register-edit';
import type { FromTyped, Typed } from '../view/register-form';
import { lineFromTyped, problemsByField, settingsFromTyped, terminalFromTyped } from '../view/register-typed';
import { importRegister } from './register-import';

/** What a form of the register comes back with; a refused one brings along all that was typed. */
export type RegisterOutcome =
  | { readonly done: true; readonly key: string }
  | {
      readonly done: false;
      readonly status: number;
      readonly problem: string;
      readonly byField: Readonly<Record<string, string>>;
      readonly typed: Typed;
    };

type ActionContext = Pick<APIContext, 'locals'>;

interface FormCall extends Editing {
  readonly typed: Typed;
  readonly context: ActionContext;
}

const SEE_FIELDS = 'Nothing has been saved yet: see beside the fields.';
const TYPED_CHARACTERS_MOST = 2_000;

/** One form of the register: the role's check, the typing, the change, and what comes back. */
function registerForm(ability: Ability, act: (call: FormCall) => Promise<RegisterOutcome>) {
  return defineAction({
    accept: 'form',
    handler: async (form: FormData, context): Promise<RegisterOutcome> => {
      const typed = typedOf(form);
      const { person, site } = context.locals;
      if (person === undefined || requireAbility(context, ability) !== undefined)
        return refused(typed, person === undefined ? 401 : 403, {
          problem: person === undefined ? 'Sign in first.' : roleSentence(person, ability),
        });
      try {
        return await act({ typed, context, by: person, nowMs: site.now() });
      } catch (error) {
        return failed(typed, error);
      }
    },
  });
}

const addLine = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const { value, problems } = lineFromTyped(typed);
  const entry = judged(newLineSchema, { value: { ...value, key: (typed.key ?? '').trim() }, problems });
  if (!entry.ok) return refused(typed, 400, entry);
  return outcomeOf(call, await insertLine(context.locals.site.store, entry.value, call));
});

const changeLine = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const patch = judged(linePatchSchema, lineFromTyped(typed));
  if (!patch.ok) return refused(typed, 400, patch);
  return outcomeOf(
    call,
    await patchLine(context.locals.site.store, { key: typed.line ?? '', patch: patch.value }, call),
  );
});

const addTerminal = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const { value, problems } = terminalFromTyped(typed, await substationNames(context));
  const entry = judged(newTerminalSchema, { value: { ...value, key: (typed.key ?? '').trim() }, problems });
  if (!entry.ok) return refused(typed, 400, entry);
  return outcomeOf(
    call,
    await insertTerminal(context.locals.site.store, { key: typed.line ?? '', entry: entry.value }, call),
  );
});

const changeTerminal = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const patch = judged(terminalPatchSchema, terminalFromTyped(typed, await substationNames(context)));
  if (!patch.ok) return refused(typed, 400, patch);
  const change = { key: typed.line ?? '', terminalKey: typed.terminal ?? '', patch: patch.value };
  return outcomeOf(call, await patchTerminal(context.locals.site.store, change, call));
});

/** The button beside a terminal, which changes nothing else of it. */
const switchTerminal = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const change = {
    key: typed.line ?? '',
    terminalKey: typed.terminal ?? '',
    patch: { inService: typed.inService !== undefined },
  };
  return outcomeOf(call, await patchTerminal(context.locals.site.store, change, call));
});

const dropTerminal = registerForm('edit the register', async (call) => {
  const { typed, context } = call;
  const change = { key: typed.line ?? '', terminalKey: typed.terminal ?? '' };
  return outcomeOf(call, await removeTerminal(context.locals.site.store, change, call));
});

const recordSettings = registerForm('record settings', async (call) => {
  const { typed, context } = call;
  const { site } = context.locals;
  const line = await readRegisterLine(site.store, typed.line ?? '');
  const place = {
    timeZone: site.settings.SITE_TIME_ZONE,
    terminals: line?.terminals.map(({ key }) => key) ?? [],
    capacitanceNfPerKm: line?.capacitanceNfPerKm ?? null,
  };
  const version = judged(newSettingsVersionSchema, settingsFromTyped(typed, place));
  if (!version.ok) return refused(typed, 400, version);
  return outcomeOf(
    call,
    await insertSettingsVersion(site.store, { key: typed.line ?? '', version: version.value }, call),
  );
});

export const register = {
  importRegister,
  addLine,
  changeLine,
  addTerminal,
  changeTerminal,
  switchTerminal,
  dropTerminal,
  recordSettings,
};

/** An action's errors reach the page as a value, past the middleware that would have caught and logged them. */
function failed(typed: Typed, error: unknown): RegisterOutcome {
  if (databaseIsAway(error))
    return refused(typed, 503, {
      problem: 'Tareline cannot reach its database just now. Nothing has been saved.',
    });
  console.error('A form of the register failed:', error);
  return refused(typed, 500, {
    problem:
      'Something went wrong here and nothing has been saved. It has been logged; trying again may help.',
  });
}

function typedOf(form: FormData): Typed {
  const entries = [...form].flatMap(([name, value]) =>
    typeof value === 'string' ? [[name, value.slice(0, TYPED_CHARACTERS_MOST)] as const] : [],
  );
  return Object.fromEntries(entries);
}

type Judged<Value> =
  { ok: true; value: Value } | { ok: false; problem: string; byField: Record<string, string> };

function judged<Schema extends z.ZodType>(
  schema: Schema,
  { value, problems }: FromTyped,
): Judged<z.output<Schema>> {
  const parsed = parseSent(schema, value);
  if (parsed.ok && problems.length === 0) return parsed;
  const found = parsed.ok ? [] : parsed.problem.fields;
  return { ok: false, problem: SEE_FIELDS, byField: problemsByField(problems, found) };
}

function refused(
  typed: Typed,
  status: number,
  { problem, byField = {} }: { problem: string; byField?: Record<string, string> },
): RegisterOutcome {
  return { done: false, status, problem, byField, typed };
}

function outcomeOf({ typed }: FormCall, edit: RegisterEdit): RegisterOutcome {
  if (edit.ok) return { done: true, key: edit.line.key };
  const byField = problemsByField(edit.problem.fields);
  return refused(typed, refusalStatus(edit), { problem: sayOnce(edit.problem), byField });
}

/** A sentence that stands beside its field already need not stand above the form too. */
const sayOnce = ({ problem, fields }: Problem): string =>
  fields.some((field) => field.problem === problem) ? SEE_FIELDS : problem;

/** Names by key of the substations that the register knows. */
async function substationNames({ locals }: ActionContext): Promise<ReadonlyMap<string, string>> {
  const lines = await readRegister(locals.site.store);
  return new Map(
    lines.flatMap(({ terminals }) => terminals.map((one) => [one.substation, one.substationName] as const)),
  );
}

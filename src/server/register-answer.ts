import type { RegisterLine } from '../contract/register';
import type { RegisteredLine } from '../store/register';
import type { RefusalKind, RegisterEdit, RegisterRefusal } from '../store/register-change';
import { jsonAnswer, jsonProblem } from './problems';

const STATUS: Readonly<Record<RefusalKind, number>> = { unknown: 404, taken: 409, 'not allowed': 400 };

export const refusalStatus = ({ kind }: RegisterRefusal): number => STATUS[kind];

/** A line as the API gives it: without the database's own ids. */
export function lineOnWire({ id: _id, terminalIds: _terminalIds, ...line }: RegisteredLine): RegisterLine {
  return line;
}

/** The answer to a change of the register: the line as it now stands, or why it does not. */
export function editAnswer(edit: RegisterEdit, status = 200): Response {
  return edit.ok ? jsonAnswer(lineOnWire(edit.line), status) : jsonProblem(refusalStatus(edit), edit.problem);
}

export const unknownLine = (key: string): Response =>
  jsonProblem(404, `The register has no line with the key "${key}".`);

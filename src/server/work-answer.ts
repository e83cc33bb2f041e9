import type { WorkRefusal } from '../store/works';
import { jsonProblem } from './problems';

const STATUS: Readonly<Record<WorkRefusal['kind'], number>> = { unknown: 404, 'not allowed': 400 };

/** Why work could not be recorded, beside the field that it is about. */
export const workRefusal = ({ kind, field, problem }: WorkRefusal): Response =>
  jsonProblem(STATUS[kind], { problem, fields: [{ field, problem }] });

import { z } from 'zod';

export const ROLES = ['operator', 'engineer', 'planner', 'admin'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

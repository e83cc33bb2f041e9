import { z } from 'zod';
import { keySchema } from './key';
import { perPhaseSchema } from './phase';

/** The longest period whose raw rows one answer is made of. */
export const REVIEW_DAYS_MOST = 31;
const DAY_MS = 86_400_000;

const instant = z.iso.datetime({
  offset: true,
  error: 'Give an instant with its offset, such as 2026-03-01T10:00:00Z.',
});
const spanMs = ({ from, to }: { from: string; to: string }): number => Date.parse(to) - Date.parse(from);

export const reviewWindowSchema = z
  .object({ from: instant, to: instant })
  .refine((asked) => spanMs(asked) > 0, { message: 'The period begins before it ends.', path: ['to'] })
  .refine((asked) => !(spanMs(asked) > REVIEW_DAYS_MOST * DAY_MS), {
    message: `A review covers at most ${REVIEW_DAYS_MOST} days.`,
    path: ['from'],
  });

/**
 * What a cell of the cloud is counted over:
 * `restraint`: x restraint, y differential current, amperes;
 * `alpha-plane`: x natural logarithm of |k|, y arg k less 180°, degrees from −180 to 180;
 * `phase-comparison`: x the smaller of both ends' currents, amperes, y deviation from opposition, degrees.
 */
export const planeKindSchema = z.enum(['restraint', 'alpha-plane', 'phase-comparison']);
export type PlaneKind = z.infer<typeof planeKindSchema>;

const axisSchema = z.object({ least: z.number(), step: z.number().positive() });
const count = z.int().nonnegative();

/** GET /api/lines/<key>/review: where the qualified snapshots of a period lie, as counts over a grid. */
export const reviewCloudSchema = z.object({
  line: keySchema,
  from: z.iso.datetime(),
  to: z.iso.datetime(),
  /** version whose conventions the points are formed by; null when none is in force */
  settingsVersion: z.int().nullable(),
  plane: planeKindSchema.nullable(),
  /** why there are no points; null when there are */
  reason: z.string().nullable(),
  snapshotCount: count,
  qualifiedCount: count,
  /** qualified, but judged under another convention and so left out */
  otherConventionCount: count,
  /** each of so many qualified snapshots was counted: 1 for all */
  everyNth: z.int().positive(),
  countedCount: count,
  x: axisSchema.nullable(),
  y: axisSchema.nullable(),
  /** [column, row, snapshots] of each cell that holds any */
  cells: perPhaseSchema(z.array(z.tuple([count, count, count]))),
});
export type ReviewCloud = z.infer<typeof reviewCloudSchema>;

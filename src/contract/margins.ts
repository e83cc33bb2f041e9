import { z } from 'zod';
import { keySchema } from './key';
import { MARGIN_PLACE, parseMarginPlace } from './margin-place';
import { phaseNameSchema } from './phase';
import { marginSortSchema, type MarginSort } from './standing';

/** Rows of one page of GET /api/margins. */
export const MARGINS_A_PAGE = 50;

/** What the drift of a standing level is filtered by: a significant one, one within margin, or none. */
export const CREEP_FILTERS = ['creep', 'within margin', 'none'] as const;
export type CreepFilter = (typeof CREEP_FILTERS)[number];

export const marginFilterSchema = z.object({
  /** words that all stand in the line's name, its key or the names of its substations */
  text: z.string().trim().max(80, 'Search for at most 80 characters.').default(''),
  substation: keySchema.optional(),
  voltage: z.coerce.number('The voltage is a number.').positive('The voltage is above 0.').optional(),
  creep: z.enum(CREEP_FILTERS).optional(),
  owner: z
    .string()
    .trim()
    .min(1, 'Give the owner’s name.')
    .max(80, 'An owner’s name has at most 80 characters.')
    .optional(),
});
export type MarginFilter = z.infer<typeof marginFilterSchema>;

/** Figures are looked at from the largest down; names and dates from the first on. */
export const isUsuallyDescending = (sort: MarginSort): boolean =>
  sort !== 'lineName' && sort !== 'owner' && sort !== 'nearLikely';

const NOT_A_PLACE = 'This is not where a page of this order ends. Give what the page before said in “next”.';

/** The query of GET /api/margins; without `descending` each column goes its usual way, without `after` from the top. */
export const marginQuerySchema = marginFilterSchema
  .extend({
    sort: marginSortSchema.default('shareOfPickup'),
    descending: z.enum(['true', 'false']).optional(),
    after: z.string().max(200, NOT_A_PLACE).regex(MARGIN_PLACE, NOT_A_PLACE).optional(),
  })
  .transform(({ descending, after, ...query }, context) => {
    const place = after === undefined ? undefined : parseMarginPlace(after, query.sort);
    if (after !== undefined && place === undefined)
      context.addIssue({ code: 'custom', path: ['after'], message: NOT_A_PLACE });
    return {
      ...query,
      descending: descending === undefined ? isUsuallyDescending(query.sort) : descending === 'true',
      ...(place === undefined ? {} : { after: place }),
    };
  });
export type MarginQuery = z.infer<typeof marginQuerySchema>;

/** GET /api/margins/scatter: every phase whose causes are separated, as shares of its pickup. */
export const marginScatterSchema = z.object({
  at: z.iso.datetime(),
  nearRatio: z.number(),
  lines: z.array(z.tuple([keySchema, z.string()])),
  /** place in `lines`, phase, charging share, mismatch share, share of the standing level where it is known */
  points: z.array(z.tuple([z.int(), phaseNameSchema, z.number(), z.number(), z.number().nullable()])),
});
export type MarginScatter = z.infer<typeof marginScatterSchema>;

export interface FleetChoices {
  readonly substations: readonly { readonly key: string; readonly name: string }[];
  readonly voltagesKv: readonly number[];
  readonly owners: readonly string[];
}

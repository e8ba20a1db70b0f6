import { z } from 'zod';
import { ImpactView, OUTCOMES } from '@/features/impact/impact';
import { askImpact, readImpact } from '@/features/impact/impact.server';
import { endpoint } from '@/http/endpoint';
import { revisionKey } from '@/http/library';
import { listQuery, readCursor, writeCursor } from '@/http/list';

const query = z.strictObject({ ...listQuery, outcome: z.enum(OUTCOMES).optional() });
type Query = z.output<typeof query>;

const pageOf = ({ limit, cursor, outcome }: Query) => ({
  limit,
  outcome,
  from: cursor === undefined ? 0 : readCursor(cursor, z.int().min(0)),
});

const written = <T extends { readonly next: number | null }>({ next, ...found }: T) => ({
  ...found,
  next: next === null ? null : writeCursor(next),
});

export const GET = endpoint(
  {
    summary: 'What a revision would change in the members that pin the issued one',
    description:
      'The newest run of it, worst first: members without a result any more, then those whose checks flip, then by the largest change. Members in jobs that are not open to the reader are counted, or said without their figures.',
    query,
    answer: ImpactView,
  },
  async ({ params }, { user, query: asked }) =>
    written(await readImpact(user, revisionKey(params), pageOf(asked))),
);

export const POST = endpoint(
  {
    summary: 'Ask what a revision would change',
    description:
      'The worker evaluates every member that pins the issued revision with this one in its place: a template, criteria, or an edition of a section table. One that is under way or done is answered as it is.',
    query,
    answer: ImpactView,
    status: 202,
  },
  async ({ params }, { user, query: asked }) =>
    written(await askImpact(user, revisionKey(params), pageOf(asked))),
);

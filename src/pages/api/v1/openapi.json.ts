import { z } from 'zod';
import { openEndpoint } from '@/http/endpoint';
import { describeApi } from '@/http/openapi';
import { allRoutes } from '@/http/registry';

export const GET = openEndpoint(
  { summary: 'This description', answer: z.looseObject({ openapi: z.literal('3.1.0') }) },
  async ({ locals }) => describeApi(await allRoutes(), locals.origin),
);

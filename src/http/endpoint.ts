import type { APIContext, APIRoute } from 'astro';
import type { z } from 'zod';
import type { User } from '@/features/account/account';
import { readJson } from './body';
import { requireUser } from './guard';
import { readQuery } from './list';
import { toAppError, toProblem } from './problem';

/** What an endpoint is, for its wrapper and for /api/v1/openapi.json. */
export interface Operation<B extends z.ZodType = z.ZodType, Q extends z.ZodType = z.ZodType> {
  readonly summary: string;
  readonly description?: string;
  /** Read from the body before the handler runs. Without it the handler reads the body, or there is none. */
  readonly body?: B;
  /** The media types of the one part, `file`, of the form that the handler takes. */
  readonly file?: string;
  readonly query?: Q;
  /** What it answers with; described, not enforced. */
  readonly answer?: z.ZodType;
  readonly status?: 200 | 201 | 202 | 204;
}

interface Given<B extends z.ZodType, Q extends z.ZodType> {
  readonly body: z.output<B>;
  readonly query: z.output<Q>;
}

type Handler<G> = (context: APIContext, given: G) => unknown;

/** An endpoint's route with its description. `open` needs no sign-in. */
export type Endpoint = APIRoute & { readonly operation: Operation; readonly open: boolean };

/**
 * Who, act, answer. The person is known (401), query and body are read by their schemas (400, 413, 415, 422), the
 * handler acts, and what it returns is answered: a Response as it is, nothing as 204, the rest as JSON.
 */
export function endpoint<B extends z.ZodType, Q extends z.ZodType>(
  operation: Operation<B, Q>,
  handler: Handler<Given<B, Q> & { readonly user: User }>,
): Endpoint {
  return route(operation, false, async (context) => {
    const user = requireUser(context);
    return handler(context, { user, ...(await given(operation, context)) });
  });
}

/** The same for what anybody may ask. */
export function openEndpoint<B extends z.ZodType, Q extends z.ZodType>(
  operation: Operation<B, Q>,
  handler: Handler<Given<B, Q>>,
): Endpoint {
  return route(operation, true, async (context) => handler(context, await given(operation, context)));
}

async function given<B extends z.ZodType, Q extends z.ZodType>(
  { query, body }: Operation<B, Q>,
  context: APIContext,
): Promise<Given<B, Q>> {
  const read = {
    query: query && readQuery(context.url, query),
    body: body && (await readJson(context, body)),
  };
  // A schema that is left out is never inferred as anything but unknown, which undefined is.
  return read as Given<B, Q>;
}

function route(
  operation: Operation,
  open: boolean,
  act: (context: APIContext) => Promise<unknown>,
): Endpoint {
  const run: APIRoute = async (context) => {
    try {
      return toResponse(await act(context), operation.status);
    } catch (error) {
      return toProblem(toAppError(error, `${context.request.method} ${context.routePattern}`));
    }
  };
  return Object.assign(run, { operation, open });
}

function toResponse(result: unknown, status: number | undefined): Response {
  if (result instanceof Response) return result;
  return result === undefined
    ? new Response(null, { status: status ?? 204, headers: UNSTORED })
    : answer(result, { status });
}

const UNSTORED = { 'Cache-Control': 'no-store' };

interface AnswerInit {
  readonly status?: number | undefined;
  readonly headers?: Readonly<Record<string, string>>;
}

/** JSON with a status or headers of its own: 201 with a Location, an ETag. */
export const answer = (value: unknown, { status = 200, headers = {} }: AnswerInit = {}): Response =>
  new Response(JSON.stringify(value), {
    status,
    headers: { ...UNSTORED, 'Content-Type': 'application/json; charset=utf-8', ...headers },
  });

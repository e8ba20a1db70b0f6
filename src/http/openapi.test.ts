import { expect, test } from 'vitest';
import { z } from 'zod';
import { endpoint, openEndpoint } from './endpoint';
import { listOf, listQuery } from './list';
import { describeApi } from './openapi';
import type { Route } from './registry';

interface Part {
  parts: Part[];
}
const Part: z.ZodType<Part> = z.strictObject({ parts: z.lazy(() => z.array(Part)) });
const Job = z.strictObject({ number: z.string() });

const routes: Route[] = [
  {
    pattern: '/api/v1/jobs/[number]/members/[mark]',
    endpoints: new Map([['PUT', endpoint({ summary: 'Save a member', body: Part }, () => undefined)]]),
  },
  {
    pattern: '/api/v1/jobs',
    endpoints: new Map([
      [
        'GET',
        openEndpoint(
          { summary: 'Jobs', query: z.strictObject(listQuery), answer: listOf(Job) },
          () => undefined,
        ),
      ],
      ['POST', endpoint({ summary: 'Create a job', body: Job, answer: Job, status: 201 }, () => undefined)],
    ]),
  },
];

const document = describeApi(routes, 'https://putlog.quillmere.example');

test('every method of every route is described with its schemas', () => {
  expect(document).toMatchObject({
    openapi: '3.1.0',
    paths: {
      '/api/v1/jobs': {
        get: {
          operationId: 'get-jobs',
          security: [],
          parameters: [
            { name: 'limit', in: 'query', required: false, schema: { default: 50 } },
            { name: 'cursor', in: 'query', required: false },
          ],
          responses: { 200: {}, default: { $ref: '#/components/responses/Problem' } },
        },
        post: {
          requestBody: {
            content: {
              'application/json': { schema: { required: ['number'], additionalProperties: false } },
            },
          },
          responses: { 201: { description: 'Created' } },
        },
      },
      '/api/v1/jobs/{number}/members/{mark}': {
        put: {
          operationId: 'put-jobs-number-members-mark',
          parameters: [
            { name: 'number', in: 'path', required: true },
            { name: 'mark', in: 'path', required: true },
          ],
          responses: { 204: {} },
        },
      },
    },
  });
});

test('a schema that refers to itself is the root of its own references', () => {
  expect(JSON.stringify(document)).toContain('"$id":"urn:putlog:schema:put-jobs-number-members-mark-body"');
});

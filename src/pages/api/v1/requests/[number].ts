import { AnswerRequest, RequestView } from '@/features/review/request';
import { answerRequest, readRequest } from '@/features/review/request.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { numberParam } from '@/http/params';

export const GET = endpoint({ summary: 'One request', answer: RequestView }, async ({ params }, { user }) => {
  const found = await readRequest(user, numberParam(params, 'number', 'This request'));
  return answer(found, { headers: { ETag: etag(found.version) } });
});

export const PUT = endpoint(
  {
    summary: 'Answer a request, or move it on',
    description:
      'By a librarian; whoever raised it is told. Needs If-Match with the ETag that was read: 428 without; 412 when stale.',
    body: AnswerRequest,
    answer: RequestView,
  },
  async (context, { user, body }) => {
    const number = numberParam(context.params, 'number', 'This request');
    const saved = await answerRequest(user, number, ifMatch(context), body);
    return answer(saved, { headers: { ETag: etag(saved.version) } });
  },
);

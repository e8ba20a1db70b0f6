import { openStream } from '@/features/notice/stream.server';
import { endpoint } from '@/http/endpoint';

const HEADERS = {
  'Content-Type': 'text/event-stream; charset=utf-8',
  // Neither kept nor compressed nor collected by what stands between: each message counts at once.
  'Cache-Control': 'no-store, no-transform',
  'X-Accel-Buffering': 'no',
};

export const GET = endpoint(
  {
    summary: 'What happens, as server-sent events',
    description:
      'Of type text/event-stream. `unread` {"unread": 3}: the number of unread notices, at the start and at every change. `progress` {"id": …}: a run has come further; read it at its address. The stream ends with the session or token.',
    status: 200,
  },
  async ({ request }, { user }) =>
    new Response(request.method === 'HEAD' ? null : await openStream(user), { headers: HEADERS }),
);

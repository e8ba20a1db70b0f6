import { readiness } from '@/features/admin/readiness.server';
import { answer, openEndpoint } from '@/http/endpoint';

export const GET = openEndpoint({ summary: 'Whether the process can serve' }, async () => {
  const state = await readiness();
  return answer(state, { status: state.ready ? 200 : 503 });
});

import { isReady, readiness } from '@/features/admin/health.server';
import { answer, openEndpoint } from '@/http/endpoint';
import { log } from '@/lib/log';

export const GET = openEndpoint({ summary: 'Whether the process can serve' }, async () => {
  const state = await readiness();
  const ready = isReady(state);
  if (!ready) log.error('not ready', { ...state });
  // Open to anybody: the host that the driver names stays in the log.
  const database = state.database && 'does not answer';
  const store = state.store && 'does not answer';
  return answer({ ready, ...state, database, store }, { status: ready ? 200 : 503 });
});

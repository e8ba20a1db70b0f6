import { answer, openEndpoint } from '@/http/endpoint';

export const GET = openEndpoint({ summary: 'Whether the process runs' }, () => answer({ status: 'ok' }));

import { openEndpoint } from '@/http/endpoint';
import { notFound } from '@/lib/app-error';

export const ALL = openEndpoint({ summary: 'Whatever has no address of its own' }, ({ url }) => {
  throw notFound(`The address ${url.pathname}`);
});

import { changeStockLine, removeStockLine } from '@/features/stock/lines.server';
import { Holding, StockLine } from '@/features/stock/stock';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { idParam } from '@/http/params';

export const PATCH = endpoint(
  {
    summary: 'Changes what a supplier holds of one section',
    description: 'The body is all that is said of it. If-Match and ETag are those of the list.',
    body: Holding,
    answer: StockLine,
  },
  async (context, { user, body }) => {
    const change = { id: idParam(context.params, 'id', 'This stock line'), held: body };
    const supplier = context.params['supplier'] ?? '';
    const { line, list } = await changeStockLine(user, supplier, ifMatch(context), change);
    return answer(line, { headers: { ETag: etag(list.version) } });
  },
);

export const DELETE = endpoint(
  { summary: 'Takes one line out of a stock list', status: 204 },
  async (context, { user }) => {
    const id = idParam(context.params, 'id', 'This stock line');
    const list = await removeStockLine(user, context.params['supplier'] ?? '', ifMatch(context), id);
    return new Response(null, {
      status: 204,
      headers: { ETag: etag(list.version), 'Cache-Control': 'no-store' },
    });
  },
);

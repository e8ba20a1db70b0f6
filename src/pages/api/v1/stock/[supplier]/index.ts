import { changeStockList, readStockList, removeStockList } from '@/features/stock/list.server';
import { StockListChange, StockListView } from '@/features/stock/stock';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';

export const GET = endpoint(
  { summary: 'One supplier’s stock list, without its lines', answer: StockListView },
  async ({ params: { supplier = '' } }, { user }) => {
    const view = await readStockList(user, supplier);
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);

export const PATCH = endpoint(
  {
    summary: 'Changes a stock list’s supplier, day or note',
    body: StockListChange,
    answer: StockListView,
  },
  async (context, { user, body }) => {
    const view = await changeStockList(user, context.params['supplier'] ?? '', ifMatch(context), body);
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);

export const DELETE = endpoint(
  { summary: 'Removes a stock list with its lines', status: 204 },
  async (context, { user }) => removeStockList(user, context.params['supplier'] ?? '', ifMatch(context)),
);

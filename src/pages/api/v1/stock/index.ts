import { createStockList, listStock } from '@/features/stock/list.server';
import { NewStockList, StockListView } from '@/features/stock/stock';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, wholeList } from '@/http/list';
import { paths } from '@/paths';

export const GET = endpoint(
  { summary: 'The stock lists of the practice’s suppliers', answer: listOf(StockListView) },
  async (_, { user }) => wholeList(await listStock(user)),
);

export const POST = endpoint(
  {
    summary: 'Begins the stock list of a supplier',
    description: 'It is empty; its lines come as a CSV, or one by one.',
    body: NewStockList,
    answer: StockListView,
    status: 201,
  },
  async (_, { user, body }) => {
    const view = await createStockList(user, body);
    const headers = { Location: paths.api.stockList(view.slug), ETag: etag(view.version) };
    return answer(view, { status: 201, headers });
  },
);

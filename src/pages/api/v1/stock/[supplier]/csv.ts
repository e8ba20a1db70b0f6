import { exportStock } from '@/features/stock/lines.server';
import { endpoint } from '@/http/endpoint';

export const GET = endpoint(
  { summary: 'A stock list’s lines as a CSV that can be loaded again' },
  async ({ params: { supplier = '' } }, { user }) =>
    new Response(await exportStock(user, supplier), {
      headers: {
        'Content-Type': 'text/csv; charset=utf-8',
        'Content-Disposition': `attachment; filename="stock-${supplier}.csv"`,
        'Cache-Control': 'no-store',
      },
    }),
);

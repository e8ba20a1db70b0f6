import type { User } from '@/features/account/account';
import { attempt, type Outcome, textOf } from '@/features/desk/form';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import { createStockList } from './list.server';
import { NewStockList } from './stock';

/** The form that begins the list of a supplier. */
export const takeNewStockList = (user: User, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const fields = ['supplier', 'as_of', 'note'].map((name) => [name, textOf(form, name)]);
    const reading = read(NewStockList, Object.fromEntries(fields));
    if (!reading.ok) throw invalid(reading.faults);
    const { slug } = await createStockList(user, reading.value);
    return paths.stockList(slug);
  });

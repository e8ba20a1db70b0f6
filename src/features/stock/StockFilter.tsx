import { paths } from '@/paths';
import { isOld, type Supplier } from './stock';
import { ANYBODY, ageWords, stockChoices, stockQuery } from './words';

/** Whose stock is asked for, as it stands in an address. */
interface StockAsked {
  /** '1' for anybody's. */
  readonly stock: string;
  /** The address of a stock list. */
  readonly supplier: string;
}

interface StockFilterProps extends StockAsked {
  readonly suppliers: readonly Supplier[];
  readonly today: string;
  readonly onChange: (asked: StockAsked) => void;
}

/** Only what is in stock, with anybody or with one supplier; nothing where the practice keeps no stock list. */
export function StockFilter({ stock, supplier, suppliers, today, onChange }: StockFilterProps) {
  if (suppliers.length === 0) return null;
  const chosen = suppliers.filter(({ slug }) => (supplier === '' ? stock !== '' : slug === supplier));
  const old = chosen.filter(({ asOf }) => isOld(asOf, today));
  return (
    <div className="text-schedule">
      <div className="flex items-center gap-10">
        <select
          aria-label="Stock"
          className="input min-w-0 flex-1 text-schedule!"
          value={supplier || (stock === '' ? '' : ANYBODY)}
          onChange={({ target }) => onChange({ stock: '', supplier: '', ...stockQuery(target.value) })}
        >
          {stockChoices(suppliers, today).map(({ value, label }) => (
            <option key={value} value={value}>
              {label}
            </option>
          ))}
          {supplier !== '' && chosen.length === 0 && <option value={supplier}>Unknown supplier</option>}
        </select>
        <a className="link" href={paths.stock} aria-label="Stock lists">
          Lists
        </a>
      </div>
      {old.length > 0 && (
        <p role="status" className="mt-4 font-semibold text-ochre-ink">
          {old.map(({ name, asOf }) => `${name}: ${ageWords(asOf, today)}`).join('; ')}
        </p>
      )}
    </div>
  );
}

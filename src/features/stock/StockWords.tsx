import type { UnitSystemName } from '@/engine/quantity';
import { isOld, type SectionStock, type Supplier } from './stock';
import { ageWords, heldWords, lengthsWords, namedStock } from './words';

interface StockWordsProps {
  readonly item: { readonly stock?: readonly SectionStock[] | undefined };
  readonly suppliers: readonly Supplier[];
  readonly today: string;
  readonly system: UnitSystemName;
  /** What it is wanted for, in m; null where that is not known. */
  readonly lengthM: number | null;
}

/** A line for each supplier of a section: how soon, at what price, in which lengths, and what stands against it. */
export function StockWords({ item, suppliers, today, system, lengthM }: StockWordsProps) {
  return namedStock(item.stock ?? [], suppliers).map(({ supplier, held }) => {
    const against = [
      ...(isTooShort(held, lengthM)
        ? [`shorter than the member, ${lengthsWords([lengthM ?? 0], system)}`]
        : []),
      ...(isOld(supplier.asOf, today) ? [`list ${ageWords(supplier.asOf, today)}`] : []),
    ];
    return (
      <span
        key={supplier.slug}
        className="block text-note leading-16 font-normal whitespace-normal text-ink-2"
      >
        {supplier.name}: {heldWords(held, system) || 'in stock'}
        {against.length > 0 && <b className="font-semibold text-ochre-ink"> · {against.join(' · ')}</b>}
      </span>
    );
  });
}

/** None of the lengths that are said reaches. */
const isTooShort = ({ lengths_m }: SectionStock, lengthM: number | null): boolean =>
  lengthM !== null && lengths_m.length > 0 && Math.max(...lengths_m) < lengthM;

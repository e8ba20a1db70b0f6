import { formatFor, formatNumber, type UnitSystemName } from '@/engine/quantity';
import { dayWords } from '@/features/desk/words';
import { daysBetween, type Holding, isOld, OLD_AFTER_DAYS, type SectionStock, type Supplier } from './stock';

/** How old a list is: "today", "1 day old", "12 days old". */
export function ageWords(asOf: string, today: string): string {
  const days = daysBetween(asOf, today);
  if (days <= 0) return 'today';
  return days === 1 ? '1 day old' : `${days} days old`;
}

/** "19 Nov 2026, 12 days old". */
export const asOfWords = (asOf: string, today: string): string =>
  `${dayWords(asOf)}, ${ageWords(asOf, today)}`;

export const OLD_WORDS = `More than ${OLD_AFTER_DAYS} days old: ask the supplier before you rely on it.`;

/** "6, 12.1 m", in feet and inches for who reads them; a dash where nothing is said. */
export function lengthsWords(lengths: readonly number[], system: UnitSystemName): string {
  if (lengths.length === 0) return '–';
  if (system === 'us') return lengths.map((one) => formatFor(one, 'length', system)).join(', ');
  return `${lengths.map((one) => formatNumber(one)).join(', ')}\u00a0m`;
}

export function leadWords(days: number | null): string {
  if (days === null) return '–';
  if (days === 0) return 'off the shelf';
  return days === 1 ? '1 day' : `${days} days`;
}

/** What a supplier holds of a section in one line: "off the shelf, band B, 6, 12 m". */
export function heldWords(
  { lead_time_days, price_band, lengths_m }: Omit<Holding, 'note'>,
  system: UnitSystemName,
): string {
  const words = [
    ...(lead_time_days === null ? [] : [leadWords(lead_time_days)]),
    ...(price_band === null ? [] : [`band ${price_band}`]),
    ...(lengths_m.length === 0 ? [] : [lengthsWords(lengths_m, system)]),
  ];
  return words.join(' · ');
}

/** A choice of stock: '' any section, '*' what anybody holds, else the address of a stock list. */
export const ANYBODY = '*';

export const stockChoices = (suppliers: readonly Supplier[], today: string) => [
  { value: '', label: 'Stocked or not' },
  { value: ANYBODY, label: 'In stock' },
  ...suppliers.map(({ slug, name, asOf }) => ({
    value: slug,
    label: `In stock: ${name}${isOld(asOf, today) ? ` (${ageWords(asOf, today)})` : ''}`,
  })),
];

/** The fields of the section list's query for such a choice. */
export function stockQuery(choice: string): { stock?: string; supplier?: string } {
  if (choice === '') return {};
  return choice === ANYBODY ? { stock: '1' } : { supplier: choice };
}

/** Each supplier of a section by its name, with what it holds. */
export const namedStock = (
  stock: readonly SectionStock[],
  suppliers: readonly Supplier[],
): { readonly supplier: Supplier; readonly held: SectionStock }[] =>
  stock.flatMap((held) => {
    const supplier = suppliers.find(({ slug }) => slug === held.supplier);
    return supplier ? [{ supplier, held }] : [];
  });

/** Of a section that none of so many stock lists has. */
export const notHeldWords = (lists: number): string =>
  lists === 1 ? 'The one stock list does not have it.' : `None of the ${lists} stock lists has it.`;

/** What goes with a list of so many lines that is removed. */
export function goneWords(lines: number): string {
  if (lines === 0) return 'It has no lines.';
  return lines === 1 ? 'Its one line goes with it.' : `Its ${lines} lines go with it.`;
}

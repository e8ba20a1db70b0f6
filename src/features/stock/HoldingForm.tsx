import { type ReactNode, type SyntheticEvent, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { ChoiceField, Field } from '@/components/ui/Field';
import { BY_HAND, readHolding } from './cells';
import { type Refused, saidAt, saidElsewhere } from './refused';
import { type Holding, PRICE_BANDS } from './stock';

const BANDS = [{ value: '', label: 'Not said' }, ...PRICE_BANDS.map((value) => ({ value, label: value }))];

interface HoldingFormProps {
  readonly title: string;
  readonly takesFocus?: boolean;
  readonly held: Holding;
  /** Fields of the section itself, which say what is wrong with these. */
  readonly children?: ReactNode;
  readonly saysAt?: readonly string[];
  /** What is wrong; null when it is kept. */
  readonly onKeep: (held: Holding) => Promise<Refused | null>;
  readonly onClose: () => void;
}

const textsOf = ({ lengths_m, lead_time_days, price_band, note }: Holding) => ({
  lengths: lengths_m.join('; '),
  lead_time: lead_time_days === null ? '' : String(lead_time_days),
  price_band: price_band ?? '',
  note,
});
type HeldTexts = ReturnType<typeof textsOf>;

const POINTERS: Readonly<Record<keyof HeldTexts, string>> = {
  lengths: '/lengths_m',
  lead_time: '/lead_time_days',
  price_band: '/price_band',
  note: '/note',
};

/** What a supplier holds, as typed; read as a cell of a list is. */
export function HoldingForm({ title, takesFocus = false, held, onKeep, onClose, ...own }: HoldingFormProps) {
  const { children, saysAt = [] } = own;
  const [texts, setTexts] = useState<HeldTexts>(() => textsOf(held));
  const [refused, setRefused] = useState<Refused | null>(null);
  const [isBusy, setBusy] = useState(false);
  const read = readHolding({ designation: title, table: '', ...texts }, BY_HAND);
  const error = (name: keyof HeldTexts) =>
    'lengths_m' in read ? saidAt(refused, POINTERS[name]) : read.find(({ field }) => field === name)?.message;
  const field = (name: keyof HeldTexts) => ({
    value: texts[name],
    error: error(name),
    autoComplete: 'off',
    onChange: ({ target }: { target: { value: string } }) => {
      setTexts({ ...texts, [name]: target.value });
      setRefused(null);
    },
  });
  async function keep(event: SyntheticEvent) {
    event.preventDefault();
    if (!('lengths_m' in read) || isBusy) return;
    setBusy(true);
    const answered = await onKeep(read);
    setBusy(false);
    setRefused(answered);
    if (answered === null) onClose();
  }
  const problem = saidElsewhere(refused, [...saysAt, ...Object.values(POINTERS)]);
  return (
    <form
      onSubmit={keep}
      onKeyDown={({ key }) => key === 'Escape' && onClose()}
      aria-label={title}
      className="grid w-full gap-10 py-6 text-left"
    >
      {children}
      <p className="font-semibold">{title}</p>
      <div className="grid grid-cols-[minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)_minmax(0,2fr)] gap-14 max-md:grid-cols-2">
        <Field label="Stock lengths, m" placeholder="6; 12" autoFocus={takesFocus} {...field('lengths')} />
        <Field label="Lead time, days" inputMode="numeric" {...field('lead_time')} />
        <ChoiceField label="Price band" choices={BANDS} {...field('price_band')} />
        <Field label="Note" maxLength={200} {...field('note')} />
      </div>
      {problem && (
        <p role="alert" className="font-semibold text-error">
          {problem}
        </p>
      )}
      <p className="flex gap-10">
        <Button type="submit" size="small">
          {isBusy ? 'Saving' : 'Save the line'}
        </Button>
        <Button size="small" tone="text" onClick={onClose}>
          Leave it
        </Button>
      </p>
    </form>
  );
}

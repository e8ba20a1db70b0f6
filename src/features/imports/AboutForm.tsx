import { ChoiceField, Field, TextField } from '@/components/ui/Field';
import type { Fault } from '@/lib/app-error';
import type { About, TableChoice } from './imports';
import { ABOUT_LABELS } from './words';

export type Draft = Record<keyof About, string>;

interface AboutFormProps {
  readonly about: Draft;
  readonly tables: readonly TableChoice[];
  /** A number that is free for a new table. */
  readonly free: string;
  readonly faults: readonly Fault[];
  readonly isFixed: boolean;
  readonly onAbout: (about: Draft) => void;
}

/** "European rolled" as part of an address: "european-rolled". */
const slugOf = (name: string): string =>
  name
    .normalize('NFKD')
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replaceAll(/^[^a-z]+|-+$/g, '')
    .slice(0, 80);

/** Which table the file is, and where its values are from: no edition is without it. */
export function AboutForm({ about, tables, free, faults, isFixed, onAbout }: AboutFormProps) {
  const known = tables.find(({ slug }) => slug === about.table);
  const set = (key: keyof About) => ({
    name: key,
    label: ABOUT_LABELS[key],
    value: about[key],
    disabled: isFixed,
    error: faults.find(({ pointer }) => pointer === `/about/${key}`)?.message,
    onChange: ({ target }: { target: { value: string } }) => onAbout({ ...about, [key]: target.value }),
  });
  const choices = [
    { value: '', label: 'A new table' },
    ...tables.map(({ slug, name, reference }) => ({ value: slug, label: `${reference} ${name}` })),
  ];
  return (
    <div className="grid gap-x-20 gap-y-10 md:grid-cols-2">
      <ChoiceField
        label="The next edition of"
        choices={choices}
        value={known?.slug ?? ''}
        disabled={isFixed}
        onChange={({ target }) => {
          const chosen = tables.find(({ slug }) => slug === target.value);
          onAbout({
            ...about,
            table: chosen?.slug ?? '',
            name: chosen?.name ?? '',
            reference: chosen?.reference ?? free,
          });
        }}
      />
      {known ? (
        <p className="self-end pb-6 text-ink-2">
          Members keep the edition that they have until somebody upgrades them.
        </p>
      ) : (
        <div className="grid grid-cols-[minmax(0,1fr)_96px] gap-10">
          <Field
            {...set('name')}
            error={set('name').error ?? (set('table').error && 'Give it a name with Latin letters.')}
            onChange={({ target }) => onAbout({ ...about, name: target.value, table: slugOf(target.value) })}
          />
          <Field {...set('reference')} />
        </div>
      )}
      <Field {...set('supplier')} help="The columns are remembered under this name." />
      <Field {...set('standard')} placeholder="EN 10365:2017" />
      <Field {...set('source')} placeholder="Catalogue, issue 7" />
      <Field {...set('catalogue_date')} type="date" />
      <TextField {...set('licence')} rows={2} help="On which terms the values may be kept and shown." />
      <TextField {...set('notes')} rows={2} help="Empty, or one to a line." />
    </div>
  );
}

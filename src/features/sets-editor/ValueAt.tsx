import { type ReactNode, useState } from 'react';
import { Field } from '@/components/ui/Field';
import { type Pointer, parentOf } from '@/features/author/edit';
import { useReadOnly } from '@/features/author/fields';
import { sameValue } from '@/features/author/merge';
import { useAt, useDraft, useFaultAt } from '@/features/author/use-editor';
import { type Column, cellEdit, cellText, cellValue } from './cells';

type Kind = Column extends infer C ? (C extends Column ? Omit<C, 'key' | 'label'> : never) : never;

interface ValueAtProps {
  readonly at: Pointer;
  readonly label: ReactNode;
  readonly help?: ReactNode;
  readonly as: Kind;
}

/** One value of a set outside its tables, read and shown as a cell of them is. */
export function ValueAt({ at, label, help, as }: ValueAtProps) {
  const store = useDraft();
  const value = useAt(at);
  const fault = useFaultAt(at);
  const [typed, setTyped] = useState('');
  const [isLeft, setLeft] = useState(false);
  const row = parentOf(at);
  const column: Column = { ...as, key: at.slice(row.length + 1), label: '' };
  const shown = sameValue(cellValue(typed, column), value) ? typed : cellText(value, column);
  return (
    <Field
      data-at={at}
      label={label}
      help={help}
      error={shown === '' && !isLeft ? undefined : fault}
      autoComplete="off"
      spellCheck={false}
      readOnly={useReadOnly()}
      value={shown}
      onBlur={() => {
        setTyped(cellText(value, column));
        setLeft(true);
      }}
      onChange={({ target }) => {
        setTyped(target.value);
        store.edit(cellEdit(row, target.value, column));
      }}
    />
  );
}

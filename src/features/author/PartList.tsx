import type { ReactNode } from 'react';
import type { Pointer } from './edit';
import { Part, Parts } from './Part';
import { useFaultAt, useListAt } from './use-editor';

interface ListProps {
  readonly list: Pointer;
  readonly label: string;
  readonly empty: string;
  readonly name: string;
  readonly title: (one: unknown, index: number) => ReactNode;
  readonly line: (one: unknown) => string;
  readonly add: ReactNode;
  readonly fields: (at: Pointer) => ReactNode;
  /** The only list of its zone, whose heading says it. */
  readonly isAlone?: boolean;
}

/** A named list of parts of the beam. */
export function PartList({ list, label, empty, name, title, line, add, fields, isAlone = false }: ListProps) {
  const entries = useListAt(list);
  return (
    <section aria-label={label}>
      {!isAlone && <h3 className="caps mb-6">{label}</h3>}
      <Parts label={label} empty={empty} count={entries.length} fault={useFaultAt(list)} add={add}>
        {entries.map((one, index) => (
          <Part
            // biome-ignore lint/suspicious/noArrayIndexKey: a part has no identity but its place
            key={index}
            at={`${list}/${index}`}
            name={`${name} ${index + 1}`}
            count={entries.length}
            title={title(one, index)}
            line={line(one)}
          >
            {fields(`${list}/${index}`)}
          </Part>
        ))}
      </Parts>
    </section>
  );
}

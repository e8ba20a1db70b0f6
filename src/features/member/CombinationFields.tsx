import { ChoiceField } from '@/components/ui/Field';
import { LOAD_GROUP_NAMES } from '@/engine/combination';
import type { FieldFaults } from '@/features/template/faults';
import { type BasisData, categoriesOf, combinationsOf } from './basis';
import type { CombinationChoice, Draft } from './workspace';

interface CombinationFieldsProps {
  readonly draft: Draft;
  readonly data: BasisData;
  readonly faults: FieldFaults;
  readonly onChange: (part: Partial<Draft>) => void;
}

/** What the criteria are held against: a combination set that fits them, and the categories of the variable groups. */
export function CombinationFields({ draft, data, faults, onChange }: CombinationFieldsProps) {
  const combinations = combinationsOf(draft, data);
  if (!combinations) return null;
  const { fitting, set, criteria } = combinations;
  return (
    <>
      <ChoiceField
        label="Combinations"
        value={set?.slug ?? ''}
        choices={[
          ...(set ? [] : [{ value: '', label: 'Choose a set that fits the criteria' }]),
          ...fitting.map(({ slug, name }) => ({ value: slug, label: name })),
        ]}
        error={faults.get('combinations') ?? (set ? undefined : 'Without combinations nothing is judged.')}
        help={set && said(set)}
        onChange={(event) => onChange({ combinations: event.target.value, categories: {} })}
      />
      {set && (
        <div className="grid gap-x-14 gap-y-8 md:grid-cols-2">
          {categoriesOf(draft, set, criteria).map(({ group, letter, choices, chosen }) => (
            <ChoiceField
              key={group}
              label={`${letter}, ${LOAD_GROUP_NAMES[group]}`}
              value={chosen?.id ?? ''}
              choices={choices.map(({ id, name }) => ({ value: id, label: name }))}
              help={chosen && `ψ₀ ${chosen.psi0}, ψ₁ ${chosen.psi1}, ψ₂ ${chosen.psi2}`}
              onChange={(event) =>
                onChange({ categories: { ...draft.categories, [group]: event.target.value } })
              }
            />
          ))}
        </div>
      )}
    </>
  );
}

const said = ({ revision, document }: CombinationChoice): string =>
  `${document.publication}, revision ${revision}. Snow: ${document.snow.caution}`;

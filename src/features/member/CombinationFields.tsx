import { ChoiceField } from '@/components/ui/Field';
import { type CriteriaOfSet, unfitting } from '@/engine/check';
import { LOAD_GROUP_NAMES, LOAD_GROUPS, type LoadGroup } from '@/engine/combination';
import { letterOf } from '@/features/combination/combination';
import type { FieldFaults } from '@/features/template/faults';
import type { CombinationChoice, Draft, WorkspaceData } from './workspace';

interface CombinationFieldsProps {
  readonly draft: Draft;
  readonly data: Pick<WorkspaceData, 'criteria' | 'sets'>;
  readonly faults: FieldFaults;
  readonly onChange: (part: Partial<Draft>) => void;
}

/** What the criteria are held against: a combination set that fits them, and the categories of the variable groups. */
export function CombinationFields({ draft, data, faults, onChange }: CombinationFieldsProps) {
  const criteria = data.criteria.find(({ slug }) => slug === draft.criteria)?.document;
  if (criteria?.schema_version !== 2) return null;
  const fitting = data.sets.filter(({ document }) => unfitting(criteria, document).length === 0);
  const set = fitting.find(({ slug }) => slug === draft.combinations);
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
          <CategoryFields {...{ draft, set, criteria, onChange }} />
        </div>
      )}
    </>
  );
}

const said = ({ revision, document }: CombinationChoice): string =>
  `${document.publication}, revision ${revision}. Snow: ${document.snow.caution}`;

/** What each variable group is, where the set has a choice of ψ. */
function CategoryFields({
  draft,
  set,
  criteria,
  onChange,
}: Pick<CombinationFieldsProps, 'draft' | 'onChange'> & {
  readonly set: CombinationChoice;
  readonly criteria: CriteriaOfSet;
}) {
  const { document } = set;
  const groups = LOAD_GROUPS.filter((group) => (document.categories[group]?.length ?? 0) > 1);
  return groups.map((group: LoadGroup) => {
    const categories = document.categories[group] ?? [];
    const wanted = draft.categories[group] ?? criteria.categories?.[group];
    const chosen = categories.find(({ id }) => id === wanted) ?? categories[0];
    return (
      <ChoiceField
        key={group}
        label={`${letterOf(document, group)}, ${LOAD_GROUP_NAMES[group]}`}
        value={chosen?.id ?? ''}
        choices={categories.map(({ id, name }) => ({ value: id, label: name }))}
        help={chosen && `ψ₀ ${chosen.psi0}, ψ₁ ${chosen.psi1}, ψ₂ ${chosen.psi2}`}
        onChange={(event) => onChange({ categories: { ...draft.categories, [group]: event.target.value } })}
      />
    );
  });
}

import { Checkbox } from '@/components/ui/Choice';
import { ChoiceField, Field } from '@/components/ui/Field';
import { choiceOf, namedChoices } from '@/features/material/choice';
import type { FieldFaults } from '@/features/template/faults';
import { isMadeOf } from '@/features/template/section-pick';
import { CombinationFields } from './CombinationFields';
import type { MemberInputs } from './evaluate';
import { type CriteriaChoice, type Draft, judgedBy, type WorkspaceData } from './workspace';

interface BasisFieldsProps {
  readonly draft: Draft;
  readonly data: Pick<WorkspaceData, 'criteria' | 'sets' | 'materials'>;
  readonly faults: FieldFaults;
  readonly onChange: (part: Partial<Draft>) => void;
}

/** What the member is made of and judged by, beside its parameters. */
export function BasisFields({ draft, data, faults, onChange }: BasisFieldsProps) {
  const { section } = draft;
  const { criteria, materials } = data;
  return (
    <>
      <div className="px-14 pt-8 pb-9">
        {section && (
          <ChoiceField
            label="Material"
            value={choiceOf(materials, section.material)?.key ?? ''}
            choices={namedChoices(materials.filter(({ material }) => isMadeOf(section.values, material)))}
            help={setOf(choiceOf(materials, section.material))}
            error={faults.get('section/material') ?? faults.get('section')}
            onChange={(event) => onChange({ section: { ...section, material: event.target.value } })}
          />
        )}
        <OwnWeight draft={draft} onChange={onChange} />
      </div>
      <div className="grid content-start gap-8 px-14 pt-8 pb-9 md:col-span-2">
        <ChoiceField
          label="Criteria"
          value={draft.criteria}
          choices={[
            { value: '', label: 'Not chosen' },
            ...criteria.map(({ slug, name }) => ({ value: slug, label: name })),
          ]}
          error={faults.get('criteria')}
          help={criteria.find(({ slug }) => slug === draft.criteria)?.document.summary}
          onChange={(event) => onChange(chosenCriteria(criteria, event.target.value))}
        />
        <CombinationFields draft={draft} data={data} faults={faults} onChange={onChange} />
        <Patterns draft={draft} judged={judgedBy(draft, data)} onChange={onChange} />
      </div>
    </>
  );
}

/** Other criteria bring the combinations that they refer to. */
function chosenCriteria(
  criteria: readonly CriteriaChoice[],
  chosen: string,
): Pick<Draft, 'criteria' | 'combinations' | 'categories'> {
  const document = criteria.find(({ slug }) => slug === chosen)?.document;
  const combinations = document?.schema_version === 2 ? document.combinations.set : '';
  return { criteria: chosen, combinations, categories: {} };
}

/** Where its values stand. */
const setOf = (choice: WorkspaceData['materials'][number] | undefined): string | undefined =>
  choice && (choice.set ? `${choice.set.name}, revision ${choice.set.revision}` : 'As shipped, of no set.');

function OwnWeight({ draft, onChange }: Pick<BasisFieldsProps, 'draft' | 'onChange'>) {
  return (
    <>
      <Checkbox
        checked={draft.selfWeight}
        onChange={(event) => onChange({ selfWeight: event.target.checked })}
      >
        Own weight, in G
      </Checkbox>
      {!draft.selfWeight && (
        <Field
          label="Left out because"
          value={draft.selfWeightReason}
          maxLength={300}
          error={
            draft.selfWeightReason.trim() === '' ? 'Say why. The reason is printed on the sheet.' : undefined
          }
          onChange={(event) => onChange({ selfWeightReason: event.target.value })}
        />
      )}
    </>
  );
}

/** Which groups act only where adverse: the criteria say so, and the member may not, for a reason. */
function Patterns({
  draft,
  judged,
  onChange,
}: Pick<BasisFieldsProps, 'draft' | 'onChange'> & { readonly judged: MemberInputs['criteria'] }) {
  const patterned = (judged?.patterns ?? [])
    .filter(({ where_adverse }) => where_adverse)
    .map(({ group, basis }) => ({ letter: judged?.letters?.[group] ?? group, basis }));
  if (patterned.length === 0) return null;
  return (
    <>
      <Checkbox checked={draft.patterns} onChange={(event) => onChange({ patterns: event.target.checked })}>
        {patterned.map(({ letter }) => letter).join(' and ')} only on the spans where adverse
      </Checkbox>
      <p className="text-note text-ink-2">
        {patterned.map(({ letter, basis }) => `${letter}: ${basis}.`).join(' ')}
      </p>
      {!draft.patterns && (
        <Field
          label="On the whole length because"
          value={draft.patternsReason}
          maxLength={300}
          error={
            draft.patternsReason.trim() === '' ? 'Say why. The reason is printed on the sheet.' : undefined
          }
          onChange={(event) => onChange({ patternsReason: event.target.value })}
        />
      )}
    </>
  );
}

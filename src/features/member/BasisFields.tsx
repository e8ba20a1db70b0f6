import { useId, useState } from 'react';
import { Checkbox } from '@/components/ui/Choice';
import { ChoiceField, Field } from '@/components/ui/Field';
import { choiceOf } from '@/features/material/choice';
import type { FieldFaults } from '@/features/template/faults';
import { type BasisData, basisWords, isBasisAmiss, materialChoices, patternWords } from './basis';
import { CombinationFields } from './CombinationFields';
import type { MemberInputs } from './evaluate';
import { type CriteriaChoice, type Draft, judgedBy, type WorkspaceData } from './workspace';

interface BasisFieldsProps {
  readonly draft: Draft;
  readonly data: BasisData;
  readonly faults: FieldFaults;
  readonly onChange: (part: Partial<Draft>) => void;
}

/** Whether the basis stands open, and opening or closing it; null while something in it is amiss, which keeps it open. */
export function useBasis({ draft, data, faults }: Pick<BasisFieldsProps, 'draft' | 'data' | 'faults'>) {
  const isAmiss = isBasisAmiss(draft, data, faults);
  const [isOpen, setOpen] = useState(isAmiss);
  // What was amiss stays in view when it is put right: the next key belongs to the same field.
  if (isAmiss && !isOpen) setOpen(true);
  return { id: useId(), isOpen, turn: isAmiss ? null : setOpen };
}

type Basis = ReturnType<typeof useBasis>;

/** What the member is made of and judged by, in few lines beside its parameters. */
export function BasisSummary({
  draft,
  data,
  basis,
  mayEdit,
}: Pick<BasisFieldsProps, 'draft' | 'data'> & { readonly basis: Basis; readonly mayEdit: boolean }) {
  const { criteria, rest } = basisWords(draft, data);
  return (
    <div className="min-w-0 px-14 pt-8 pb-9">
      <div className="flex items-baseline">
        <span className="caps">Basis</span>
        {basis.turn && (
          // A summary, since a button could not be pressed by those who may not edit: their fieldset is disabled.
          <details
            open={basis.isOpen}
            onToggle={(event) => basis.turn?.(event.currentTarget.open)}
            className="ml-auto"
          >
            <summary aria-controls={basis.id} className="link list-none text-note pointer-coarse:min-h-44">
              {basis.isOpen ? 'Close' : mayEdit ? 'Change' : 'Show'}
              <span className="sr-only"> the basis</span>
            </summary>
          </details>
        )}
      </div>
      <p className="line-clamp-2 text-schedule leading-18">{criteria}</p>
      <p className="line-clamp-3 text-note leading-16 text-ink-2">{rest}</p>
    </div>
  );
}

/** Its fields, over the whole width. */
export function BasisFields({ basis, ...fields }: BasisFieldsProps & { readonly basis: Basis }) {
  return (
    <div id={basis.id} hidden={!basis.isOpen} className="border-t border-rule">
      {basis.isOpen && <OpenFields {...fields} />}
    </div>
  );
}

function OpenFields({ draft, data, faults, onChange }: BasisFieldsProps) {
  const { section } = draft;
  const { criteria, materials } = data;
  return (
    <div className="grid gap-x-28 gap-y-8 px-14 pt-8 pb-12 md:grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
      <div className="grid content-start gap-8">
        {section && (
          <ChoiceField
            label="Material"
            value={choiceOf(materials, section.material)?.key ?? ''}
            choices={materialChoices(draft, data)}
            help={setOf(choiceOf(materials, section.material))}
            error={faults.get('section/material') ?? faults.get('section')}
            onChange={(event) => onChange({ section: { ...section, material: event.target.value } })}
          />
        )}
        <OwnWeight draft={draft} onChange={onChange} />
      </div>
      <div className="grid content-start gap-8">
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
    </div>
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
  const words = patternWords(draft, judged);
  if (!words) return null;
  return (
    <>
      <Checkbox checked={draft.patterns} onChange={(event) => onChange({ patterns: event.target.checked })}>
        {words.label}
      </Checkbox>
      <p className="text-note text-ink-2">{words.note}</p>
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

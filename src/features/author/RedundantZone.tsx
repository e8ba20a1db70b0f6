import { useMemo } from 'react';
import { Button } from '@/components/ui/Button';
import { useRestedValue } from '@/features/template/use-live';
import { type Pointer, textAt } from './edit';
import { ChoiceAt, ExpressionAt, useReadOnly } from './fields';
import { sameValue } from './merge';
import { Row } from './Part';
import { PartList } from './PartList';
import { releasable, type WrittenRedundant } from './redundants';
import { SupportAt } from './SupportAt';
import { useDraft, useListAt, useSnapshot, useTextAt } from './use-editor';

const LIST = '/beam/redundants';

/** What is released first by the force method; any other admissible set gives the same results. */
export function RedundantZone() {
  const document = useRestedValue(
    useSnapshot(({ history }) => history.document),
    150,
  );
  const now = useMemo(() => releasable(document), [document]);
  return (
    <div className="grid gap-14">
      {now && <Eligible degree={now.degree} eligible={now.eligible} usual={now.usual} />}
      <PartList
        list={LIST}
        label="Released"
        empty="None: equilibrium alone finds every reaction."
        name="redundant"
        title={(one) => wordsOf(one)}
        line={(one) => (textAt(one, '/when') ? `when ${textAt(one, '/when')}` : '')}
        add={undefined}
        fields={(at) => <RedundantFields at={at} />}
      />
    </div>
  );
}

const COMPONENTS: Readonly<Record<string, string>> = {
  vertical: 'Reaction at',
  rotation: 'Fixing moment at',
  moment: 'Moment over',
};

const wordsOf = (one: unknown): string =>
  `${COMPONENTS[textAt(one, '/component')] ?? 'Redundant'} ${textAt(one, '/support') || `x = ${textAt(one, '/at') || '?'}`}`;

interface EligibleProps {
  readonly degree: number;
  readonly eligible: readonly WrittenRedundant[];
  readonly usual: readonly WrittenRedundant[];
}

/** All that may be released alone, to be ticked. */
function Eligible({ degree, eligible, usual }: EligibleProps) {
  const store = useDraft();
  const chosen = useListAt(LIST);
  const isReadOnly = useReadOnly();
  const isIn = (one: WrittenRedundant) => chosen.some((other) => sameValue({ ...one }, other));
  const toggle = (one: WrittenRedundant) => {
    const value = isIn(one) ? chosen.filter((other) => !sameValue({ ...one }, other)) : [...chosen, one];
    store.edit({ do: 'set', at: LIST, value });
  };
  if (degree === 0) return null;
  return (
    <fieldset className="min-w-0">
      <legend className="mb-6">
        Statically indeterminate to degree {degree}: choose {degree}. The drawing shows how the beam moves
        where a choice leaves a mechanism.
      </legend>
      <div className="grid md:grid-cols-2">
        {eligible.map((one) => (
          <label key={wordsOf(one)} className="choice">
            <input type="checkbox" disabled={isReadOnly} checked={isIn(one)} onChange={() => toggle(one)} />
            <span>{wordsOf(one)}</span>
          </label>
        ))}
      </div>
      {!isReadOnly && !sameValue(usual, chosen) && (
        <div className="mt-8">
          <Button size="small" onClick={() => store.edit({ do: 'set', at: LIST, value: usual })}>
            Take the beam’s own choice
          </Button>
        </div>
      )}
    </fieldset>
  );
}

function RedundantFields({ at }: { readonly at: Pointer }) {
  const component = useTextAt(`${at}/component`);
  return (
    <Row>
      {component === 'moment' ? (
        <ExpressionAt at={`${at}/at`} label="Over the support at" wanted="length" />
      ) : (
        <>
          <SupportAt at={`${at}/support`} />
          <ChoiceAt
            at={`${at}/component`}
            label="Component"
            choices={[
              { value: 'vertical', label: 'Vertical reaction' },
              { value: 'rotation', label: 'Fixing moment' },
            ]}
          />
        </>
      )}
      <ExpressionAt
        at={`${at}/when`}
        label="Only when"
        wanted="condition"
        isOptional
        help="With a support that is there only then."
      />
    </Row>
  );
}

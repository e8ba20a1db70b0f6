import { useState } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { readProof } from './author.api';
import { ExpectFields } from './ExpectFields';
import { listAt, type Pointer, textAt } from './edit';
import { ChoiceAt, QuantityAt, TextAt } from './fields';
import { Row } from './Part';
import { PartList } from './PartList';
import { addCase, addWorstCase } from './proof-cases';
import { useSourceChoices } from './SourceZone';
import { StatedFields } from './StatedFields';
import { useAdd } from './use-add';

interface ProofZoneProps {
  readonly slug: string;
  readonly revision: number;
}

/** Cases whose results are known from elsewhere: three at least. */
export function ProofZone(props: ProofZoneProps) {
  const press = useAdd();
  return (
    <PartList
      isAlone
      list="/proof_cases"
      label="Proof cases"
      empty="None yet. Three at least are run on every revision: printed figures, closed forms, limits."
      name="proof case"
      title={(one) => textAt(one, '/name') || 'Without a name'}
      line={(one) => {
        const { length } = listAt(one, '/expect');
        return `${length} ${length === 1 ? 'value' : 'values'} expected`;
      }}
      add={
        <>
          <Button size="small" onClick={() => press(addCase)}>
            Add a case
          </Button>
          <WorstCase {...props} />
        </>
      }
      fields={(at) => <CaseFields at={at} />}
    />
  );
}

function CaseFields({ at }: { readonly at: Pointer }) {
  return (
    <>
      <Row>
        <TextAt at={`${at}/name`} label="Name" maxLength={120} />
        <ChoiceAt at={`${at}/source`} label="Source of what is expected" choices={useSourceChoices()} />
        <QuantityAt
          at={`${at}/ei`}
          label="EI"
          dimension="bending_stiffness"
          isOptional
          help="Left empty: the template’s."
        />
      </Row>
      <fieldset className="grid gap-10">
        <legend className="caps mb-6">At these values; empty is the default</legend>
        <StatedFields at={`${at}/parameters`} />
      </fieldset>
      <ExpectFields at={`${at}/expect`} />
    </>
  );
}

/** The worst point of the last proof's sweep, to be kept as a case. */
function WorstCase({ slug, revision }: ProofZoneProps) {
  const press = useAdd();
  const [said, setSaid] = useState<string>();
  const add = async () => {
    const outcome = await readProof({ kind: 'template', slug, revision });
    const worst = outcome.kind === 'done' ? outcome.value.report?.worst_case : null;
    if (!worst) return setSaid('There is no worst case: prove the draft first.');
    setSaid(undefined);
    press((document) => addWorstCase(document, worst));
  };
  return (
    <span>
      <Button size="small" onClick={() => void add()}>
        Keep the worst case of the last proof
      </Button>
      <FieldNote id="worst-case-note" error={said} />
    </span>
  );
}

import { Button } from '@/components/ui/Button';
import { freshId } from './add';
import { listAt, type Pointer, textAt, valueAt } from './edit';
import { ChoiceAt, ExpressionAt, TextAt } from './fields';
import { Row } from './Part';
import { PartList } from './PartList';
import { SelectorFields } from './SelectorFields';
import { useSourceChoices } from './SourceZone';
import { beginningOf, quantityDimension, quantityWords } from './selectors';
import { useAdd } from './use-add';
import { useAt } from './use-editor';

/** Closed forms: formulas that the proof compares with the solver over the whole box. */
export function ResultZone() {
  const press = useAdd();
  const add = () =>
    press((document) => ({
      edits: [{ do: 'insert', at: '/results/-', value: newResult(document) }],
      select: `/results/${listAt(document, '/results').length}`,
    }));
  return (
    <PartList
      isAlone
      list="/results"
      label="Closed forms"
      empty="None. A template may do without; what has a formula is proven by it."
      name="closed form"
      title={(one) => textAt(one, '/name') || 'Without a name'}
      line={(one) =>
        `${quantityWords(valueAt(one, '/quantity'))} = ${textAt(one, '/expression') || 'nothing yet'}`
      }
      add={
        <Button size="small" onClick={add}>
          Add a closed form
        </Button>
      }
      fields={(at) => <ResultFields at={at} />}
    />
  );
}

const newResult = (document: Readonly<Record<string, unknown>>) => ({
  id: freshId(document, '/results', 'form'),
  name: '',
  tex: '',
  formula: '',
  quantity: beginningOf('reaction'),
  expression: '',
  source: textAt(listAt(document, '/sources')[0], '/id'),
});

function ResultFields({ at }: { readonly at: Pointer }) {
  const quantity = useAt(`${at}/quantity`);
  const sources = useSourceChoices();
  return (
    <>
      <Row>
        <TextAt at={`${at}/name`} label="Name" maxLength={120} />
        <TextAt at={`${at}/id`} label="Id" maxLength={80} />
        <ChoiceAt at={`${at}/source`} label="Source" choices={sources} />
      </Row>
      <SelectorFields at={`${at}/quantity`} />
      <Row>
        <ExpressionAt at={`${at}/expression`} label="Expression" wanted={quantityDimension(quantity)} />
        <ExpressionAt at={`${at}/when`} label="Holds when" wanted="condition" isOptional />
        <TextAt at={`${at}/tex`} label="Left side, as TeX" help="R_A" maxLength={400} />
        <TextAt at={`${at}/formula`} label="Right side, as TeX" help="\frac{wL}{2}" maxLength={400} />
      </Row>
    </>
  );
}

import { Button } from '@/components/ui/Button';
import { DraftSteps } from './draft-steps';
import { textAt } from './edit';
import { ExpressionAt, TextAt } from './fields';
import { openPart } from './open-part';
import { Part, Parts, Row } from './Part';
import { texOf } from './rename';
import { SymbolAt } from './SymbolAt';
import { useDraft, useFaultAt, useListAt } from './use-editor';

const LIST = '/derived';

/** Values that follow from the parameters, each from those before it. */
export function DerivedZone() {
  const store = useDraft();
  const derived = useListAt(LIST);
  const add = () => {
    const steps = new DraftSteps(store.document);
    const symbol = steps.fresh('d');
    const at = steps.append(LIST, { symbol, tex: texOf(symbol), name: '', expression: '' });
    store.edit(...steps.edits);
    openPart(store, at);
  };
  return (
    <Parts
      label="Derived values"
      empty="None. One is worth it where several expressions say the same."
      count={derived.length}
      fault={useFaultAt(LIST)}
      add={
        <Button size="small" onClick={add}>
          Add a derived value
        </Button>
      }
    >
      {derived.map((one, index) => {
        const at = `${LIST}/${index}`;
        return (
          <Part
            // biome-ignore lint/suspicious/noArrayIndexKey: a part has no identity but its place
            key={index}
            at={at}
            name={`derived value ${textAt(one, '/symbol')}`}
            count={derived.length}
            title={<i>{textAt(one, '/symbol') || '?'}</i>}
            line={`= ${textAt(one, '/expression') || 'nothing yet'}`}
          >
            <Row>
              <SymbolAt at={at} />
              <TextAt at={`${at}/name`} label="Name" maxLength={60} />
              <TextAt at={`${at}/tex`} label="In formulas" maxLength={400} />
            </Row>
            <ExpressionAt at={`${at}/expression`} label="Value" wanted="any number" />
          </Part>
        );
      })}
    </Parts>
  );
}

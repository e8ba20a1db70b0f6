import { Button } from '@/components/ui/Button';
import { supportLetter } from '@/engine/model';
import type { Written } from '@/features/review/draft';
import { type Added, addHinge, addSegment, addSupport } from './add';
import { SUPPORT_CHOICES } from './choices';
import { listAt, type Pointer, textAt } from './edit';
import { ChoiceAt, ExpressionAt, TextAt } from './fields';
import { openPart } from './open-part';
import { Row } from './Part';
import { PartList } from './PartList';
import { useAdd } from './use-add';
import { useDraft, useTextAt } from './use-editor';

const WHEN_HELP = 'A condition such as ends == "both". Left empty: always.';

/** The beam: how long, what holds it, where it turns freely, where it is stiffer, and how it is dimensioned. */
export function BeamZone() {
  return (
    <div className="grid gap-20">
      <Row>
        <ExpressionAt at="/beam/length" label="Length" wanted="length" />
        <ExpressionAt
          at="/beam/own_weight"
          label="Share of own weight"
          wanted="ratio"
          isOptional
          help="That acts across the beam, as cos of a slope."
        />
      </Row>
      <Supports />
      <Hinges />
      <Segments />
      <Dimensions />
    </div>
  );
}

function AddOne({ word, add }: { readonly word: string; readonly add: (document: Written) => Added }) {
  const press = useAdd();
  return (
    <Button size="small" onClick={() => press(add)}>
      {word}
    </Button>
  );
}

const sometimes = (one: unknown): string => (textAt(one, '/when') ? `, when ${textAt(one, '/when')}` : '');

function Supports() {
  return (
    <PartList
      list="/beam/supports"
      label="Supports, from the left"
      empty="None: the beam would fall. Add one."
      name="support"
      title={(_, index) => `Support ${supportLetter(index)}`}
      line={(one) => {
        const springs = ['kv', 'kr'].filter((key) => textAt(one, `/${key}`) !== '');
        const moves = ['rise', 'rotation'].filter((key) => textAt(one, `/${key}`) !== '');
        const more = [springs.length > 0 ? ', on a spring' : '', moves.length > 0 ? ', moves' : ''].join('');
        return `${textAt(one, '/kind')} at ${textAt(one, '/at')}${more}${sometimes(one)}`;
      }}
      add={<AddOne word="Add a support" add={addSupport} />}
      fields={(at) => <SupportFields at={at} />}
    />
  );
}

function SupportFields({ at }: { readonly at: Pointer }) {
  const kind = useTextAt(`${at}/kind`);
  // A spring that the kind does not take stays in view, to be taken out.
  const isFreeUp = useTextAt(`${at}/kv`) !== '' || kind === 'free' || kind === 'guided';
  const isFreeTurn = useTextAt(`${at}/kr`) !== '' || (kind !== 'fixed' && kind !== 'guided');
  return (
    <>
      <Row>
        <ChoiceAt at={`${at}/kind`} label="Kind" choices={SUPPORT_CHOICES} />
        <ExpressionAt at={`${at}/at`} label="Place" wanted="length" help="From the left end." />
        {isFreeUp && <ExpressionAt at={`${at}/kv`} label="Spring, up and down" wanted="spring" isOptional />}
        {isFreeTurn && (
          <ExpressionAt at={`${at}/kr`} label="Spring, turning" wanted="rotational_spring" isOptional />
        )}
      </Row>
      <Row>
        <ExpressionAt
          at={`${at}/rise`}
          label="Rise"
          wanted="length"
          isOptional
          help="Up positive: a settlement is negative."
        />
        <ExpressionAt
          at={`${at}/rotation`}
          label="Turn"
          wanted="rotation"
          isOptional
          help="Anticlockwise positive."
        />
        <ExpressionAt at={`${at}/when`} label="Only when" wanted="condition" isOptional help={WHEN_HELP} />
      </Row>
    </>
  );
}

function Hinges() {
  return (
    <PartList
      list="/beam/hinges"
      label="Hinges"
      empty="None: the beam is continuous."
      name="hinge"
      title={(_, index) => `Hinge ${index + 1}`}
      line={(one) => `at ${textAt(one, '/at')}${sometimes(one)}`}
      add={<AddOne word="Add a hinge" add={(document) => addHinge(document, null)} />}
      fields={(at) => (
        <Row>
          <ExpressionAt at={`${at}/at`} label="Place" wanted="length" help="From the left end." />
          <ExpressionAt at={`${at}/when`} label="Only when" wanted="condition" isOptional help={WHEN_HELP} />
        </Row>
      )}
    />
  );
}

function Segments() {
  return (
    <PartList
      list="/beam/segments"
      label="Lengths of other stiffness"
      empty="None: one stiffness throughout, the member’s."
      name="length"
      title={(one) => `${textAt(one, '/ei') || '?'} EI`}
      line={(one) => `from ${textAt(one, '/from')} to ${textAt(one, '/to')}`}
      add={<AddOne word="Add a length" add={(document) => addSegment(document, null)} />}
      fields={(at) => (
        <Row>
          <ExpressionAt at={`${at}/from`} label="From" wanted="length" />
          <ExpressionAt
            at={`${at}/to`}
            label="To"
            wanted="length"
            help="Together the lengths cover the beam."
          />
          <ExpressionAt at={`${at}/ei`} label="Share of EI" wanted="ratio" help="1 is the member’s own." />
        </Row>
      )}
    />
  );
}

function Dimensions() {
  const store = useDraft();
  const add = () => {
    const { length } = listAt(store.document, '/beam/dimensions');
    const value = { from: '0', to: textAt(store.document, '/beam/length'), symbol: '' };
    store.edit({ do: 'insert', at: '/beam/dimensions/-', value });
    openPart(store, `/beam/dimensions/${length}`);
  };
  return (
    <PartList
      list="/beam/dimensions"
      label="Dimension lines, inner row first"
      empty="None. A drawing needs one at least."
      name="dimension line"
      title={(one) => <i>{textAt(one, '/symbol') || '?'}</i>}
      line={(one) => `from ${textAt(one, '/from')} to ${textAt(one, '/to')}${sometimes(one)}`}
      add={
        <Button size="small" onClick={add}>
          Add a dimension line
        </Button>
      }
      fields={(at) => (
        <Row>
          <TextAt at={`${at}/symbol`} label="Symbol" help="Of a parameter or derived value." />
          <ExpressionAt at={`${at}/from`} label="From" wanted="length" />
          <ExpressionAt at={`${at}/to`} label="To" wanted="length" />
          <ExpressionAt at={`${at}/when`} label="Only when" wanted="condition" isOptional help={WHEN_HELP} />
        </Row>
      )}
    />
  );
}

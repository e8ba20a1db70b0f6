import { ChoiceField } from '@/components/ui/Field';
import { DIMENSION_NAMES, DIMENSION_WORDS } from '@/engine/quantity';
import { choicesOf } from './choices';
import type { Pointer } from './edit';
import { ChoiceAt, CountAt, ExpressionAt, useReadOnly } from './fields';
import { Row } from './Part';
import { SupportAt } from './SupportAt';
import { beginningOf, QUANTITY_NAMES, quantityName } from './selectors';
import { useAt, useDraft } from './use-editor';
import { SceneContext } from './use-kinds';

const SIDES = [
  { value: '', label: 'Just right of it' },
  { value: 'left', label: 'Just left of it' },
  { value: 'right', label: 'Just right of it, said' },
];
const FIGURE_SCENE = { scene: 'figure', repeat: '' } as const;

/** Which quantity is read off the beam, and where. */
export function SelectorFields({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const quantity = useAt(at);
  const name = quantityName(quantity);
  return (
    <Row>
      <ChoiceField
        data-at={at}
        label="Quantity"
        disabled={useReadOnly()}
        choices={Object.entries(QUANTITY_NAMES).map(([value, label]) => ({ value, label }))}
        value={name}
        onChange={(event) => store.edit({ do: 'set', at, value: beginningOf(event.target.value) })}
      />
      <Details at={at} name={name} />
    </Row>
  );
}

function Details({ at, name }: { readonly at: Pointer; readonly name: ReturnType<typeof quantityName> }) {
  switch (name) {
    case 'reaction':
      return (
        <>
          <SupportAt at={`${at}/reaction`} />
          <ChoiceAt
            at={`${at}/component`}
            label="Component"
            choices={[
              { value: '', label: 'Vertical, up positive' },
              { value: 'moment', label: 'Moment, anticlockwise positive' },
            ]}
          />
        </>
      );
    case 'largest-moment':
      return <Largest at={at} senses={['sagging', 'hogging']} />;
    case 'largest-deflection':
      return <Largest at={at} senses={['down', 'up']} />;
    case 'moment':
    case 'shear':
      return (
        <>
          <ExpressionAt at={`${at}/${name}`} label="At" wanted="length" />
          <ChoiceAt at={`${at}/side`} label="Side" choices={SIDES.slice(0, 2)} />
        </>
      );
    case 'deflection':
    case 'slope':
      return (
        <>
          <ExpressionAt at={`${at}/${name}`} label="At" wanted="length" />
          <ChoiceAt
            at={`${at}/sense`}
            label="Positive"
            choices={choicesOf(name === 'slope' ? ['clockwise', 'anticlockwise'] : ['down', 'up'])}
          />
        </>
      );
    case 'contraflexure':
      return (
        <>
          <CountAt at={`${at}/contraflexure`} label="Which, from 0" help="Counted from the left." />
          <ExpressionAt at={`${at}/from`} label="Measured from" wanted="length" isOptional />
        </>
      );
    case 'figure':
      return (
        <SceneContext value={FIGURE_SCENE}>
          <Figure at={at} />
        </SceneContext>
      );
  }
}

function Largest({ at, senses }: { readonly at: Pointer; readonly senses: readonly string[] }) {
  return (
    <>
      <ChoiceAt at={`${at}/sense`} label="Sense" choices={choicesOf(senses)} />
      <ChoiceAt
        at={`${at}/read`}
        label="Read"
        choices={[
          { value: '', label: 'Its value' },
          { value: 'position', label: 'Its place' },
        ]}
      />
    </>
  );
}

function Figure({ at }: { readonly at: Pointer }) {
  const dimension = useAt(`${at}/dimension`);
  const wanted = DIMENSION_NAMES.find((name) => name === dimension) ?? 'any number';
  return (
    <>
      <ExpressionAt at={`${at}/figure`} label="Expression" wanted={wanted} help="Reactions are RA, RB …" />
      <ChoiceAt
        at={`${at}/dimension`}
        label="Dimension"
        choices={DIMENSION_NAMES.map((value) => ({
          value,
          label: DIMENSION_WORDS[value].replace(/^an? /, ''),
        }))}
      />
    </>
  );
}

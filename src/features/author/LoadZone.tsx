import { Button } from '@/components/ui/Button';
import { addCouple, addCurvature, addLine, addPoint, addPointRows, addSettlement } from './add';
import { listAt, type Pointer, textAt } from './edit';
import { ChoiceAt, ExpressionAt } from './fields';
import { declaredGroups } from './groups';
import { Row } from './Part';
import { PartList } from './PartList';
import { useAdd } from './use-add';
import { useAt, useSnapshot, useTextAt } from './use-editor';
import { SceneContext } from './use-kinds';

const KIND_WORDS: Readonly<Record<string, string>> = {
  point: 'Point load',
  line: 'Line load',
  couple: 'Couple',
  curvature: 'Thermal curvature',
};

/** Loads, each with the group of the parameters that size it. */
export function LoadZone() {
  const document = useSnapshot(({ history }) => history.document);
  return (
    <PartList
      isAlone
      list="/beam/loads"
      label="Loads"
      empty="None yet."
      name="load"
      title={(one) => KIND_WORDS[textAt(one, '/kind')] ?? 'Load'}
      line={(one) => `${lineOf(one)}, ${declaredGroups(document, one) || 'of no group yet'}`}
      add={<AddLoad />}
      fields={(at) => <LoadFields at={at} />}
    />
  );
}

function lineOf(one: unknown): string {
  const text = (key: string) => textAt(one, `/${key}`) || '?';
  const repeat = textAt(one, '/repeat') ? `, for each of ${text('repeat')}` : '';
  switch (textAt(one, '/kind')) {
    case 'line': {
      const size = text('w0') === text('w1') ? text('w0') : `${text('w0')} to ${text('w1')}`;
      return `${size} from ${text('from')} to ${text('to')}${repeat}`;
    }
    case 'curvature':
      return `${text('kappa')} from ${text('from')} to ${text('to')}${repeat}`;
    case 'couple':
      return `${text('m')} at ${text('at')}${repeat}`;
    default:
      return `${text('p')} at ${text('at')}${repeat}`;
  }
}

function LoadFields({ at }: { readonly at: Pointer }) {
  const kind = useTextAt(`${at}/kind`);
  const repeat = useTextAt(`${at}/repeat`);
  return (
    <SceneContext value={{ scene: 'beam', repeat }}>
      <Row>
        {kind === 'line' || kind === 'curvature' ? (
          <>
            <ExpressionAt at={`${at}/from`} label="From" wanted="length" />
            <ExpressionAt at={`${at}/to`} label="To" wanted="length" />
          </>
        ) : (
          <ExpressionAt at={`${at}/at`} label="Place" wanted="length" help="From the left end." />
        )}
        {kind === 'point' && (
          <ExpressionAt at={`${at}/p`} label="Force" wanted="force" help="Down positive." />
        )}
        {kind === 'line' && (
          <>
            <ExpressionAt
              at={`${at}/w0`}
              label="Load at the start"
              wanted="line_load"
              help="Down positive."
            />
            <ExpressionAt at={`${at}/w1`} label="Load at the end" wanted="line_load" />
          </>
        )}
        {kind === 'couple' && (
          <ExpressionAt at={`${at}/m`} label="Couple" wanted="moment" help="Anticlockwise positive." />
        )}
        {kind === 'curvature' && (
          <ExpressionAt at={`${at}/kappa`} label="Curvature" wanted="curvature" help="Sagging positive." />
        )}
      </Row>
      <Row>
        <RepeatAt at={at} />
        <ExpressionAt at={`${at}/when`} label="Only when" wanted="condition" isOptional />
      </Row>
    </SceneContext>
  );
}

/** The list that a part is repeated over, where the template has one. */
export function RepeatAt({ at }: { readonly at: Pointer }) {
  const parameters = useAt('/parameters');
  const lists = listAt(parameters, '').filter((one) => textAt(one, '/kind') === 'rows');
  const repeat = useTextAt(`${at}/repeat`);
  if (lists.length === 0 && repeat === '') return null;
  return (
    <ChoiceAt
      at={`${at}/repeat`}
      label="For each row of"
      choices={[
        { value: '', label: 'No list: once' },
        ...lists.map((one) => ({ value: textAt(one, '/symbol'), label: textAt(one, '/symbol') })),
      ]}
    />
  );
}

type Add = Parameters<ReturnType<typeof useAdd>>[0];

const LOADS: readonly (readonly [word: string, add: Add])[] = [
  ['Add a uniform load', (document) => addLine(document, 'uniform', null)],
  ['Add a point load', (document) => addPoint(document, null)],
  ['Add a list of point loads', addPointRows],
  ['Add a triangular load', (document) => addLine(document, 'triangular', null)],
  ['Add a couple', (document) => addCouple(document, null)],
  ['Add a temperature difference', (document) => addCurvature(document, null)],
  ['Let a support settle', addSettlement],
];

/** Each where it belongs by itself: over the whole beam, at a free end; it can be moved then. */
function AddLoad() {
  const press = useAdd();
  return LOADS.map(([word, add]) => (
    <Button key={word} size="small" onClick={() => press(add)}>
      {word}
    </Button>
  ));
}

import { Button } from '@/components/ui/Button';
import { freshId } from './add';
import { SEVERITY_CHOICES } from './choices';
import { type Pointer, textAt } from './edit';
import { ChoiceAt, ExpressionAt, LongTextAt, QuantityAt, TextAt, useReadOnly } from './fields';
import { RepeatAt } from './LoadZone';
import { Row } from './Part';
import { PartList } from './PartList';
import { StatedFields } from './StatedFields';
import { useAdd } from './use-add';
import { useDraft, useTextAt } from './use-editor';
import { SceneContext } from './use-kinds';
import { addUsualRules } from './usual-rules';

/** Where the template holds, and what is said where it does not. */
export function RuleZone() {
  const store = useDraft();
  const press = useAdd();
  const add = () => {
    const id = freshId(store.document, '/rules', 'rule');
    press((document) => ({
      edits: [{ do: 'insert', at: '/rules/-', value: { ...NEW_RULE, id } }],
      select: `/rules/${lengthOf(document)}`,
    }));
  };
  return (
    <PartList
      isAlone
      list="/rules"
      label="Rules"
      empty="None yet. Every beam has its limits: a slender one, one that does not lift."
      name="rule"
      title={(one) => textAt(one, '/title') || 'Without a title'}
      line={(one) => `${textAt(one, '/severity')}: ${textAt(one, '/expression') || 'nothing yet'}`}
      add={
        <>
          <Button size="small" onClick={() => press(addUsualRules)}>
            Add the usual rules
          </Button>
          <Button size="small" onClick={add}>
            Add a rule
          </Button>
        </>
      }
      fields={(at) => <RuleFields at={at} />}
    />
  );
}

const NEW_RULE = {
  title: '',
  expression: '',
  severity: 'warn',
  message: '',
  trial: { parameters: {} },
};

const lengthOf = (document: Readonly<Record<string, unknown>>): number =>
  Array.isArray(document['rules']) ? document['rules'].length : 0;

function RuleFields({ at }: { readonly at: Pointer }) {
  const repeat = useTextAt(`${at}/repeat`);
  return (
    <>
      <Row>
        <TextAt
          at={`${at}/title`}
          label="The rule as a sentence"
          maxLength={120}
          help="As it holds: The overhang is at most the span."
        />
        <ChoiceAt at={`${at}/severity`} label="Where it does not hold" choices={SEVERITY_CHOICES} />
        <TextAt at={`${at}/id`} label="Id" maxLength={80} help="Small letters, digits and hyphens." />
        <RepeatAt at={at} />
      </Row>
      <SceneContext value={{ scene: 'rule', repeat }}>
        <ExpressionAt
          at={`${at}/expression`}
          label="Condition"
          wanted="condition"
          help="Of the parameters, the section’s depth h, the reactions RA, RB … and the largest movement dmax."
        />
      </SceneContext>
      <LongTextAt
        at={`${at}/message`}
        label="What is said"
        rows={2}
        help="What is wrong and what to do. A symbol in braces, {L}, is filled in."
      />
      <ShownFigure at={at} />
      <fieldset className="grid gap-10 border-t border-rule pt-8">
        <legend className="caps">Values that break it</legend>
        <StatedFields at={`${at}/trial/parameters`} />
        <Row>
          <QuantityAt at={`${at}/trial/ei`} label="EI" dimension="bending_stiffness" isOptional />
          <QuantityAt at={`${at}/trial/depth`} label="Depth of the section" dimension="length" isOptional />
        </Row>
      </fieldset>
    </>
  );
}

/** A figure that is shown beside the rule, such as a/L. */
function ShownFigure({ at }: { readonly at: Pointer }) {
  const store = useDraft();
  const isReadOnly = useReadOnly();
  const shown = useTextAt(`${at}/shown/expression`);
  const tex = useTextAt(`${at}/shown/tex`);
  return (
    <SceneContext value={{ scene: 'rule', repeat: '' }}>
      <Row>
        <ExpressionAt at={`${at}/shown/expression`} label="Figure beside it" wanted="any number" isOptional />
        {(shown !== '' || tex !== '') && (
          <>
            <TextAt at={`${at}/shown/tex`} label="Written as" help="As TeX: a/L." />
            <div className="self-end" hidden={isReadOnly}>
              <Button size="small" onClick={() => store.edit({ do: 'remove', at: `${at}/shown` })}>
                Show no figure
              </Button>
            </div>
          </>
        )}
      </Row>
    </SceneContext>
  );
}

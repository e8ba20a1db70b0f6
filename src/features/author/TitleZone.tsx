import { AFFECTED_CHOICES, ARRANGEMENT_CHOICES, LOAD_KIND_CHOICES } from './choices';
import { ChecksAt, ChoiceAt, LongTextAt, QuantityAt, TextAt, WordsAt } from './fields';
import { Row } from './Part';

/** What the template is called, and how it is found. */
export function TitleZone() {
  return (
    <div className="grid gap-12">
      <div className="grid gap-12 md:grid-cols-[minmax(0,3fr)_minmax(0,1fr)]">
        <TextAt at="/name" label="Title" maxLength={120} />
        <TextAt at="/reference" label="Reference" maxLength={40} help="A word and a number: Overhang 7." />
      </div>
      <div className="grid gap-12 md:grid-cols-2">
        <WordsAt at="/tags" label="Tags" help="With commas between: roof, purlin, canopy." />
        <ChoiceAt at="/arrangement" label="Arrangement" choices={ARRANGEMENT_CHOICES} />
      </div>
      <ChecksAt at="/load_kinds" label="Kinds of load" choices={LOAD_KIND_CHOICES} />
      <LongTextAt at="/summary" label="Summary" rows={2} />
      <div className="grid gap-12 md:grid-cols-2">
        <TextAt at="/you_give" label="You give" maxLength={200} />
        <TextAt at="/you_get" label="You get" maxLength={200} />
      </div>
      <Row>
        <QuantityAt
          at="/stiffness/default_ei"
          label="EI without a section"
          dimension="bending_stiffness"
          help="Of a page that has no section yet."
        />
      </Row>
      <ChecksAt at="/stiffness/affects" label="The stiffness changes" choices={AFFECTED_CHOICES} />
    </div>
  );
}

import { Button } from '@/components/ui/Button';
import { freshId } from './add';
import { listAt, type Pointer, textAt } from './edit';
import { CheckAt, LongTextAt, TextAt } from './fields';
import { Row } from './Part';
import { PartList } from './PartList';
import { useAdd } from './use-add';
import { useDraft, useListAt } from './use-editor';

/** Sources by their ids, for a choice. */
export const useSourceChoices = () =>
  useListAt('/sources').map((one) => {
    const id = textAt(one, '/id');
    const publication = textAt(one, '/publication');
    return { value: id, label: publication === '' ? id : publication };
  });

/** Where the formulas and the figures come from. */
export function SourceZone() {
  const store = useDraft();
  const press = useAdd();
  const add = (more: object) => {
    const id = freshId(store.document, '/sources', 'source');
    press((document) => ({
      edits: [
        { do: 'insert', at: '/sources/-', value: { id, publication: '', ...more, from_memory: false } },
      ],
      select: `/sources/${listAt(document, '/sources').length}`,
    }));
  };
  return (
    <PartList
      isAlone
      list="/sources"
      label="Sources"
      empty="None yet. A template rests on one at least: a publication, or a derivation of the practice’s own."
      name="source"
      title={(one) => textAt(one, '/publication') || 'Without a title'}
      line={(one) =>
        [textAt(one, '/edition'), textAt(one, '/table'), textAt(one, '/case')]
          .filter((text) => text !== '')
          .join(', ')
      }
      add={
        <>
          <Button size="small" onClick={() => add({ table: '' })}>
            Add a publication
          </Button>
          <Button
            size="small"
            onClick={() => add({ publication: 'Derivation of the practice', derivation: '' })}
          >
            Add a derivation of our own
          </Button>
        </>
      }
      fields={(at) => <SourceFields at={at} />}
    />
  );
}

function SourceFields({ at }: { readonly at: Pointer }) {
  return (
    <>
      <Row>
        <TextAt at={`${at}/publication`} label="Publication" maxLength={200} />
        <TextAt at={`${at}/edition`} label="Edition" maxLength={80} isOptional />
        <TextAt at={`${at}/table`} label="Table or clause" maxLength={80} isOptional />
        <TextAt at={`${at}/case`} label="Case" maxLength={80} isOptional />
      </Row>
      <Row>
        <TextAt
          at={`${at}/id`}
          label="Id"
          maxLength={80}
          help="Cases and closed forms name the source by it."
        />
        <div className="self-center">
          <CheckAt at={`${at}/from_memory`}>From memory: to be compared with the print</CheckAt>
        </div>
      </Row>
      <LongTextAt
        at={`${at}/derivation`}
        label="Derivation"
        rows={4}
        isOptional
        help="For a formula of the practice’s own: how it follows. Markdown."
      />
    </>
  );
}

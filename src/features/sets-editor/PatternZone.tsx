import { Button } from '@/components/ui/Button';
import { LOAD_GROUPS } from '@/engine/combination';
import { listAt, type Pointer, textAt, valueAt } from '@/features/author/edit';
import { CheckAt, ChoiceAt, LongTextAt, TextAt } from '@/features/author/fields';
import { Row } from '@/features/author/Part';
import { PartList } from '@/features/author/PartList';
import { useAdd } from '@/features/author/use-add';
import { useTextAt } from '@/features/author/use-editor';
import type { Written } from '@/features/review/draft';
import { GROUP_CHOICES } from './combinations';

/** Whether the loads of a group are put where they are adverse alone, or stand on the whole length. */
export function PatternZone() {
  const press = useAdd();
  const publication = useTextAt('/publication');
  const add = (document: Written) => ({
    edits: [{ do: 'insert', at: '/patterns/-', value: newPattern(document, publication) }] as const,
    select: `/patterns/${listAt(document, '/patterns').length}`,
  });
  return (
    <PartList
      isAlone
      list="/patterns"
      label="How the loads stand"
      empty="Nothing said yet: every load stands on the whole length."
      name="group"
      title={(one) => nameOf(textAt(one, '/group'))}
      line={(one) =>
        valueAt(one, '/where_adverse') === true
          ? 'on each span and overhang only where adverse'
          : 'on the whole length'
      }
      add={
        <Button size="small" onClick={() => press(add)}>
          Add a group
        </Button>
      }
      fields={(at) => <PatternFields at={at} />}
    />
  );
}

const nameOf = (group: string): string =>
  GROUP_CHOICES.find(({ value }) => value === group)?.label ?? 'No group yet';

/** Of the first group that nothing is said of yet. */
function newPattern(document: Written, publication: string) {
  const said = listAt(document, '/patterns').map((one) => textAt(one, '/group'));
  return {
    group: LOAD_GROUPS.find((group) => !said.includes(group)) ?? 'G',
    where_adverse: false,
    basis: '',
    source: { publication, clause: '', from_memory: true },
  };
}

function PatternFields({ at }: { readonly at: Pointer }) {
  return (
    <>
      <ChoiceAt at={`${at}/group`} label="Group" choices={GROUP_CHOICES} />
      <CheckAt at={`${at}/where_adverse`}>On each span and overhang only where it is adverse</CheckAt>
      <LongTextAt at={`${at}/basis`} label="Why" rows={2} />
      <SourceFields at={`${at}/source`} />
    </>
  );
}

/** Where a value is printed, and whether it was written from memory. */
export function SourceFields({ at }: { readonly at: Pointer }) {
  return (
    <>
      <Row>
        <TextAt at={`${at}/publication`} label="Publication" maxLength={120} />
        <TextAt at={`${at}/clause`} label="Clause" maxLength={120} />
      </Row>
      <CheckAt at={`${at}/from_memory`}>From memory: to be compared with the print</CheckAt>
    </>
  );
}
